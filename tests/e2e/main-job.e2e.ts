import type { Locator, Page } from 'playwright-core';
import { afterEach, describe, expect, test } from 'vitest';
import { PHONE, useBrowser, type Visitor } from '../support/browser';
import { assertAccessible, assertNoSidewaysScroll } from '../support/browserAxe';
import { dropOnto } from '../support/browserDrop';
import { type Hands, KEYBOARD, TOUCH } from '../support/browserHands';
import {
  button,
  field,
  followMail,
  go,
  heading,
  link,
  newAddress,
  openPlace,
  signIn,
  signUpByMailbox,
} from '../support/browserPeople';
import { newMail, setClock, stack } from '../support/browserStack';

const REPORTS = 'fixtures/reports/main-job';
const LAST_FALL = 'last-fall.pdf';
const LAST_SPRING = 'last-spring.pdf';
const THIS_SPRING = 'this-spring.csv';
const PLOTS = [
  { name: 'Top bed', left: '2', bottom: '2', width: '20', length: '10' },
  { name: 'Long border', left: '30', bottom: '2', width: '40', length: '5' },
  { name: 'Wall bed', left: '2', bottom: '40', width: '20', length: '10' },
];
const TREATED = ['Top bed', 'Long border'];

/** Both walks begin a fortnight after this spring's test, whatever day it is on the machine. */
const BEFORE = '2026-04-25T16:00:00Z';
/** Noon in New York on the day the yearly test of Top bed is due. */
const DUE = '2027-04-11T16:00:00Z';

type Walk = {
  visitor: Visitor;
  hands: Hands;
  /** How files come to a plot of the list. */
  bring: (page: Page, plot: string, files: string[]) => Promise<void>;
  mend: (page: Page, hands: Hands) => Promise<void>;
};

const content = (page: Page) => page.locator('#content');
const fixture = (name: string) => `${REPORTS}/${name}`;
const row = (page: Page, plot: string) =>
  page.getByRole('list', { name: 'Plots' }).getByRole('listitem').filter({ hasText: plot });

async function passed(page: Page, where: string): Promise<void> {
  await assertAccessible(page, where);
  await assertNoSidewaysScroll(page, where);
}

async function makeSite(page: Page, hands: Hands): Promise<void> {
  await heading(page, 'Today').waitFor();
  await passed(page, 'today, before any site');
  await hands.press(content(page).locator('a[href="/new-site"]').first());
  await field(page, 'Name of the site').waitFor();
  await passed(page, 'a new site');
  await hands.write(field(page, 'Name of the site'), 'Mill Lane');
  await hands.press(button(page, 'Open the site'));
  await heading(page, 'Mill Lane').waitFor();
}

async function drawPlots(page: Page, hands: Hands): Promise<void> {
  for (const [at, plot] of PLOTS.entries()) {
    await hands.press(link(page, at === 0 ? 'Add the first plot' : 'Add a plot'));
    await field(page, 'Name').waitFor();
    if (at === 0) await passed(page, 'a new plot');
    await hands.write(field(page, 'Name'), plot.name);
    await hands.write(field(page, 'From the left'), plot.left);
    await hands.write(field(page, 'From the bottom'), plot.bottom);
    await hands.write(field(page, 'Width'), plot.width);
    await hands.write(field(page, 'Length'), plot.length);
    await hands.press(button(page, 'Add the plot'));
    await row(page, plot.name).waitFor();
  }
  await passed(page, 'the ground with three plots');
}

/** A report of three bags whose names are the plots' own: laboratory, places, day, then every value at once. */
async function review(page: Page, hands: Hands, file: string, mend?: Walk['mend']): Promise<void> {
  await openPlace(page, hands, 'Reports');
  await heading(page, 'Reports').waitFor();
  await passed(page, `the reports, before ${file}`);
  await hands.press(content(page).getByRole('link', { name: file }).first());
  await heading(page, 'Check the values').waitFor();
  await passed(page, `the review of ${file}`);
  const laboratory = field(page, 'Laboratory');
  const useThis = button(page, 'Use the printed name');
  if ((await laboratory.inputValue()) === '') await hands.press(useThis);
  await expect.poll(() => laboratory.inputValue()).not.toBe('');
  for (const { name } of PLOTS) {
    const plot = field(page, `Plot of ${name}`);
    if ((await chosen(plot)) !== name) await hands.choose(plot, name);
    await expect.poll(() => chosen(plot)).toBe(name);
  }
  if (mend) await mend(page, hands);
  const confirm = button(page, /^Confirm \d+ values$/);
  await page.getByText('Everything is there.').waitFor();
  await hands.press(confirm);
  await page.getByText(/^Confirmed by /).waitFor();
  // The button that had the focus is gone; whoever goes on by keys must not be thrown back to the top.
  await expect.poll(() => page.evaluate(() => document.activeElement !== document.body)).toBe(true);
  await passed(page, `${file}, confirmed`);
}

const chosen = (list: Locator) =>
  list.evaluate((element) => (element instanceof HTMLSelectElement ? element.selectedOptions[0]?.label : undefined));

async function recordSulfur(page: Page, hands: Hands, plot: string): Promise<void> {
  await openPlace(page, hands, 'Ground');
  await hands.press(row(page, plot).getByRole('link', { name: plot, exact: true }));
  await page.getByTestId('finding').waitFor();
  await passed(page, `the history of ${plot}`);
  await hands.press(content(page).getByRole('link', { name: 'Records', exact: true }));
  await hands.press(button(page, 'Record what was spread'));
  await passed(page, `a record on ${plot}`);
  await hands.choose(field(page, 'Material'), 'Elemental sulfur, 90 %, prilled');
  await hands.write(field(page, 'Amount spread'), '2');
  await hands.day(field(page, 'Day'), '2025-04-26');
  await hands.choose(field(page, 'Analyte'), 'pH in water');
  await hands.write(field(page, 'Change meant'), '-0.5');
  await hands.press(button(page, 'Record this application'));
  await page
    .getByRole('list', { name: /What was spread/ })
    .getByText('2 lb')
    .first()
    .waitFor();
  await passed(page, `the records of ${plot}`);
}

async function mainJob({ visitor, hands, bring, mend }: Walk): Promise<void> {
  const me = { name: 'Ada Brook', email: newAddress('main') };
  await setClock(BEFORE);
  await go(visitor.page, '/');
  await passed(visitor.page, 'the first page');
  await hands.press(link(visitor.page, 'Start with your last report'));
  await field(visitor.page, 'Your name').waitFor();
  await passed(visitor.page, 'sign-up');
  const page = await signUpByMailbox(visitor, hands, me);
  await signIn(page, hands, me.email);

  await makeSite(page, hands);
  await drawPlots(page, hands);
  await bring(page, 'Top bed', [fixture(LAST_SPRING), fixture(THIS_SPRING)]);
  await bring(page, 'Long border', [fixture(LAST_FALL)]);
  for (const file of [LAST_SPRING, THIS_SPRING, LAST_FALL])
    await page.locator('[data-stage=settled]').filter({ hasText: file }).getByText('3 samples to review').waitFor();
  await passed(page, 'the ground with its reports read');

  await review(page, hands, LAST_FALL);
  await review(page, hands, LAST_SPRING, mend);
  await review(page, hands, THIS_SPRING);
  for (const plot of TREATED) await recordSulfur(page, hands, plot);

  // The verdict, against the bed that got nothing.
  await hands.press(content(page).getByRole('link', { name: 'Effects', exact: true }));
  await page
    .getByText(/^pH fell by 0\.\d+ against the untreated plots/)
    .first()
    .waitFor();
  await hands.press(page.locator('summary', { hasText: 'Why' }));
  await page.getByText('Wall bed').first().waitFor();
  await passed(page, 'the verdict');

  await hands.press(content(page).getByRole('link', { name: 'Compare', exact: true }));
  await hands.press(link(page, 'Spring 2026 with fall 2024'));
  // Printed 7.5 then, 7.0 now; and the value that was mended stands among the tests as it was mended.
  await page
    .getByTestId('compared')
    .getByText(/^pH is 0\.50 lower on 11 April 2026 than on 5 October 2024/)
    .waitFor();
  const tests = await field(page, 'First test').locator('option').allTextContents();
  expect(tests).toContain('12 Apr 2025: 7.3, Top bed');
  await passed(page, 'the comparison with last fall');

  await openPlace(page, hands, 'Reminders');
  await hands.tick(page.getByRole('group', { name: 'Top bed' }).getByLabel('Yearly, same season'));
  await page
    .getByText(/Comes due 11 April 2027/)
    .first()
    .waitFor();
  await passed(page, 'the reminders');

  await setClock(DUE);
  const mail = await newMail(me.email, /sample|due/i);
  expect(mail.attachments.map(({ filename }) => filename)).toEqual([expect.stringMatching(/\.ics$/)]);
  expect(mail.headers).toMatchObject({ 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' });
  await page.goto(`${stack().mailbox}/?to=${encodeURIComponent(me.email)}`);
  await followMail(page, hands, me.email, /\/unsubscribe/);
  await heading(page, 'Stop reminder mail').waitFor();
  await passed(page, 'unsubscribe');
  await hands.press(button(page, 'Stop reminder mail'));
  await page.getByText('No more reminder mail').waitFor();
  await passed(page, 'unsubscribed');

  // A year has passed, so the session has ended; what is due still stands on the first page, and the mail is off.
  await hands.press(link(page, 'Sign in').first());
  await signIn(page, hands, me.email);
  await page.getByText('Due today').waitFor();
  await passed(page, 'today, with a sample due');
  await go(page, '/account');
  expect(await field(page, 'Reminders of samples that are due').isChecked()).toBe(false);
}

describe('The main job', () => {
  const { visitor } = useBrowser();
  afterEach(() => setClock(null));

  test('with nothing but the keyboard, at 1280 px', async () => {
    await mainJob({
      visitor: await visitor(),
      hands: KEYBOARD,
      bring: (page, plot, files) =>
        KEYBOARD.give(row(page, plot).getByRole('button', { name: /^Upload a report/ }), files),
      mend: async (page) => {
        await KEYBOARD.press(button(page, /^Next doubtful/));
        const cell = page.locator('[data-cell]:focus');
        expect(await cell.getAttribute('aria-label')).toBe('Soil pH (in water), Top bed, Value: 73');
        await page.keyboard.type('7.3');
        await page.keyboard.press('Enter');
        await page.getByRole('gridcell', { name: 'Soil pH (in water), Top bed, Value: 7.3' }).waitFor();
        await page.getByTestId('grid-saved').getByText('All saved.').waitFor();
      },
    });
  });

  test('with a finger, at 390 px', async () => {
    await mainJob({
      visitor: await visitor({ viewport: PHONE, touch: true }),
      hands: TOUCH,
      bring: (page, plot, files) => dropOnto(row(page, plot), files),
      mend: async (page) => {
        await TOUCH.press(button(page, /^Next doubtful/));
        const value = page.locator('input[data-cell]:focus');
        expect(await value.inputValue()).toBe('73');
        await value.fill('7.3');
        await page.keyboard.press('Enter');
        await page.getByTestId('grid-saved').getByText('All saved.').waitFor();
      },
    });
  });
});
