import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/lib/data/database';
import { useBrowser } from '../support/browser';
import { assertAccessible } from '../support/browserAxe';
import { dropOnto } from '../support/browserDrop';
import { KEYBOARD } from '../support/browserHands';
import { button, go, heading } from '../support/browserPeople';
import { callAs } from '../support/browserStack';
import { cookieFor, makePlot, makeSite, type TestSite } from '../support/factory';

const REFUSED = 'fixtures/reports/refused';
const MB = 1024 * 1024;

describe('A file that cannot be used', () => {
  const { visitor } = useBrowser();
  let folder: string;
  let site: TestSite;
  let cookie: string;

  beforeAll(async () => {
    folder = mkdtempSync(path.join(tmpdir(), 'loamline-bad-'));
    site = await makeSite('Brook End');
    await makePlot(site.id, { name: 'Long bed' });
    cookie = await cookieFor(site.people.owner);
  });
  afterAll(async () => {
    rmSync(folder, { recursive: true, force: true });
    await closeDatabase();
  });

  const ground = async () => {
    const one = await visitor({ cookie });
    await go(one.page, `/sites/${site.id}`);
    await heading(one.page, 'Brook End').waitFor();
    return one;
  };
  const written = (name: string, bytes: number) => {
    const file = path.join(folder, name);
    writeFileSync(file, Buffer.alloc(bytes, '%PDF-1.7\n'));
    return file;
  };
  const give = (page: Page, file: string) => KEYBOARD.give(button(page, 'Upload reports'), [file]);
  const itemOf = (page: Page, file: string) => page.locator('[data-stage]').filter({ hasText: path.basename(file) });
  const kept = async () =>
    (await callAs(cookie).get<{ reports: unknown[] }>(`/sites/${site.id}/reports`)).reports.length;

  test.each([
    {
      what: 'of the wrong type',
      file: () => `${REFUSED}/program.exe`,
      says: /Nothing was sent: reports are taken as PDF, picture/,
    },
    {
      what: 'of 21 MB',
      file: () => written('heavy.pdf', 21 * MB),
      says: /has 21 MB; at most 20 MB are taken\. Nothing was sent/,
    },
    { what: 'that is empty', file: () => written('empty.pdf', 0), says: /This file is empty, so nothing was sent/ },
  ])('$what is refused with a sentence before a byte is sent', async ({ file, says }) => {
    const before = await kept();
    const { page } = await ground();
    const path = file();
    await give(page, path);
    await itemOf(page, path).getByText(says).waitFor();
    await assertAccessible(page, 'the ground with a refused file');
    expect(await kept()).toBe(before);
  });

  test('with another type inside than its name says is refused by the server, and nothing is kept', async () => {
    const before = await kept();
    const { page, expectAnswers } = await ground();
    expectAnswers(415);
    await give(page, `${REFUSED}/web-page.pdf`);
    await itemOf(page, 'web-page.pdf')
      .getByText(/is named as a PDF but is something else/)
      .waitFor();
    expect(await kept()).toBe(before);
  });

  test.each([
    { what: 'locked with a password', file: 'locked.pdf', says: /locked with a password. It is kept/ },
    { what: 'cut off', file: 'cut-off.pdf', says: /ends before it should; the download was probably cut off/ },
    {
      what: 'without a single result',
      file: 'no-rows.csv',
      says: /No soil-test results were found in this file. It is kept/,
    },
  ])('$what is kept, says why, and can be typed in beside its page', async ({ file, says }) => {
    const before = await kept();
    const { page } = await ground();
    await dropOnto(page.getByRole('list', { name: 'Plots' }).getByRole('listitem'), [`${REFUSED}/${file}`]);
    const item = itemOf(page, file);
    await item.getByText(says).waitFor();
    expect(await kept()).toBe(before + 1);
    await KEYBOARD.press(item.getByRole('link', { name: `Open ${file}` }));
    await button(page, 'Type it in beside the page').waitFor();
    await page.getByText(says).first().waitFor();
    await assertAccessible(page, `the report ${file}`);
    await KEYBOARD.press(button(page, 'Type it in beside the page'));
    await heading(page, 'Check the values').waitFor();
  });
});
