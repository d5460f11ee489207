// @vitest-environment happy-dom
import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { type UploadProgress, uploadApi } from './upload';

const reports = '*/api/v1/reports';
const server = setupServer();
beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterEach(() => server.resetHandlers());
afterAll(() => server.close());

const file = () => new Blob(['x'.repeat(5_000)], { type: 'application/pdf' });

describe('uploadApi', () => {
  it('sends every byte, tells how far it is, and answers with the data', async () => {
    server.use(
      http.post(reports, async ({ request }) => {
        const size = (await request.arrayBuffer()).byteLength;
        return HttpResponse.json({ size }, { status: 201 });
      }),
    );
    const told: UploadProgress[] = [];
    const result = await uploadApi('/reports', { body: file(), onProgress: (progress) => told.push(progress) });
    expect(result).toEqual({ ok: true, status: 201, data: { size: 5_000 } });
    expect(told.at(-1)).toEqual({ sent: 5_000, total: 5_000 });
  });

  it('hands on a refusal', async () => {
    server.use(
      http.post(reports, () => HttpResponse.json({ code: 'too-large', detail: 'Larger than 20 MB.' }, { status: 413 })),
    );
    expect(await uploadApi('/reports', { body: file() })).toMatchObject({
      ok: false,
      problem: { status: 413, code: 'too-large', detail: 'Larger than 20 MB.' },
    });
  });

  it('says when the network is gone', async () => {
    server.use(http.post(reports, () => HttpResponse.error()));
    expect(await uploadApi('/reports', { body: file() })).toMatchObject({
      ok: false,
      problem: { code: 'unreachable' },
    });
  });

  it('gives up when nothing moves', async () => {
    server.use(http.post(reports, () => new Promise<never>(() => undefined)));
    expect(await uploadApi('/reports', { body: file(), stalledMs: 80 })).toMatchObject({
      ok: false,
      problem: { code: 'timed-out' },
    });
  });

  it('stops when the caller no longer wants it', async () => {
    const want = new AbortController();
    server.use(
      http.post(reports, () => {
        want.abort();
        return new Promise<never>(() => undefined);
      }),
    );
    expect(await uploadApi('/reports', { body: file(), signal: want.signal })).toMatchObject({
      ok: false,
      problem: { code: 'cancelled' },
    });
  });
});
