import type { Locator, Page } from 'playwright-core';
import { until } from './until';

const MOST_TABS = 250;

/**
 * Presses Tab, as somebody without a mouse does, until the control has the focus; Shift+Tab when it stands before the
 * place where the focus is. Fails when it is not reached, when its focus cannot be seen, or when something covers it.
 */
export async function tabTo(target: Locator): Promise<void> {
  await isAlive(target);
  const page = target.page();
  const key = (await stands(target)) === 'before' ? 'Shift+Tab' : 'Tab';
  for (let presses = 0; presses < MOST_TABS; presses += 1) {
    if (await hasFocus(target)) return assertFocusShows(target);
    await page.keyboard.press(key);
  }
  const at = await page.evaluate(() => document.activeElement?.outerHTML.slice(0, 200));
  throw new Error(`${MOST_TABS} presses of ${key} never reached ${target}. The focus is on ${at}.`);
}

const hasFocus = (target: Locator) => target.evaluate((element) => element === document.activeElement);

const stands = (target: Locator) =>
  target.evaluate((element) => {
    const at = document.activeElement;
    if (!at || at === document.body) return 'after';
    const isBefore = element.compareDocumentPosition(at) & Node.DOCUMENT_POSITION_FOLLOWING;
    return isBefore && !element.contains(at) ? 'before' : 'after';
  });

/** Server-drawn controls do nothing before the page's code has taken them over; pages that are not ours have no such code. */
export async function isAlive(target: Locator): Promise<void> {
  await until(
    `${target} answers`,
    () =>
      target.evaluate((element) => {
        const isOurs = document.querySelector('script[src*="/_next/"]') !== null;
        return !isOurs || Object.keys(element).some((name) => name.startsWith('__reactProps'));
      }),
    Boolean,
    20_000,
  );
}

async function assertFocusShows(target: Locator): Promise<void> {
  // Messages that lie over what has the focus move away from it; that takes a frame.
  const isWell = (wrong: string | null) => wrong === null;
  await until(`${target} has the focus and can be seen`, () => target.evaluate(wrongWithFocus), isWell, 2_000);
}

/** Runs in the page: what keeps a person from seeing where the focus is, or null. */
function wrongWithFocus(element: Element): string | null {
  const label = element instanceof HTMLInputElement ? element.labels?.[0] : null;
  const shows = [element, label].some((one) => {
    if (!one) return false;
    const { outlineStyle, outlineWidth, boxShadow } = getComputedStyle(one);
    return (outlineStyle !== 'none' && outlineWidth !== '0px') || boxShadow !== 'none';
  });
  if (!shows) return 'nothing shows that it has the focus';
  const { left, top, width, height } = element.getBoundingClientRect();
  const spots = [0.1, 0.5, 0.9].flatMap((x) => [0.1, 0.5, 0.9].map((y) => [left + x * width, top + y * height]));
  const isSeen = spots.some(([x = 0, y = 0]) => {
    const hit = document.elementFromPoint(x, y);
    if (hit === null) return false;
    return element.contains(hit) || hit === element.parentElement || (label && hit.closest('label') === label);
  });
  return isSeen ? null : `it is outside the window or covered, at ${left},${top} ${width}×${height}`;
}

/** Types a day into a date field, part by part as its locale orders them. */
export async function typeDay(page: Page, day: string): Promise<void> {
  const [year = '', month = '', date = ''] = day.split('-');
  await page.keyboard.type(`${month}${date}${year}`);
}

/** Picks an option of a closed list by typing as much of its name as tells it from the others. */
export async function typeOption(target: Locator, option: string): Promise<void> {
  const labels = await target.evaluate((element) =>
    element instanceof HTMLSelectElement ? [...element.options].map(({ label }) => label) : [],
  );
  const others = labels.filter((label) => label !== option).map((label) => label.toLowerCase());
  const lengths = [...option].map((_, at) => at + 1);
  const enough = lengths.find((length) => {
    const start = option.slice(0, length).toLowerCase();
    return !others.some((label) => label.startsWith(start));
  });
  await target.page().keyboard.type(option.slice(0, enough ?? option.length));
  const chosen = await target.evaluate((element) =>
    element instanceof HTMLSelectElement ? element.selectedOptions[0]?.label : undefined,
  );
  if (chosen !== option) throw new Error(`Typing ${option} chose ${chosen}, of ${labels.join(', ')}.`);
}
