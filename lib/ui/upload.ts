import { type ApiResult, apiPath, localProblem, toProblem } from './api';

export type UploadProgress = { sent: number; total: number };

export type UploadOptions = {
  body: FormData | Blob;
  headers?: Record<string, string>;
  onProgress?: (progress: UploadProgress) => void;
  signal?: AbortSignal;
  /** Gives up when nothing moved for this long; a slow line that moves is left alone. */
  stalledMs?: number;
};

const STALLED_MS = 30_000;

/** Sends a file and tells how many bytes have gone. `fetch` cannot say that yet, so this uses the older way. */
export function uploadApi<T>(path: string, options: UploadOptions): Promise<ApiResult<T>> {
  const { body, headers = {}, onProgress, signal, stalledMs = STALLED_MS } = options;
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    let timer: ReturnType<typeof setTimeout> | undefined;
    const finish = (result: ApiResult<T>) => {
      clearTimeout(timer);
      signal?.removeEventListener('abort', cancel);
      resolve(result);
    };
    const giveUp = (code: 'timed-out' | 'cancelled') => {
      finish({ ok: false, problem: localProblem(code, 'POST', stalledMs) });
      request.abort();
    };
    const cancel = () => giveUp('cancelled');
    const moving = () => {
      clearTimeout(timer);
      timer = setTimeout(() => giveUp('timed-out'), stalledMs);
    };

    request.open('POST', apiPath(path));
    request.setRequestHeader('accept', 'application/json, application/problem+json');
    for (const [name, value] of Object.entries(headers)) request.setRequestHeader(name, value);
    request.upload.onprogress = (event) => {
      moving();
      if (event.lengthComputable) onProgress?.({ sent: event.loaded, total: event.total });
    };
    request.onload = () => finish(toResult<T>(request));
    request.onerror = () => finish({ ok: false, problem: localProblem('unreachable', 'POST') });
    signal?.addEventListener('abort', cancel);
    if (signal?.aborted) return cancel();
    moving();
    request.send(body);
  });
}

function toResult<T>(request: XMLHttpRequest): ApiResult<T> {
  const good = request.status >= 200 && request.status < 300;
  let value: unknown;
  try {
    value = request.responseText === '' ? undefined : JSON.parse(request.responseText);
  } catch {
    if (good) return { ok: false, problem: localProblem('unreadable-answer', 'POST') };
  }
  // The routes' answers are typed by the schemas they share with this caller.
  return good
    ? { ok: true, status: request.status, data: value as T }
    : { ok: false, problem: toProblem(value, request.status) };
}
