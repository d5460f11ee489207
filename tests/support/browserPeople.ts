import type { Page } from 'playwright-core';
import type { Visitor } from './browser';
import { assertAccessible } from './browserAxe';
import type { Hands } from './browserHands';
import { stack } from './browserStack';

export const PASSWORD = 'rake the seed bed twice';

let serial = 0;
export const newAddress = (who: string): string => {
  serial += 1;
  return `${who}-${serial}-${Date.now().toString(36)}@garden.test`;
};

export const go = (page: Page, place: string) => page.goto(`${stack().origin}${place}`);
export const button = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: true });
export const link = (page: Page, name: string | RegExp) => page.getByRole('link', { name, exact: true });
export const heading = (page: Page, name: string | RegExp) => page.getByRole('heading', { name, exact: true });
export const field = (page: Page, label: string | RegExp) => page.getByLabel(label, { exact: true });

/** Fills the form that is open and goes on to the mailbox page, in the tab it opens, up to the confirmed address. */
export async function signUpByMailbox(visitor: Visitor, hands: Hands, who: { name: string; email: string }) {
  const { page, context } = visitor;
  await hands.write(field(page, 'Your name'), who.name);
  if ((await field(page, 'E-mail address').inputValue()) !== who.email)
    await hands.write(field(page, 'E-mail address'), who.email);
  await hands.write(field(page, 'Password'), PASSWORD);
  await hands.press(button(page, 'Make the account'));
  await heading(page, 'One step left: look for our mail').waitFor();
  await assertAccessible(page, 'sign-up, after sending');

  const opened = context.waitForEvent('page');
  await hands.press(link(page, 'the mailbox page'));
  const mailbox = await opened;
  await followMail(mailbox, hands, who.email, /\/verify\//);
  await heading(mailbox, 'Confirm your address').waitFor();
  await assertAccessible(mailbox, 'verify');
  await hands.press(button(mailbox, 'Confirm this address'));
  await heading(mailbox, 'Confirmed').waitFor();
  await hands.press(mailbox.locator('#content').getByRole('link', { name: 'Sign in', exact: true }));
  return mailbox;
}

/** From the mailbox's list to the newest mail of this address, and by the link in its text. */
export async function followMail(mailbox: Page, hands: Hands, to: string, href: RegExp): Promise<void> {
  const mine = mailbox.getByRole('listitem').filter({ hasText: to }).first();
  // The worker sends a moment later than the page says so; the list is looked at again, as its reader would.
  while ((await mine.count()) === 0) await mailbox.reload();
  await hands.press(mine.getByRole('link'));
  const links = mailbox.locator('[data-part=text] a');
  await links.first().waitFor();
  const hrefs = await links.evaluateAll((all) => all.map((one) => one.getAttribute('href') ?? ''));
  await hands.press(links.nth(hrefs.findIndex((one) => href.test(one))));
}

export async function signIn(page: Page, hands: Hands, email: string, password = PASSWORD): Promise<void> {
  await heading(page, 'Sign in').waitFor();
  if ((await field(page, 'E-mail address').inputValue()) !== email)
    await hands.write(field(page, 'E-mail address'), email);
  await hands.write(field(page, 'Password'), password);
  await hands.press(button(page, 'Sign in'));
}

/** Opens a menu and takes one of its entries. */
export async function takeFromMenu(page: Page, hands: Hands, menu: string | RegExp, entry: string): Promise<void> {
  await hands.press(button(page, menu));
  await hands.pressEntry(page.getByRole('menuitem', { name: entry }));
}

/** Goes to a place of the site by the links that are always there; on a phone some stand behind “More”. */
export async function openPlace(page: Page, hands: Hands, place: string): Promise<void> {
  const name = new RegExp(`^${place}\\b`);
  const within = page.getByRole('navigation').getByRole('link', { name });
  if ((await within.count()) > 0) return hands.press(within.first());
  await hands.press(button(page, 'More'));
  await hands.press(page.getByRole('dialog').getByRole('link', { name }));
}
