import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { until } from './until';

const root = fileURLToPath(new URL('../..', import.meta.url));

export type WorkerProcess = {
  /** Resolves once it listens for jobs. */
  ready: () => Promise<unknown>;
  /** kill -9: nothing of it runs any more when this resolves. */
  killHard: () => Promise<void>;
  askToStop: () => void;
  pid: () => number;
  alive: () => boolean;
  /** Exit code; null when a signal ended it. */
  ended: () => Promise<number | null>;
};

/** The product's own worker as a process, exactly as `npm run dev` starts it. */
export function startWorker(env: Record<string, string>): WorkerProcess {
  const { DATABASE_OWNER_URL: _, ...rest } = process.env;
  const child: ChildProcess = spawn(process.execPath, ['--import', 'tsx', 'lib/jobs/worker.ts'], {
    cwd: root,
    env: { ...rest, LOG_LEVEL: 'info', SWEEP_SECONDS: '0.5', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let said = '';
  for (const stream of [child.stdout, child.stderr]) {
    stream?.on('data', (part: Buffer) => {
      said += part.toString('utf8');
    });
  }
  const exit = new Promise<number | null>((resolve) => child.once('exit', (code) => resolve(code)));
  return {
    ready: () =>
      until(
        'the worker is ready',
        () => said,
        (text) => text.includes('worker ready'),
        60_000,
      ),
    killHard: async () => {
      if (child.exitCode === null && child.signalCode === null) child.kill('SIGKILL');
      await exit;
    },
    askToStop: () => child.kill('SIGTERM'),
    pid: () => child.pid ?? 0,
    alive: () => child.exitCode === null && child.signalCode === null,
    ended: () => exit,
  };
}
