import { type ChildProcess, fork } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { mutant } from '@/fixtures/make/hostile/mutate';
import { confinedArguments } from '@/lib/jobs/readFile/confine';
import { MEMORY_LIMIT_BYTES, TIME_LIMIT_MS } from '@/lib/jobs/readFile/limits';
import { isDataKind } from '@/lib/jobs/readFile/messages';
import { hasHidden } from '@/lib/reading/plain';
import type { Reading } from '@/lib/reading/types';
import { bundleProgram } from '@/lib/services/program/bundle';
import { sniffReport } from '@/lib/services/reading/sniff';

export type FuzzFile = { readonly fileName: string; readonly bytes: Uint8Array };
export type FuzzFault = { readonly fileName: string; readonly seed: number; readonly what: string };
export type FuzzSum = {
  tried: number;
  /** How often each outcome came: "soil", "not-soil", a refusal's code, or that of a process that had to be ended. */
  readonly ends: Map<string, number>;
  readonly faults: FuzzFault[];
  /** Those that had to be ended for their time or memory. */
  readonly stopped: FuzzFault[];
  slowestMs: number;
  peakBytes: number;
};

/** What is wrong with a reading as such, whatever the file was; null when it is sound. */
export function unsound(value: unknown): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : `a number that is ${value}`;
  if (typeof value === 'string') {
    if (hasHidden(value)) return 'a hidden character';
    return value.length > 1_000 ? 'a text without end' : null;
  }
  if (typeof value !== 'object' || value === null) return null;
  for (const [name, part] of Object.entries(value)) {
    const wrong = name === 'file' ? null : unsound(part);
    if (wrong !== null) return `${wrong} in ${name}`;
  }
  return null;
}

function isReading(value: unknown): value is Reading {
  return typeof value === 'object' && value !== null && 'kind' in value && 'samples' in value && 'error' in value;
}

function residentBytes(pid: number): number {
  try {
    return Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1] ?? 0) * 4096;
  } catch {
    return 0;
  }
}

type End = { readonly outcome: string; readonly fault: string | null; readonly ended: boolean };

/** One process that reads mutants until it dies or is ended; the next mutant then gets a new one. */
class Lane {
  private child: ChildProcess | null = null;
  private served = 0;

  constructor(
    private readonly program: string,
    private readonly sum: FuzzSum,
  ) {}

  private async open(): Promise<ChildProcess> {
    if (this.child !== null && this.served < 250) return this.child;
    this.close();
    const child = fork(this.program, [], {
      execArgv: confinedArguments(),
      cwd: '/',
      env: { NODE_ENV: 'production' },
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    await new Promise((resolve) => child.once('message', resolve));
    this.child = child;
    this.served = 0;
    return child;
  }

  close() {
    this.child?.kill('SIGKILL');
    this.child = null;
  }

  async read(file: FuzzFile): Promise<End> {
    const sniffed = sniffReport(file);
    if (!sniffed.ok) return { outcome: sniffed.code, fault: null, ended: false };
    const kind = sniffed.kind === 'jpeg' || sniffed.kind === 'png' ? 'picture' : sniffed.kind;
    if (kind !== 'pdf' && kind !== 'picture' && !isDataKind(kind))
      return { outcome: 'kept', fault: null, ended: false };
    const child = await this.open();
    this.served += 1;
    return new Promise((resolve) => {
      let why: string | null = null;
      const kill = (reason: string) => {
        why ??= reason;
        child.kill('SIGKILL');
      };
      const clock = setTimeout(() => kill('too-slow'), TIME_LIMIT_MS);
      const watch = setInterval(() => {
        const bytes = residentBytes(child.pid ?? 0);
        this.sum.peakBytes = Math.max(this.sum.peakBytes, bytes);
        if (bytes > MEMORY_LIMIT_BYTES) kill('too-much-memory');
      }, 50);
      const end = (answer: End) => {
        clearTimeout(clock);
        clearInterval(watch);
        child.removeAllListeners('message');
        child.removeAllListeners('exit');
        if (answer.ended) this.child = null;
        resolve(answer);
      };
      child.on('message', (message: { reading?: unknown; threw?: string }) => {
        if (message.threw !== undefined) end({ outcome: 'threw', fault: `threw ${message.threw}`, ended: false });
        else if (isReading(message.reading)) {
          const { kind: of, error } = message.reading;
          end({ outcome: error?.code ?? of, fault: unsound(message.reading), ended: false });
        }
      });
      child.on('exit', (code, signal) => {
        const outcome = why ?? (signal === 'SIGABRT' ? 'too-much-memory' : 'died');
        end({ outcome, fault: why === null ? `died with ${signal ?? code}` : null, ended: true });
      });
      child.send({ kind, fileName: file.fileName, bytes: file.bytes });
    });
  }
}

/** Reads mutants of the given files until `count` are done or the time is over. The same seed gives the same mutants. */
export async function fuzz(input: {
  files: readonly FuzzFile[];
  count: number;
  seed: number;
  milliseconds: number;
  lanes: number;
}): Promise<FuzzSum> {
  const { files, count, seed, milliseconds, lanes } = input;
  const program = await bundleProgram(fileURLToPath(new URL('./fuzzChild.ts', import.meta.url)));
  const sum: FuzzSum = { tried: 0, ends: new Map(), faults: [], stopped: [], slowestMs: 0, peakBytes: 0 };
  const until = performance.now() + milliseconds;
  let next = 0;
  const work = async () => {
    const lane = new Lane(program, sum);
    while (next < count && performance.now() < until) {
      const at = next++;
      const file = files[at % files.length];
      if (file === undefined) break;
      const began = performance.now();
      const { outcome, fault, ended } = await lane.read({
        fileName: file.fileName,
        bytes: mutant(file.bytes, seed + at),
      });
      sum.tried += 1;
      sum.slowestMs = Math.max(sum.slowestMs, performance.now() - began);
      sum.ends.set(outcome, (sum.ends.get(outcome) ?? 0) + 1);
      if (ended && fault === null) sum.stopped.push({ fileName: file.fileName, seed: seed + at, what: outcome });
      if (fault !== null) sum.faults.push({ fileName: file.fileName, seed: seed + at, what: fault });
    }
    lane.close();
  };
  await Promise.all(Array.from({ length: lanes }, work));
  return sum;
}
