import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll } from 'vitest';
import { stack } from './browserStack';

const FLAGS = [
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
const STEP_MS = 20_000;
const SHOTS = 'tests/.out/shots';

export const WIDE = { width: 1280, height: 900 };
export const PHONE = { width: 390, height: 844 };

type Options = { viewport?: { width: number; height: number }; touch?: boolean; cookie?: string };

/** One browser profile with one page: a person at a device. */
export type Visitor = {
  page: Page;
  context: BrowserContext;
  /** Answers the test provokes on purpose; any other answer from 400 on fails it. */
  expectAnswers: (...statuses: number[]) => void;
  /** What the test makes the browser complain of on purpose; that it does not fails the test too. */
  expectComplaint: (words: RegExp) => void;
};

export type Browsing = { visitor: (options?: Options) => Promise<Visitor> };

type Open = { context: BrowserContext; complaints: string[]; provoked: RegExp[] };

/**
 * A browser for the tests of this file, a fresh profile for each visitor. An error on the console, a breach of the
 * content security policy, an uncaught exception or an unexpected refusal fails the test in whose time it happened.
 */
export function useBrowser(): Browsing {
  let browser: Browser | undefined;
  let open: Open[] = [];

  beforeAll(async () => {
    browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: FLAGS });
  });
  afterEach(async ({ task }) => {
    const mine = open;
    open = [];
    if (task.result?.state === 'fail') await takePictures(task.name, mine);
    await Promise.all(mine.map(({ context }) => context.close()));
    const complaints = mine.flatMap((one) => [
      ...one.complaints.filter((said) => !one.provoked.some((words) => words.test(said))),
      ...one.provoked
        .filter((words) => !one.complaints.some((said) => words.test(said)))
        .map((words) => `never: ${words}`),
    ]);
    if (complaints.length > 0) throw new Error(`The browser complained:\n${complaints.join('\n')}`);
  });
  afterAll(() => browser?.close());

  return {
    visitor: async ({ viewport = WIDE, touch = false, cookie } = {}) => {
      if (!browser) throw new Error('The browser runs only while the tests of this file run.');
      const context = await browser.newContext({
        viewport,
        hasTouch: touch,
        isMobile: touch,
        locale: 'en-US',
        timezoneId: 'America/New_York',
        reducedMotion: 'reduce',
      });
      context.setDefaultTimeout(STEP_MS);
      const expected = new Set<number>();
      const complaints: string[] = [];
      const provoked: RegExp[] = [];
      open.push({ context, complaints, provoked });
      await listen(context, complaints, expected);
      if (cookie) await takeCookie(context, cookie);
      const page = await context.newPage();
      return {
        page,
        context,
        expectAnswers: (...statuses) => {
          for (const status of statuses) expected.add(status);
        },
        expectComplaint: (words) => provoked.push(words),
      };
    },
  };
}

/** The session cookie is for secure origins, and loopback counts as one; the cookie store wants to be told so. */
async function takeCookie(context: BrowserContext, cookie: string): Promise<void> {
  const [name = '', value = ''] = cookie.split('=');
  const { hostname } = new URL(stack().origin);
  await context.addCookies([
    { name, value, url: `https://${hostname}`, secure: true, httpOnly: true, sameSite: 'Lax' },
  ]);
}

async function listen(context: BrowserContext, complaints: string[], expected: ReadonlySet<number>): Promise<void> {
  const { origin } = stack();
  await context.addInitScript(() => {
    document.addEventListener('securitypolicyviolation', (event) => {
      console.error(`Content policy: ${event.violatedDirective} refused ${event.blockedURI} ${event.sample}`);
    });
  });
  context.on('page', (page) => {
    // While somebody listens the browser asks the test for files; listening on and off could be too late for a press.
    page.on('filechooser', () => undefined);
    const at = () => (page.url().startsWith(origin) ? page.url().slice(origin.length) : page.url());
    page.on('pageerror', (error) => complaints.push(`${at()}: uncaught ${error.stack ?? error.message}`));
    page.on('console', (message) => {
      if (message.type() !== 'error') return;
      // Told by its answer below, with its address.
      if (message.text().startsWith('Failed to load resource')) return;
      complaints.push(`${at()}: ${message.text()}`);
    });
    page.on('response', (response) => {
      if (!response.url().startsWith(origin)) return;
      const status = response.status();
      if (status < 400 || expected.has(status)) return;
      complaints.push(`${at()}: ${response.request().method()} ${response.url()} answered ${status}`);
    });
  });
}

async function takePictures(name: string, open: readonly Open[]): Promise<void> {
  mkdirSync(SHOTS, { recursive: true });
  const pages = open.flatMap(({ context }) => context.pages());
  for (const [at, page] of pages.entries()) {
    const file = path.join(SHOTS, `${name.replace(/\W+/g, '-').slice(0, 80)}-${at}.png`);
    await page.screenshot({ path: file, fullPage: true }).catch(() => undefined);
  }
}
