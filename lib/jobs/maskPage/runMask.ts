import { fork } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { isFromMaskChild, type Masked, type NotMasked, type ToMaskChild } from './messages';

/** Reading a page from its picture takes most of it. */
const TIME_LIMIT_MS = 75_000;
const START_LIMIT_MS = 30_000;
const HEAP_LIMIT_MB = 320;
const MEMORY_LIMIT_BYTES = 1024 * 1024 * 1024;
const MEMORY_CHECK_MS = 200;

/** In development the child is the TypeScript file beside this one; in a bundle it is bundled beside the worker. */
const CHILD_FILES = ['./child.ts', './maskPageChild.mjs'];

function childProgram(): { path: string; execArgv: string[] } {
  const heap = `--max-old-space-size=${HEAP_LIMIT_MB}`;
  for (const name of CHILD_FILES) {
    const path = fileURLToPath(new URL(name, import.meta.url));
    if (!existsSync(path)) continue;
    if (!name.endsWith('.ts')) return { path, execArgv: [heap] };
    const tsx = pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
    return { path, execArgv: [heap, '--import', tsx] };
  }
  throw new Error('The drawing process is missing beside the worker.');
}

const TOO_SLOW: NotMasked = {
  ok: false,
  sentence:
    'Drawing this page took too much time or memory and was stopped. Describe the fault in words; no copy was made.',
};

/** Resident memory of a process where the system tells it (Linux); 0 elsewhere, where the heap limit alone holds. */
function residentBytes(pid: number): number {
  try {
    return Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1] ?? 0) * 4096;
  } catch {
    return 0;
  }
}

/** Draws one page in a process of its own, killed past its time. Rejects when that process dies without an answer. */
export function runMask(
  message: ToMaskChild,
  options: { signal?: AbortSignal; timeLimitMs?: number } = {},
): Promise<Masked | NotMasked> {
  return new Promise((resolve, reject) => {
    const { path, execArgv } = childProgram();
    // No environment: the process that opens strangers' files holds no secret.
    const child = fork(path, [], {
      execArgv,
      env: { NODE_ENV: 'production' },
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    let answer: Masked | NotMasked | null = null;
    const kill = () => child.kill('SIGKILL');
    const late = () => {
      answer ??= TOO_SLOW;
      kill();
    };
    let clock = setTimeout(late, START_LIMIT_MS);
    const watch = setInterval(() => {
      if (child.pid !== undefined && residentBytes(child.pid) > MEMORY_LIMIT_BYTES) late();
    }, MEMORY_CHECK_MS);
    options.signal?.addEventListener('abort', kill, { once: true });
    child.on('message', (said: unknown) => {
      if (!isFromMaskChild(said)) return;
      if (said.type === 'done') {
        answer = said.answer;
        return;
      }
      clearTimeout(clock);
      clock = setTimeout(late, options.timeLimitMs ?? TIME_LIMIT_MS);
      child.send(message);
    });
    child.on('error', () => undefined);
    child.on('close', () => {
      clearTimeout(clock);
      clearInterval(watch);
      options.signal?.removeEventListener('abort', kill);
      if (answer !== null) resolve(answer);
      else reject(new Error('The process that draws a page ended without an answer.'));
    });
  });
}
