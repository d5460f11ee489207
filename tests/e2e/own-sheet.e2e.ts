import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/lib/data/database';
import { PHONE, useBrowser } from '../support/browser';
import { assertAccessible, assertNoSidewaysScroll } from '../support/browserAxe';
import { KEYBOARD } from '../support/browserHands';
import { button, go, heading } from '../support/browserPeople';
import { callAs } from '../support/browserStack';
import { cookieFor, makePlot, makeSite } from '../support/factory';

const SHEET = [
  'Bed,Date,pH,P (ppm),Remarks',
  'Top bed,2019-04-10,6.1,44,wet',
  'Orchard,2019-04-11,6.6,61,',
  'Top bed,2020-04-12,6.2,47,dry',
  'Top bed,,6.7,60,no day',
].join('\n');

type Row = { id: string; version: number; label: string; method: string | null };

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'loamline-sheets-'));
});
afterAll(async () => {
  await rm(folder, { recursive: true, force: true });
  await closeDatabase();
});

async function onDisk(name: string, text: string): Promise<string> {
  const file = path.join(folder, name);
  await writeFile(file, text);
  return file;
}

async function place(name: string) {
  const site = await makeSite(name);
  for (const plot of ['Top bed', 'Long border']) await makePlot(site.id, { name: plot });
  const cookie = await cookieFor(site.people.owner);
  const caller = callAs(cookie);
  const results = async () => (await caller.get<{ results: unknown[] }>(`/sites/${site.id}/results`)).results.length;
  return { site, cookie, caller, results };
}

describe('Old results of one’s own', () => {
  const { visitor } = useBrowser();

  test('are mapped, looked at, brought in once and taken back, with the keyboard', async () => {
    const { site, cookie, results } = await place('Sheet Lane');
    const file = await onDisk('old.csv', SHEET);
    const { page } = await visitor({ cookie });
    await go(page, `/sites/${site.id}/reports/own-sheet`);
    await KEYBOARD.give(button(page, 'Choose the spreadsheet'), [file]);
    await heading(page, '1. What each column holds').waitFor();
    await assertAccessible(page, 'an own spreadsheet');
    await page.setViewportSize(PHONE);
    await assertNoSidewaysScroll(page, 'an own spreadsheet on a phone');
    await page.setViewportSize({ width: 1280, height: 900 });

    await page.getByText('2 samples with a plot and a day, 2 left out.').waitFor();
    await KEYBOARD.choose(page.getByLabel('Orchard (1 sample)'), 'Long border');
    await page.getByText('3 samples with a plot and a day, 1 left out.').waitFor();
    const bring = button(page, 'Bring in 3 samples');
    await bring.dblclick();
    await page.getByText(/^Confirmed by /).waitFor();
    await page.getByText('typed by the grower, with no laboratory page behind them', { exact: false }).waitFor();
    expect(await results()).toBe(6);

    await KEYBOARD.press(button(page, 'Withdraw'));
    await KEYBOARD.write(page.getByLabel('Why'), 'The wrong sheet');
    await KEYBOARD.press(button(page, 'Withdraw the confirmation'));
    await page.getByText('The wrong sheet').waitFor();
    await heading(page, '1. What each column holds').waitFor();
    expect(await results()).toBe(0);
  });

  test('come as pasted text as well', async () => {
    const { site, cookie } = await place('Mail Lane');
    const { page } = await visitor({ cookie });
    await go(page, `/sites/${site.id}/reports`);
    await KEYBOARD.press(button(page, 'Paste from a mail'));
    await KEYBOARD.press(button(page, 'Send this text'));
    await page.getByText('Paste the text of the mail here first.').waitFor();
    await page
      .getByLabel('Text of the mail')
      .fill('Top bed\npH 6.4\nPhosphorus (Mehlich-3) 52 ppm\nPotassium 188 ppm\n');
    await KEYBOARD.press(button(page, 'Send this text'));
    await page.getByText('1 sample to review').first().waitFor();
  });
});

describe('What a confirmation taught', () => {
  const { visitor } = useBrowser();

  test('stands in the next report of the form with its day, and is forgotten with one button', async () => {
    const { site, cookie, caller } = await place('Learning Lane');
    const report = (year: number) =>
      `Fen Road Soil Laboratory\n\nSample ID,Date Sampled,pH,P (ppm),K (ppm)\nTop bed,${year}-04-10,6.4,4${year % 10},15${year % 10}\n`;
    const first = await caller.upload(site.id, await onDisk('2024.csv', report(2024)));
    const home = `/sites/${site.id}/reports`;
    const { rows } = await caller.get<{ rows: Row[] }>(`${home}/${first}/review`);
    for (const row of rows.filter((one) => one.method === null && one.label !== 'pH')) {
      await caller.send('PATCH', `${home}/${first}/rows/${row.id}`, { version: row.version, method: 'Olsen' });
    }
    await caller.send('POST', `${home}/${first}/confirm`, {});
    const second = await caller.upload(site.id, await onDisk('2025.csv', report(2025)));

    const { page } = await visitor({ cookie });
    await go(page, `${home}/${second}`);
    await page.getByText(/^You confirmed this form on /).waitFor();
    expect(await page.getByText(/as you confirmed on/).count()).toBeGreaterThan(0);

    await go(page, `${home}/learnt`);
    await heading(page, 'Fen Road Soil Laboratory').waitFor();
    await KEYBOARD.press(button(page, 'Forget this layout').first());
    await KEYBOARD.press(page.getByRole('dialog').getByRole('button', { name: 'Forget this layout' }));
    await page.getByText('Nothing learnt yet').waitFor();
  });
});
