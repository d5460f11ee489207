// @vitest-environment happy-dom
import { act, cleanup, renderHook, waitFor } from '@testing-library/react';
import type { ReactNode } from 'react';
import { SWRConfig } from 'swr';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { useApi } from './use-api';
import { useSubmit } from './use-submit';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const fresh = ({ children }: { children: ReactNode }) => (
  <SWRConfig value={{ provider: () => new Map() }}>{children}</SWRConfig>
);
const answer = (value: unknown, status = 200) => new Response(JSON.stringify(value), { status });

describe('useApi', () => {
  it('shows what the server rendered without asking again', () => {
    const ask = vi.fn();
    vi.stubGlobal('fetch', ask);
    const { result } = renderHook(() => useApi<number[]>('/plots', { fallback: [1, 2] }), { wrapper: fresh });
    expect(result.current.data).toEqual([1, 2]);
    expect(ask).not.toHaveBeenCalled();
  });

  it('asks again where an earlier visit left something older than what the server rendered', async () => {
    const ask = vi.fn().mockImplementation(() => Promise.resolve(answer([ask.mock.calls.length])));
    vi.stubGlobal('fetch', ask);
    const kept = new Map();
    const sameVisit = ({ children }: { children: ReactNode }) => (
      <SWRConfig value={{ provider: () => kept, dedupingInterval: 0 }}>{children}</SWRConfig>
    );
    const visit = () => renderHook(() => useApi<number[]>('/plots', { fallback: [0] }), { wrapper: sameVisit });
    const first = visit();
    expect(first.result.current.data).toEqual([0]);
    await act(() => first.result.current.reload());
    expect(first.result.current.data).toEqual([1]);
    first.unmount();
    const second = visit();
    await waitFor(() => expect(second.result.current.data).toEqual([2]));
  });

  it('keeps the last good answer beside a later problem', async () => {
    const ask = vi
      .fn()
      .mockResolvedValueOnce(answer([1]))
      .mockResolvedValueOnce(answer({ code: 'forbidden', detail: 'Your role does not allow this.' }, 403));
    vi.stubGlobal('fetch', ask);
    const { result } = renderHook(() => useApi<number[]>('/plots'), { wrapper: fresh });
    await waitFor(() => expect(result.current.data).toEqual([1]));
    await act(() => result.current.reload().catch(() => undefined));
    await waitFor(() => expect(result.current.problem?.code).toBe('forbidden'));
    expect(result.current.data).toEqual([1]);
  });

  it('asks nothing for a null path', () => {
    const ask = vi.fn();
    vi.stubGlobal('fetch', ask);
    const { result } = renderHook(() => useApi<number[]>(null), { wrapper: fresh });
    expect(result.current).toMatchObject({ data: undefined, loading: false });
    expect(ask).not.toHaveBeenCalled();
  });
});

describe('useSubmit', () => {
  it('joins a second press to the first instead of sending twice', async () => {
    let finish: (response: Response) => void = () => undefined;
    const ask = vi.fn(
      () =>
        new Promise<Response>((resolve) => {
          finish = resolve;
        }),
    );
    vi.stubGlobal('fetch', ask);
    const { result } = renderHook(() => useSubmit<{ id: number }>());
    let both: unknown[] = [];
    await act(async () => {
      const calls = Promise.all([
        result.current.send('/plots', { body: {} }),
        result.current.send('/plots', { body: {} }),
      ]);
      finish(answer({ id: 1 }, 201));
      both = await calls;
    });
    expect(ask).toHaveBeenCalledTimes(1);
    expect(both[0]).toBe(both[1]);
    expect(result.current.busy).toBe(false);
  });

  it('keeps the sentences by field until they are cleared', async () => {
    vi.stubGlobal(
      'fetch',
      vi.fn().mockResolvedValue(answer({ code: 'invalid', fields: { name: 'Give it a name.' } }, 422)),
    );
    const { result } = renderHook(() => useSubmit());
    await act(() => result.current.send('/plots', { body: {} }));
    expect(result.current.errors).toEqual({ name: 'Give it a name.' });
    act(() => result.current.clear());
    expect(result.current.errors).toEqual({});
  });
});
