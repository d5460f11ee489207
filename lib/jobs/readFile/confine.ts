import dgram from 'node:dgram';
import net from 'node:net';
import { Worker } from 'node:worker_threads';
import { HEAP_LIMIT_MB, LONGEST_TIME_MS, START_LIMIT_MS } from './limits';

/**
 * Flags for the process that opens strangers' files: bounded memory, and where this Node knows how (the flag has had two
 * names), no writing to disk and no programs of its own. Pictures need native code, the text engine a thread.
 */
export function confinedArguments(known: ReadonlySet<string> = process.allowedNodeEnvironmentFlags): string[] {
  const heap = `--max-old-space-size=${HEAP_LIMIT_MB}`;
  const flag = ['--permission', '--experimental-permission'].find((one) => known.has(one));
  const allowed = ['--allow-addons', '--allow-worker'];
  if (flag === undefined || !allowed.every((one) => known.has(one))) return [heap];
  return [heap, flag, '--allow-fs-read=*', ...allowed];
}

function noNetwork(): never {
  throw new Error('The reading process opens no connection.');
}

/** Ends a process whose parent is gone or that outlived every limit, even while its own thread is caught in a loop. */
const WATCH = `
const parent = process.ppid;
const born = Date.now();
setInterval(() => {
  if (process.ppid !== parent || Date.now() - born > ${LONGEST_TIME_MS + START_LIMIT_MS}) process.kill(process.pid, 'SIGKILL');
}, 500);`;

/** Called first in the process: no connection leaves it, and it cannot outlive its parent. */
export function confine(): void {
  net.Socket.prototype.connect = noNetwork;
  net.Server.prototype.listen = noNetwork;
  dgram.Socket.prototype.bind = noNetwork;
  dgram.Socket.prototype.send = noNetwork;
  // A promise that the PDF package dropped is no reason to give the file up; what it leaves hanging is ended by the clock.
  process.on('unhandledRejection', () => undefined);
  // Files of a million small faults cost a stack trace each; nobody sees them.
  Error.stackTraceLimit = 0;
  new Worker(WATCH, { eval: true, execArgv: [], env: {}, resourceLimits: { maxOldGenerationSizeMb: 8 } }).unref();
}
