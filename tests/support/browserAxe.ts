import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { until } from './until';

/** Throws with every breach axe finds on the page as it stands, each with its elements; target sizes included. */
export async function assertAccessible(page: Page, where: string): Promise<void> {
  await drawn(page);
  const rules = { 'target-size': { enabled: true } };
  // One frame and only what is wrong: half the time of a full report.
  const axe = new AxeBuilder({ page }).setLegacyMode(true).options({ rules, resultTypes: ['violations'] });
  const { violations } = await axe.analyze();
  if (violations.length === 0) return;
  const lines = violations.flatMap(({ id, help, nodes }) => [
    `${id}: ${help}`,
    ...nodes.map(({ target, html, failureSummary = '' }) => {
      const why = failureSummary.split('\n').slice(1).join(' ').trim();
      return `    ${target.join(' ')}\n      ${html.slice(0, 200)}\n      ${why}`;
    }),
  ]);
  const width = page.viewportSize()?.width;
  throw new Error(`axe on ${where} at ${width} px:\n${lines.join('\n')}`);
}

/** The page's code has taken over, and nothing in it stands for something that is still being fetched. */
async function drawn(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const content = document.getElementById('content');
    const parts = [...(content?.querySelectorAll('*') ?? [])];
    const isTakenOver = parts.some((part) => Object.keys(part).some((name) => name.startsWith('__reactProps')));
    return isTakenOver && content?.querySelector('.stratum, .busy-mark') === null;
  });
}

/** Throws when the page can be scrolled sideways; a table in a box of its own may. What measures itself gets a moment to. */
export async function assertNoSidewaysScroll(page: Page, where: string): Promise<void> {
  const fits = (found: Overhang | null) => found === null;
  await until(`${where} fits into its window`, () => page.evaluate(overhang), fits, 5_000);
}

type Overhang = { scrollWidth: number; clientWidth: number; named: string[] };

/** Runs in the page: what sticks out of it, or null. */
function overhang(): Overhang | null {
  const { scrollWidth, clientWidth } = document.documentElement;
  if (scrollWidth <= clientWidth) return null;
  const isHeld = (element: Element | null): boolean =>
    element !== null &&
    element !== document.body &&
    (/auto|scroll|hidden|clip/.test(getComputedStyle(element).overflowX) || isHeld(element.parentElement));
  const wide = [...document.querySelectorAll('body *')].filter(
    (element) => element.getBoundingClientRect().right > clientWidth + 1 && !isHeld(element.parentElement),
  );
  return { scrollWidth, clientWidth, named: wide.slice(-3).map((element) => element.outerHTML.slice(0, 160)) };
}
