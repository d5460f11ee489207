// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { useSyncExternalStore } from 'react';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { Report } from '@/lib/schemas/reports';
import { AnnounceProvider } from '../feedback/announce';
import { UploadList } from './upload-list';
import { REAL_WORLD, UploadStore } from './upload-store';

const UPLOADS = '*/api/v1/sites/s1/uploads';
const server = setupServer();
beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterEach(() => {
  cleanup();
  server.resetHandlers();
});
afterAll(() => server.close());

const REPORT: Report = {
  id: 'r1',
  origin: 'file',
  state: 'in-review',
  fileName: 'spring.pdf',
  contentType: 'application/pdf',
  bytes: 10,
  pages: 3,
  pagesRead: 3,
  revision: 1,
  refusal: null,
  warnings: [],
  laboratory: null,
  laboratoryPrinted: null,
  droppedOnPlotId: null,
  uploadedBy: { id: 'p', name: 'Ada' },
  uploadedAt: '2026-05-03T10:00:00.000Z',
  confirmedBy: null,
  confirmedAt: null,
  withdrawnReason: null,
  samples: { all: 3, assigned: 0, plotIds: [] },
  version: 1,
  waitingLong: false,
};

let pauses: number[];
let store: UploadStore;
beforeEach(() => {
  pauses = [];
  // Real requests; only the waiting between them is cut short.
  const pause = async (ms: number) => {
    pauses.push(ms);
    // A turn of the clock, not of the promises: asking over and over must leave room for everything else.
    await new Promise((resolve) => setTimeout(resolve, 5));
  };
  store = new UploadStore('s1', { ...REAL_WORLD, pause });
});

function Shown() {
  const items = useSyncExternalStore(store.subscribe, store.snapshot);
  return <UploadList items={items} store={store} reportHref={(id) => `/reports/${id}`} mayType="/reports/new" />;
}
const show = () =>
  render(
    <AnnounceProvider>
      <Shown />
    </AnnounceProvider>,
  );
const pdf = (name = 'spring.pdf', size = 10) => new File(['x'.repeat(size)], name, { type: 'application/pdf' });
const toPlot = { plotId: 'north', plotName: 'North bed' };
const toSite = { plotId: null, plotName: null };

const received = (reportId = 'r1') =>
  HttpResponse.json({ kind: 'received', reportId, fileName: 'spring.pdf', bytes: 10 }, { status: 201 });
const states = (...list: Partial<Report>[]) => {
  let at = 0;
  server.use(
    http.get('*/api/v1/sites/s1/reports/:id', ({ params }) => {
      const change = list[Math.min(at++, list.length - 1)];
      return HttpResponse.json({ ...REPORT, id: String(params.id), ...change });
    }),
  );
};

describe('UploadList', () => {
  it('goes from bytes over pages to the review, and says so to who cannot see it', async () => {
    let open: () => void = () => undefined;
    const gate = new Promise<void>((resolve) => {
      open = resolve;
    });
    const forms: string[] = [];
    server.use(
      http.post(UPLOADS, async ({ request }) => {
        forms.push(await request.text());
        await gate;
        return received();
      }),
    );
    let answer: Partial<Report> = { state: 'reading', pages: 3, pagesRead: 1 };
    server.use(http.get('*/api/v1/sites/s1/reports/r1', () => HttpResponse.json({ ...REPORT, ...answer })));
    show();
    store.add([pdf()], toPlot);
    const bar = await screen.findByRole('progressbar', { name: 'spring.pdf' });
    expect(bar.getAttribute('aria-valuetext')).toMatch(/sent/);
    expect(screen.getByText(/To North bed/)).toBeTruthy();
    await waitFor(() => expect(forms).toHaveLength(1));
    expect(forms[0]).toContain('north');
    open();
    await waitFor(() =>
      expect(screen.getByRole('progressbar').getAttribute('aria-valuetext')).toBe('reading page 2 of 3'),
    );
    answer = { state: 'in-review' };
    const link = await screen.findByRole('link', { name: 'Review 3 samples' });
    expect(link.getAttribute('href')).toBe('/reports/r1');
    expect(screen.queryByRole('progressbar')).toBeNull();
    await waitFor(() => expect(screen.getByTestId('announce-polite').textContent).toContain('3 samples to review'));
  });

  it('shows a refusal’s own sentence without the name twice, and does not try that again', async () => {
    const calls = vi.fn();
    server.use(
      http.post(UPLOADS, () => {
        calls();
        return HttpResponse.json(
          { code: 'wrong-type', title: 'Odd', detail: 'page.pdf: This is not a PDF. Nothing was kept.' },
          { status: 415 },
        );
      }),
    );
    show();
    store.add([pdf('page.pdf')], toSite);
    expect(await screen.findByText('This is not a PDF. Nothing was kept.')).toBeTruthy();
    expect(screen.queryByRole('button', { name: /again/ })).toBeNull();
    expect(screen.getByRole('link', { name: 'Type the report in' }).getAttribute('href')).toBe('/reports/new');
    expect(calls).toHaveBeenCalledTimes(1);
  });

  it('shows what the reader could not read', async () => {
    server.use(http.post(UPLOADS, () => received()));
    states({ state: 'unreadable', refusal: { code: 'scan', sentence: 'Only pictures of pages.' } });
    show();
    store.add([pdf()], toSite);
    expect(await screen.findByText('Only pictures of pages.')).toBeTruthy();
    expect(screen.getByText('could not be read')).toBeTruthy();
  });

  it('tries three times with longer pauses when the network fails, then hands over', async () => {
    let calls = 0;
    server.use(
      http.post(UPLOADS, () => {
        calls += 1;
        return calls <= 3 ? HttpResponse.error() : received();
      }),
    );
    states({});
    show();
    store.add([pdf()], toSite);
    const again = await screen.findByRole('button', { name: /Send spring.pdf again/ });
    expect(calls).toBe(3);
    expect(pauses).toEqual([800, 2400]);
    await userEvent.click(again);
    expect(await screen.findByRole('link', { name: 'Review 3 samples' })).toBeTruthy();
    expect(calls).toBe(4);
  });

  it('knows its own file again when only the answer was lost', async () => {
    let calls = 0;
    server.use(
      http.post(UPLOADS, () => {
        calls += 1;
        return calls === 1
          ? HttpResponse.error()
          : HttpResponse.json({
              kind: 'seen-before',
              reportId: 'r1',
              fileName: 'spring.pdf',
              uploadedAt: new Date().toISOString(),
              state: 'received',
            });
      }),
    );
    states({});
    show();
    store.add([pdf()], toSite);
    expect(await screen.findByRole('link', { name: 'Review 3 samples' })).toBeTruthy();
  });

  it('offers the report of a file seen before, and a new revision only once however often it is pressed', async () => {
    const sent: boolean[] = [];
    server.use(
      http.post(UPLOADS, async ({ request }) => {
        sent.push((await request.text()).includes('asRevision'));
        return sent.length === 1
          ? HttpResponse.json({
              kind: 'seen-before',
              reportId: 'r0',
              fileName: 'spring.pdf',
              uploadedAt: '2026-05-03T10:00:00.000Z',
              state: 'confirmed',
            })
          : received('r2');
      }),
    );
    states({});
    show();
    store.add([pdf()], toSite);
    expect(await screen.findByText(/sent on 3 May 2026/)).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Open that report' }).getAttribute('href')).toBe('/reports/r0');
    await userEvent.dblClick(screen.getByRole('button', { name: 'Send as a new revision' }));
    expect((await screen.findByRole('link', { name: 'Review 3 samples' })).getAttribute('href')).toBe('/reports/r2');
    expect(sent).toEqual([false, true]);
  });

  it('never sends a revision twice by itself', async () => {
    let calls = 0;
    server.use(
      http.post(UPLOADS, () => {
        calls += 1;
        if (calls > 1) return HttpResponse.error();
        const uploadedAt = '2026-05-03T10:00:00.000Z';
        return HttpResponse.json({
          kind: 'seen-before',
          reportId: 'r0',
          fileName: 'a.pdf',
          uploadedAt,
          state: 'confirmed',
        });
      }),
    );
    show();
    store.add([pdf()], toSite);
    await userEvent.click(await screen.findByRole('button', { name: 'Send as a new revision' }));
    expect(await screen.findByText(/^The connection broke/)).toBeTruthy();
    expect(calls).toBe(2);
  });

  it('stops a file on the way and lets the next one go', async () => {
    const names: string[] = [];
    server.use(
      http.post(UPLOADS, async ({ request }) => {
        const text = await request.text();
        const name = /filename="([^"]+)"/.exec(text)?.[1] ?? '';
        names.push(name);
        return name === 'fourth.pdf' ? received() : new Promise<never>(() => undefined);
      }),
    );
    states({});
    show();
    store.add([pdf('first.pdf'), pdf('second.pdf')], toSite);
    store.add([pdf('third.pdf'), pdf('fourth.pdf')], toSite);
    await waitFor(() => expect(names).toHaveLength(3));
    await userEvent.click(screen.getByRole('button', { name: 'Stop sending first.pdf' }));
    expect(await screen.findByRole('link', { name: 'Review 3 samples' })).toBeTruthy();
    expect(names).toEqual(['first.pdf', 'second.pdf', 'third.pdf', 'fourth.pdf']);
    expect(screen.getByText('Stopped')).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Take first.pdf off this list' }));
    expect(screen.queryByText('first.pdf')).toBeNull();
  });

  it('sends nothing of an empty or oversized file, and the others all the same', async () => {
    const calls = vi.fn();
    server.use(
      http.post(UPLOADS, () => {
        calls();
        return received();
      }),
    );
    states({});
    show();
    const huge = pdf('huge.pdf');
    Object.defineProperty(huge, 'size', { value: 21 * 1024 * 1024 });
    store.add([pdf('empty.pdf', 0), huge, pdf()], toSite);
    expect(await screen.findByRole('link', { name: 'Review 3 samples' })).toBeTruthy();
    expect(screen.getByText(/This file is empty/)).toBeTruthy();
    expect(screen.getByText(/at most 20 MB/)).toBeTruthy();
    expect(calls).toHaveBeenCalledTimes(1);
  });

  describe('many at once', () => {
    const many = (count: number) => Array.from({ length: count }, (_, at) => pdf(`old-${at + 1}.pdf`));
    const announced = (fileIds: string[]) =>
      http.post('*/api/v1/sites/s1/batches', async () =>
        HttpResponse.json({ batchId: 'b1', mailWanted: false, fileIds }, { status: 201 }),
      );

    it('are announced first, three go at a time, and the refused are told to the batch', async () => {
      let [under, most] = [0, 0];
      const spots: string[] = [];
      const told: unknown[] = [];
      server.use(
        announced(['f1', 'f2', 'f3', 'f4', 'f5']),
        http.post(UPLOADS, async ({ request }) => {
          under += 1;
          most = Math.max(most, under);
          const text = await request.text();
          const spot = /name="batchFileId"\r\n\r\n(\w+)/.exec(text)?.[1] ?? '';
          spots.push(spot);
          await new Promise((resolve) => setTimeout(resolve, 10));
          under -= 1;
          if (spot !== 'f2') return received(`r-${spot}`);
          return HttpResponse.json({ title: 'Not taken', detail: 'It is a web page.', status: 415 }, { status: 415 });
        }),
        http.post('*/api/v1/sites/s1/batches/b1/files/:id/refuse', async ({ request, params }) => {
          told.push([params.id, await request.json()]);
          return HttpResponse.json({ fileId: 'f2', state: 'refused' });
        }),
      );
      show();
      expect(await store.add(many(5), toSite)).toBe('b1');
      await waitFor(() => expect(store.snapshot()).toEqual([]));
      expect(spots.sort()).toEqual(['f1', 'f2', 'f3', 'f4', 'f5']);
      expect(most).toBe(3);
      expect(told).toEqual([['f2', { sentence: 'It is a web page.' }]]);
      expect(store.batches()).toEqual(['b1']);
    });

    it('are sent one by one when no batch can be made', async () => {
      server.use(
        http.post('*/api/v1/sites/s1/batches', () =>
          HttpResponse.json({ title: 'No', detail: 'No.' }, { status: 500 }),
        ),
        http.post(UPLOADS, () => received()),
      );
      states({});
      show();
      expect(await store.add(many(4), toSite)).toBeNull();
      await waitFor(() => expect(screen.getAllByRole('link', { name: 'Review 3 samples' })).toHaveLength(4));
    });

    it('send again only what the batch still waits for', async () => {
      const spots: string[] = [];
      server.use(
        http.post(UPLOADS, async ({ request }) => {
          spots.push(/name="batchFileId"\r\n\r\n(\w+)/.exec(await request.text())?.[1] ?? '');
          return received();
        }),
      );
      const waiting = [{ id: 'f7', fileName: 'old-1.pdf', bytes: 10 }];
      const others = store.resume('b1', waiting, [...many(2), pdf('old-1.pdf', 11)]);
      expect(others.map((file) => [file.name, file.size])).toEqual([
        ['old-2.pdf', 10],
        ['old-1.pdf', 11],
      ]);
      await waitFor(() => expect(store.snapshot()).toEqual([]));
      expect(spots).toEqual(['f7']);
    });
  });
});
