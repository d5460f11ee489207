import { randomUUID } from 'node:crypto';
import { readdirSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/lib/data/database';
import { PHONE, useBrowser, WIDE } from '../support/browser';
import { assertAccessible, assertNoSidewaysScroll } from '../support/browserAxe';
import { type Ground, makeGround, makeTokens } from '../support/browserGround';
import { go, heading } from '../support/browserPeople';
import { stack } from '../support/browserStack';

const NARROWEST = { width: 320, height: 640 };

/** Every page below a folder of app, as its address with the parts still in brackets. */
function pagesOf(folder: string): string[] {
  const files = readdirSync(`app/${folder}`, { recursive: true, encoding: 'utf8' });
  return files
    .filter((file) => file === 'page.tsx' || file.endsWith('/page.tsx'))
    .map((file) => `/${file.replace(/\/?page\.tsx$/, '')}`)
    .sort();
}

/** The address with every part filled in. A page with a part nobody has told these tests about is not passed over. */
function filled(route: string, parts: Readonly<Record<string, string>>): string {
  return route.replaceAll(/\[([^\]]+)\]/g, (_, part: string) => {
    const value = parts[part];
    if (value === undefined)
      throw new Error(`${route} has a part called ${part}; say in tests/support/browserGround.ts what stands for it.`);
    return value;
  });
}

async function assertFits(page: Page, place: string): Promise<void> {
  await assertAccessible(page, place);
  await page.setViewportSize(PHONE);
  await assertAccessible(page, place);
  await page.setViewportSize(NARROWEST);
  await assertNoSidewaysScroll(page, place);
}

const signedIn = pagesOf('(signed-in)');
const siteRoutes = signedIn.filter((route) => route.includes('[siteId]'));
const publicRoutes = pagesOf('(public)');

describe('Every page', () => {
  const { visitor } = useBrowser();
  let mine: Ground;
  let theirs: Ground;
  let tokens: Record<string, string>;

  beforeAll(async () => {
    [mine, theirs] = [await makeGround('Mill Lane'), await makeGround('Brook End')];
    tokens = await makeTokens(mine);
  }, 120_000);
  afterAll(closeDatabase);

  test('is found on disk', () => {
    expect(siteRoutes.length).toBeGreaterThan(10);
    expect(publicRoutes.length).toBeGreaterThan(5);
    expect(() => filled('/sites/[siteId]/[unheardOf]', mine.parts)).toThrow(/a part called unheardOf/);
  });

  test.each(signedIn)('%s opens for an owner at every width', async (route) => {
    const { page } = await visitor({ cookie: mine.cookies.owner, viewport: WIDE });
    const place = filled(route, mine.parts);
    await go(page, place);
    expect(new URL(page.url()).pathname).toBe(place);
    expect(await heading(page, 'Nothing here').count()).toBe(0);
    await assertFits(page, route);
  });

  test.each(['/', ...publicRoutes])('%s opens for a visitor at every width', async (route) => {
    const { page } = await visitor({ viewport: WIDE });
    await go(page, filled(route, { token: tokens[route.split('/')[1] ?? ''] ?? '' }));
    await assertFits(page, route);
  });

  test('lets no script and no handler run that somebody brought into its text', async () => {
    const { page, expectComplaint } = await visitor({ cookie: mine.cookies.owner });
    expectComplaint(/script-src-elem refused inline|Executing inline script violates/);
    expectComplaint(/script-src-attr refused inline|Executing inline event handler violates/);
    const brought =
      '<script>document.body.dataset.ran = "script"</script><img src="data:image/png,0" onerror="document.body.dataset.ran = this">';
    await page.route(`**/sites/${mine.site.id}`, async (request) => {
      const answer = await request.fetch();
      await request.fulfill({ response: answer, body: (await answer.text()).replace('</body>', `${brought}</body>`) });
    });
    await go(page, `/sites/${mine.site.id}`);
    await heading(page, 'Mill Lane').waitFor();
    expect(await page.locator('img[onerror]').count()).toBe(1);
    expect(await page.evaluate(() => document.body.dataset.ran ?? 'nothing')).toBe('nothing');
  });

  test('of a site looks to another site’s owner as if nothing were there, and so does a mixed address', async () => {
    const { page, expectAnswers } = await visitor({ cookie: theirs.cookies.owner });
    expectAnswers(404);
    const looks = async (place: string) => {
      const answer = await go(page, place);
      await heading(page, 'Nothing here').waitFor();
      return { status: answer?.status(), text: await page.locator('#content').textContent() };
    };
    const nowhere = await looks(`/sites/${randomUUID()}`);
    for (const route of siteRoutes) {
      expect(await looks(filled(route, mine.parts)), route).toEqual(nowhere);
      // Their own site in front, then ids of another: like ids that nobody has.
      if (!/\[(?!siteId)/.test(route)) continue;
      const siteId = theirs.site.id;
      const missing = {
        siteId,
        plotId: randomUUID(),
        reportId: randomUUID(),
        targetKey: randomUUID(),
        batchId: randomUUID(),
      };
      const notTheirs = await looks(filled(route, { ...mine.parts, siteId }));
      expect(notTheirs, `own site, then their ${route}`).toEqual(await looks(filled(route, missing)));
    }
  });

  test('behind the sign-in sends a visitor to it, and afterwards back', async () => {
    const { page } = await visitor();
    for (const route of signedIn) {
      const place = filled(route, mine.parts);
      await go(page, place);
      await heading(page, 'Sign in').waitFor();
      const { pathname, searchParams } = new URL(page.url());
      expect(pathname, route).toBe('/sign-in');
      expect(searchParams.get('next'), route).toBe(place);
    }
    expect(page.url()).toContain(stack().origin);
  });
});
