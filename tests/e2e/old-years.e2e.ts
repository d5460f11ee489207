import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/lib/data/database';
import { PHONE, useBrowser } from '../support/browser';
import { assertAccessible, assertNoSidewaysScroll } from '../support/browserAxe';
import { dropOnto } from '../support/browserDrop';
import { KEYBOARD } from '../support/browserHands';
import { tabTo, typeOption } from '../support/browserKeys';
import { button, field, go, heading, link } from '../support/browserPeople';
import { callAs, mailTo, newMail } from '../support/browserStack';
import { cookieFor, makePlot, makeSite } from '../support/factory';

const YEARS = 12;
let folder = '';
let files: string[] = [];

/** Twelve years of one bag each, and a file that is no report. */
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'old-years-'));
  const years = Array.from({ length: YEARS }, (_, at) => 2014 + at);
  for (const [at, year] of years.entries()) {
    const text = `Sample ID,Lab No,Date Sampled,Soil pH,P (ppm),K (ppm)\nBag ${at + 1},L-${year},${year}-04-12,6.${at % 10},${40 + at},${180 + at}\n`;
    await writeFile(path.join(folder, `spring-${year}.csv`), text);
  }
  await writeFile(path.join(folder, 'not-a-report.pdf'), '<html><body>A web page</body></html>');
  files = [...years.map((year) => `spring-${year}.csv`), 'not-a-report.pdf'].map((name) => path.join(folder, name));
});
afterAll(async () => {
  await rm(folder, { recursive: true, force: true });
  await closeDatabase();
});

const row = (page: Page, at: number) => page.locator(`tr[data-row="${at}"]`);
const assigned = (page: Page, plot: string) => page.locator('tr[data-row]').filter({ hasText: plot });

/** Chooses rows from one to another with Space and Shift, goes to the plot with Enter, and sets it. */
async function assign(page: Page, from: number, to: number, plot: string): Promise<void> {
  const { keyboard } = page;
  await tabTo(page.locator('tr[data-row][tabindex="0"]'));
  await keyboard.press('Home');
  for (let at = 0; at < from; at += 1) await keyboard.press('ArrowDown');
  await keyboard.press('Space');
  for (let at = from; at < to; at += 1) await keyboard.press('Shift+ArrowDown');
  await keyboard.press('Enter');
  const picker = field(page, /^Plot of \d+ samples$/);
  await expect.poll(() => picker.evaluate((element) => element === document.activeElement)).toBe(true);
  await typeOption(picker, plot);
  await KEYBOARD.press(button(page, `Set the plot of ${to - from + 1}`));
  await expect.poll(() => assigned(page, plot).count()).toBe(to - from + 1);
}

const focusIsOn = (page: Page, words: RegExp) =>
  expect.poll(() => page.evaluate(() => document.activeElement?.textContent ?? '')).toMatch(words);

describe('Old years at once', () => {
  const { visitor } = useBrowser();

  test('are dropped, given their plots together and reviewed one after another by keys alone', async () => {
    const site = await makeSite('Old Years');
    for (const name of ['Long border', 'Top bed']) await makePlot(site.id, { name });
    const cookie = await cookieFor(site.people.owner);
    const caller = callAs(cookie);
    await caller.send('PUT', '/mail/preferences', { kind: 'report-ready', wanted: true });
    const { page, expectAnswers } = await visitor({ cookie });
    expectAnswers(415);

    await go(page, `/sites/${site.id}/reports`);
    await button(page, 'Upload reports').waitFor();
    await dropOnto(page.locator('#content'), files);
    await heading(page, '13 files at once').waitFor();
    await page.getByText('13 of 13 gone through').waitFor({ timeout: 60_000 });
    await page.getByText('12 reports to review, 1 not taken.').waitFor();
    await page
      .getByText(/All 13 files have been gone through: 12 reports to review/)
      .first()
      .waitFor();

    await page.reload();
    const refused = page
      .getByRole('list', { name: 'Files' })
      .getByRole('listitem')
      .filter({ hasText: 'not-a-report.pdf' });
    await refused.getByText(/named as a PDF but is something else/).waitFor();
    await assertAccessible(page, 'a batch');

    await assign(page, 0, 5, 'Top bed');
    await assign(page, 6, 11, 'Long border');
    await page.getByText('Every sample has its plot.').waitFor();
    await assertNoSidewaysScroll(page, 'a batch');

    await KEYBOARD.press(link(page, 'Review 12 one after another'));
    for (const position of [1, 2]) {
      await page.getByTestId('batch-strip').getByText(`${position} of 12`).waitFor();
      await page.getByText('Everything is there.').waitFor();
      await KEYBOARD.press(button(page, 'Confirm 3 values'));
      await page.getByText(/^Confirmed by /).waitFor();
      await focusIsOn(page, /Next report of these files/);
      if (position === 1) await page.keyboard.press('Enter');
    }
    await page.keyboard.press('Alt+R');
    await page.getByTestId('batch-strip').getByText('3 of 12').waitFor();
    await assertAccessible(page, 'a review of a batch');
    const { results } = await caller.get<{ results: unknown[] }>(`/sites/${site.id}/results`);
    expect(results).toHaveLength(6);

    const letter = await newMail(site.people.owner.email, /12 of 13 reports ready to review/);
    expect(letter.text).toContain('12 reports with 12 samples wait to be compared');
    expect(await mailTo(site.people.owner.email)).toHaveLength(1);

    const phone = await visitor({ cookie, viewport: PHONE, touch: true });
    await go(phone.page, new URL(page.url()).pathname.replace(/reports\/.*/, 'reports'));
    await phone.page.getByRole('link', { name: '13 files sent at once' }).tap();
    await row(phone.page, 9).waitFor();
    await assertNoSidewaysScroll(phone.page, 'a batch on a phone');
  });
});
