import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { SWRConfig } from 'swr';
import { afterAll, afterEach, beforeAll, beforeEach, vi } from 'vitest';
import { ReportScreen } from '@/app/(signed-in)/sites/[siteId]/reports/[reportId]/_components/report-screen';
import type { Role } from '@/lib/access/table';
import type { Review } from '@/lib/schemas/review';
import { AnnounceProvider } from '@/lib/ui/feedback/announce';
import { makeReview } from './review-rows';

const origin = 'http://loamline.test';
export const REPORT_PATH = '/sites/site-1/reports/report-1';
export const api = (path = '') => `${origin}/api/v1${REPORT_PATH}${path}`;

/** A server that answers for one report; `held` is what its review says now. */
export function reviewServer() {
  const server = setupServer();
  const held = { review: makeReview(), sent: [] as { method: string; path: string; body: unknown }[] };
  beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
  afterAll(() => server.close());
  beforeEach(() => {
    held.review = makeReview();
    held.sent = [];
    const through = globalThis.fetch;
    // In a browser a path alone is enough; Node wants a whole address.
    vi.stubGlobal('fetch', (input: string, init?: RequestInit) => through(`${origin}${input}`, init));
    vi.stubGlobal('matchMedia', () => ({ matches: false, addEventListener: () => {}, removeEventListener: () => {} }));
    server.use(
      http.get(api(), () => HttpResponse.json(held.review.report)),
      http.get(api('/review'), () => HttpResponse.json(held.review)),
    );
  });
  afterEach(() => {
    cleanup();
    vi.unstubAllGlobals();
    server.resetHandlers();
  });
  /** Answers one write and keeps what was sent. */
  const answer = (method: 'post' | 'patch' | 'put', path: string, status: number, body: () => object) =>
    server.use(
      http[method](api(path), async ({ request }) => {
        held.sent.push({ method, path, body: await request.json() });
        return HttpResponse.json({ ...body() }, { status });
      }),
    );
  return { held, answer };
}

export function showReport(review: Review, role: Role = 'owner') {
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <AnnounceProvider>
        <ReportScreen
          siteId="site-1"
          role={role}
          personId="person-2"
          units="us"
          today="2026-12-01"
          firstReport={review.report}
          firstReview={review}
        />
      </AnnounceProvider>
    </SWRConfig>,
  );
  return userEvent.setup();
}

export const gridCell = (name: RegExp | string) => screen.getByRole('gridcell', { name });
