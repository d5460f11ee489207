import { HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { apiPath, callApi } from './api';

const origin = 'http://loamline.test';
const at = (path: string) => `${origin}/api/v1${path}`;
const server = setupServer();

beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterAll(() => server.close());
beforeEach(() => {
  // In a browser a path alone is enough; Node wants a whole address.
  const through = globalThis.fetch;
  vi.stubGlobal('fetch', (input: string, init?: RequestInit) => through(`${origin}${input}`, init));
});
afterEach(() => {
  vi.unstubAllGlobals();
  server.resetHandlers();
});

describe('callApi', () => {
  it('puts the version in front of a path once', () => {
    expect(apiPath('/sites')).toBe('/api/v1/sites');
    expect(apiPath('sites')).toBe('/api/v1/sites');
    expect(apiPath('/api/v1/sites')).toBe('/api/v1/sites');
  });

  it('sends JSON and answers with the data', async () => {
    let seen: unknown;
    server.use(
      http.post(at('/plots'), async ({ request }) => {
        seen = { type: request.headers.get('content-type'), body: await request.json() };
        return HttpResponse.json({ id: 7 }, { status: 201 });
      }),
    );
    const result = await callApi<{ id: number }>('/plots', { method: 'POST', body: { name: 'North bed' } });
    expect(result).toEqual({ ok: true, status: 201, data: { id: 7 } });
    expect(seen).toEqual({ type: 'application/json', body: { name: 'North bed' } });
  });

  it('answers an empty success with no data', async () => {
    server.use(http.delete(at('/plots/7'), () => new HttpResponse(null, { status: 204 })));
    expect(await callApi('/plots/7', { method: 'DELETE' })).toEqual({ ok: true, status: 204, data: undefined });
  });

  it('hands on a problem with its sentences by field', async () => {
    const problem = {
      type: 'urn:loamline:problem:invalid',
      title: 'Something in this request needs a change',
      status: 422,
      code: 'invalid',
      detail: 'Two fields need another look.',
      fields: { name: 'Give the plot a name.', area: ['The area must be above 0.', 'second'] },
    };
    server.use(http.post(at('/plots'), () => HttpResponse.json(problem, { status: 422 })));
    const result = await callApi('/plots', { method: 'POST', body: {} });
    expect(result).toEqual({
      ok: false,
      problem: { ...problem, fields: { name: 'Give the plot a name.', area: 'The area must be above 0.' } },
    });
  });

  it('keeps what stands there now when somebody was faster', async () => {
    server.use(
      http.patch(at('/rows/1'), () =>
        HttpResponse.json(
          { code: 'conflict', detail: 'Changed by another.', reason: 'stale-version', current: { value: '6.3' } },
          { status: 409 },
        ),
      ),
    );
    const result = await callApi('/rows/1', { method: 'PATCH', body: { value: '6.4' } });
    expect(result).toMatchObject({
      ok: false,
      problem: { status: 409, code: 'conflict', reason: 'stale-version', current: { value: '6.3' } },
    });
  });

  it('makes a problem of a failed answer that is no JSON', async () => {
    server.use(http.post(at('/plots'), () => new HttpResponse('<html>', { status: 500 })));
    const result = await callApi('/plots', { method: 'POST', body: {} });
    expect(result).toMatchObject({ ok: false, problem: { status: 500, code: 'internal' } });
  });

  it('does not take a page for data', async () => {
    server.use(http.get(at('/plots'), () => new HttpResponse('<html>')));
    expect(await callApi('/plots')).toMatchObject({ ok: false, problem: { code: 'unreadable-answer' } });
  });

  it('reads again when a read meets a passing failure', async () => {
    let asked = 0;
    server.use(
      http.get(at('/plots'), () => {
        asked += 1;
        return asked < 3 ? new HttpResponse(null, { status: 503 }) : HttpResponse.json([1]);
      }),
    );
    expect(await callApi('/plots')).toEqual({ ok: true, status: 200, data: [1] });
    expect(asked).toBe(3);
  });

  it('never writes twice by itself', async () => {
    let asked = 0;
    server.use(
      http.post(at('/plots'), () => {
        asked += 1;
        return HttpResponse.error();
      }),
    );
    const result = await callApi('/plots', { method: 'POST', body: {} });
    expect(result).toMatchObject({ ok: false, problem: { code: 'unreachable', status: 0 } });
    expect(asked).toBe(1);
  });

  it('stops waiting and says that a write may have been saved', async () => {
    server.use(http.post(at('/plots'), () => new Promise<never>(() => undefined)));
    const result = await callApi('/plots', { method: 'POST', body: {}, timeoutMs: 30 });
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.problem.code).toBe('timed-out');
    expect(result.problem.detail).toContain('may or may not have been saved');
  });

  it('stops when the caller no longer wants it', async () => {
    server.use(http.get(at('/plots'), () => new Promise<never>(() => undefined)));
    const want = new AbortController();
    const pending = callApi('/plots', { signal: want.signal });
    want.abort();
    expect(await pending).toMatchObject({ ok: false, problem: { code: 'cancelled' } });
  });
});
