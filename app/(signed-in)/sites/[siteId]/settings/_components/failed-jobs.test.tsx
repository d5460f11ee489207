// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, afterEach, beforeAll, expect, it } from 'vitest';
import type { FailedJob } from '@/lib/schemas/failedJobs';
import { AnnounceProvider } from '@/lib/ui/feedback/announce';
import { FailedJobs } from './failed-jobs';

const server = setupServer();
beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterEach(() => {
  cleanup();
  server.resetHandlers();
});
afterAll(() => server.close());

const JOB: FailedJob = {
  id: 'j1',
  job: 'read-report',
  subject: { kind: 'report', id: 'r1', name: 'spring.pdf' },
  sentence: 'The reader stopped on this file three times.',
  gaveUpAt: '2026-12-01T10:00:00.000Z',
  notAgain: null,
  replayed: null,
};
/** A site of its own each: what one left in the cache would be shown in the other. */
const show = (job: FailedJob, siteId = 's1') =>
  render(
    <AnnounceProvider>
      <FailedJobs siteId={siteId} first={{ failedJobs: [job] }} timeZone="UTC" />
    </AnnounceProvider>,
  );

it('has a task done again once, however often the button is pressed, and then lists it no more', async () => {
  let asked = 0;
  server.use(
    http.post('*/api/v1/sites/s1/failed-jobs/j1/replay', () => {
      asked += 1;
      return HttpResponse.json({ id: 'j1', job: 'read-report', replayedAt: '2026-12-01T11:00:00.000Z' });
    }),
    http.get('*/api/v1/sites/s1/failed-jobs', () =>
      HttpResponse.json({
        failedJobs: [{ ...JOB, replayed: { at: '2026-12-01T11:00:00.000Z', by: 'Ada' } }],
      }),
    ),
  );
  show(JOB);
  expect(screen.getByText('The reader stopped on this file three times.')).toBeTruthy();
  await userEvent.dblClick(screen.getByRole('button', { name: /^Do it again.*spring.pdf$/ }));
  await waitFor(() => expect(screen.getByText('Nothing was given up.')).toBeTruthy());
  expect(asked).toBe(1);
  await userEvent.click(screen.getByRole('button', { name: 'Also the 1 that were done again' }));
  expect(screen.getByText(/Done again, asked by Ada/)).toBeTruthy();
});

it('says why a task cannot be done again instead of offering it', () => {
  show({ ...JOB, id: 'j2', notAgain: 'The report has moved on since.' }, 's2');
  expect(screen.getByText('The report has moved on since.')).toBeTruthy();
  expect(screen.queryByRole('button', { name: /Do it again/ })).toBeNull();
});
