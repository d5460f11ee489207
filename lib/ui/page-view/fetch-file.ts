import type { FetchedFile } from './types';

/** The bytes of a report's file; every way it can fail has a reason of its own. */
export async function fetchFile(url: string, signal: AbortSignal): Promise<FetchedFile> {
  try {
    const answer = await fetch(url, { signal, credentials: 'same-origin' });
    if (answer.ok) return { ok: true, bytes: new Uint8Array(await answer.arrayBuffer()) };
    if (answer.status === 401 || answer.status === 403) return { ok: false, reason: 'not-allowed' };
    if (answer.status === 404 || answer.status === 410) return { ok: false, reason: 'gone' };
    return { ok: false, reason: 'store-silent' };
  } catch {
    return { ok: false, reason: 'store-silent' };
  }
}
