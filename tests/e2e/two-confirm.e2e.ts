import type { Page } from 'playwright-core';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/lib/data/database';
import { useBrowser } from '../support/browser';
import { KEYBOARD } from '../support/browserHands';
import { button, go } from '../support/browserPeople';
import { callAs } from '../support/browserStack';
import { cookieFor, makePlot, makeSite } from '../support/factory';

const REPORT = 'fixtures/reports/main-job/this-spring.csv';
const VALUES = 39;

/** Keeps what the pages send back until all have sent it, then lets all of it go at once. */
function meetingPoint(expected: number) {
  let arrived = 0;
  let open: () => void = () => undefined;
  const all = new Promise<void>((resolve) => {
    open = resolve;
  });
  return (page: Page) =>
    page.route('**/confirm', async (request) => {
      arrived += 1;
      if (arrived === expected) open();
      await all;
      await request.continue();
    });
}

describe('Two people at one report', () => {
  const { visitor } = useBrowser();
  afterAll(closeDatabase);

  test('who confirm at once: one of them does, the other is told who it was, and every value counts once', async () => {
    const site = await makeSite('Brook End');
    for (const name of ['Top bed', 'Long border', 'Wall bed']) await makePlot(site.id, { name });
    const cookies = { owner: await cookieFor(site.people.owner), adviser: await cookieFor(site.people.adviser) };
    const caller = callAs(cookies.owner);
    const reportId = await caller.upload(site.id, REPORT);
    const hold = meetingPoint(2);
    const both = await Promise.all(
      [cookies.owner, cookies.adviser].map(async (cookie) => {
        const { page, expectAnswers } = await visitor({ cookie });
        expectAnswers(409);
        await hold(page);
        await go(page, `/sites/${site.id}/reports/${reportId}`);
        await page.getByText('Everything is there.').waitFor();
        return page;
      }),
    );
    for (const page of both) await KEYBOARD.press(button(page, `Confirm ${VALUES} values`));
    for (const page of both)
      await page
        .getByText(/^Confirmed by /)
        .or(page.getByTestId('faster'))
        .first()
        .waitFor();

    const told = await Promise.all(both.map((page) => page.getByTestId('faster').count()));
    expect(told.toSorted()).toEqual([0, 1]);
    const second = both[told.indexOf(1)];
    const first = told[0] === 1 ? site.people.adviser : site.people.owner;
    await second?.getByTestId('faster').getByText(first.name).waitFor();
    if (second) await KEYBOARD.press(button(second, 'Show it as it stands now'));
    await second?.getByText(new RegExp(`^Confirmed by ${first.name}`)).waitFor();
    const { results } = await caller.get<{ results: unknown[] }>(`/sites/${site.id}/results`);
    expect(results).toHaveLength(VALUES);
  });
});
