import { type ChildProcess, fork } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { bundleProgram } from '@/lib/services/program/bundle';
import { type RefusalCode, refusal } from '@/lib/services/reading/refusals';
import { maxBytesOf, sniffReport } from '@/lib/services/reading/sniff';
import { confinedArguments } from './confine';
import {
  LONGEST_TIME_MS,
  MEMORY_CHECK_MS,
  MEMORY_LIMIT_BYTES,
  SCAN_TIME_MS,
  START_LIMIT_MS,
  TIME_LIMIT_MS,
} from './limits';
import { type FromChild, isDataKind, isFromChild, type SheetRows, type ToChild } from './messages';

/** Beside the worker's bundle lies the child's; in development it is bundled from the file beside this one. */
const BUNDLED = ['./readFileChild.mjs', './readFileChild.js'];

async function childProgram(): Promise<string> {
  const beside = (name: string) => fileURLToPath(new URL(name, import.meta.url));
  const bundled = BUNDLED.map(beside).find((path) => existsSync(path));
  if (bundled !== undefined) return bundled;
  if (existsSync(beside('./child.ts'))) return bundleProgram(beside('./child.ts'));
  throw new Error('The reading process is missing beside the worker.');
}

/** Resident memory of a process where the system tells it (Linux); 0 elsewhere, where the heap limit alone holds. */
function residentBytes(pid: number): number {
  try {
    const pages = readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1];
    return Number(pages ?? 0) * 4096;
  } catch {
    return 0;
  }
}

/** How a process ends that its own limit of memory stops. */
const OUT_OF_MEMORY: ReadonlySet<string> = new Set(['SIGABRT', 'SIGTRAP', 'SIGILL']);

type RunInput = {
  message: ToChild;
  timeLimitMs: number;
  memoryLimitBytes: number;
  signal?: AbortSignal | undefined;
  onPage?: ((page: number, of: number) => void) | undefined;
};

type Final = Extract<FromChild, { type: 'done' | 'rows' }>;

async function run(input: RunInput): Promise<Final> {
  const path = await childProgram();
  const refuse = (code: RefusalCode): Final => {
    const error = refusal(code);
    if (input.message.rowsOnly) return { type: 'rows', rows: { ok: false, error } };
    return { type: 'done', reading: refusedReading({ file: input.message.fileName, pages: 0, error }) };
  };
  return new Promise((resolve, reject) => {
    // No environment: the process that opens strangers' files holds no secret.
    const child: ChildProcess = fork(path, [], {
      execArgv: confinedArguments(),
      // Its working folder is none that it could fill.
      cwd: '/',
      env: { NODE_ENV: 'production' },
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    let killedFor: RefusalCode | null = null;
    let final: Final | null = null;
    const kill = (code: RefusalCode) => {
      killedFor ??= code;
      child.kill('SIGKILL');
    };
    const onAbort = () => child.kill('SIGKILL');
    const forked = Date.now();
    let began = forked;
    let clock = setTimeout(() => kill('too-slow'), START_LIMIT_MS);
    const watch = setInterval(() => {
      if (child.pid !== undefined && residentBytes(child.pid) > input.memoryLimitBytes) kill('too-much-memory');
    }, MEMORY_CHECK_MS);
    input.signal?.addEventListener('abort', onAbort, { once: true });
    child.on('message', (message: unknown) => {
      if (!isFromChild(message)) return;
      if (message.type === 'ready') {
        clearTimeout(clock);
        began = Date.now();
        clock = setTimeout(() => kill('too-slow'), input.timeLimitMs);
        child.send(input.message);
      } else if (message.type === 'scans') {
        const whole = began + input.timeLimitMs + message.pages * SCAN_TIME_MS;
        clearTimeout(clock);
        clock = setTimeout(() => kill('too-slow'), Math.min(whole, forked + LONGEST_TIME_MS) - Date.now());
      } else if (message.type === 'page') input.onPage?.(message.page, message.of);
      else final = message;
    });
    const end = (failed: RefusalCode | Error) => {
      clearTimeout(clock);
      clearInterval(watch);
      input.signal?.removeEventListener('abort', onAbort);
      if (input.signal?.aborted) reject(new DOMException('Reading was stopped.', 'AbortError'));
      else if (final !== null) resolve(final);
      else if (failed instanceof Error) reject(failed);
      else resolve(refuse(killedFor ?? failed));
    };
    child.on('error', (error) => {
      // A machine too full for one more process says nothing about the file: the job is tried again.
      if (child.pid === undefined) end(error);
    });
    child.on('close', (_code, signal) =>
      end(signal !== null && OUT_OF_MEMORY.has(signal) ? 'too-much-memory' : 'crashed'),
    );
    if (input.signal?.aborted) onAbort();
  });
}

/**
 * Reads one file in a process of its own, killed past the limits of time and memory. Every content ends in a Reading,
 * a refusal included; only an aborted signal rejects.
 */
export async function readFile(input: {
  bytes: Uint8Array;
  fileName: string;
  signal?: AbortSignal | undefined;
  onPage?: ((page: number, of: number) => void) | undefined;
  timeLimitMs?: number;
  memoryLimitBytes?: number;
}): Promise<Reading> {
  const refuse = (code: RefusalCode) => refusedReading({ file: input.fileName, pages: 0, error: refusal(code) });
  const sniffed = sniffReport({ bytes: input.bytes, fileName: input.fileName });
  if (!sniffed.ok) return refuse(sniffed.code);
  if (input.bytes.length > maxBytesOf(sniffed.kind)) return refuse('too-large');
  const kind = sniffed.kind === 'jpeg' || sniffed.kind === 'png' ? 'picture' : sniffed.kind;
  if (kind !== 'pdf' && kind !== 'picture' && !isDataKind(kind)) return refuse('kept-not-read');
  const final = await run({
    message: { kind, fileName: input.fileName, bytes: input.bytes },
    timeLimitMs: input.timeLimitMs ?? TIME_LIMIT_MS,
    memoryLimitBytes: input.memoryLimitBytes ?? MEMORY_LIMIT_BYTES,
    signal: input.signal,
    onPage: input.onPage,
  });
  return final.type === 'done' ? final.reading : refuse('crashed');
}

/** The cells of a grower's own sheet, taken out in the same killable process. Every content ends in rows or a refusal. */
export async function readSheetRows(input: {
  bytes: Uint8Array;
  fileName: string;
  signal?: AbortSignal | undefined;
}): Promise<SheetRows> {
  const refuse = (code: RefusalCode): SheetRows => ({ ok: false, error: refusal(code) });
  const sniffed = sniffReport({ bytes: input.bytes, fileName: input.fileName });
  if (!sniffed.ok) return refuse(sniffed.code);
  if (input.bytes.length > maxBytesOf(sniffed.kind)) return refuse('too-large');
  if (!isDataKind(sniffed.kind)) return refuse('not-a-sheet');
  const final = await run({
    message: { kind: sniffed.kind, fileName: input.fileName, bytes: input.bytes, rowsOnly: true },
    timeLimitMs: TIME_LIMIT_MS,
    memoryLimitBytes: MEMORY_LIMIT_BYTES,
    signal: input.signal,
  });
  return final.type === 'rows' ? final.rows : refuse('crashed');
}
