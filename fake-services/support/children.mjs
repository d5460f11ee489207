import { spawn } from 'node:child_process';
import { closeSync, mkdirSync, openSync, readFileSync } from 'node:fs';
import path from 'node:path';
import readline from 'node:readline';

const STOP_AFTER = 8_000;

/** Signals a whole process group; a group that is gone is what was wanted. */
function signalGroup(pid, signal) {
  try {
    process.kill(-pid, signal);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

function groupLives(pid) {
  try {
    process.kill(-pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

async function waitUntil(condition, milliseconds) {
  const end = Date.now() + milliseconds;
  while (!condition()) {
    if (Date.now() > end) return false;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  return true;
}

function tail(file, lines) {
  try {
    return readFileSync(file, 'utf8').trimEnd().split('\n').slice(-lines).join('\n');
  } catch {
    return '';
  }
}

/**
 * @typedef {{ name: string, code: number | string | null, signal: string | null, lastLines: string }} UnexpectedEnd
 * @typedef {{ name: string, child: import('node:child_process').ChildProcess, stopSignal: string, logFile: string,
 *   exited: boolean, expected: boolean, ended: Promise<{ code: number | string | null, signal: string | null }> }} Started
 */

/**
 * The processes a script has started. Each child leads a group of its own, writes into logs/<name>.log and, when
 * `show`, to the terminal as well; `inherit` leaves the terminal to it. `onChange` hears the living children (for the pid
 * file), `onExit` the unexpected end of one.
 */
export function createChildren(
  /** @type {{ logs: string, onChange?: (living: { name: string, pid: number }[]) => void, onExit?: (end: UnexpectedEnd) => void }} */
  { logs, onChange = () => {}, onExit = () => {} },
) {
  const running = [];
  let stopping = false;
  mkdirSync(logs, { recursive: true });

  /** @returns {Started} */
  function start(
    name,
    command,
    args,
    { env = process.env, cwd, stopSignal = 'SIGTERM', show = false, inherit = false } = {},
  ) {
    const logFile = path.join(logs, `${name}.log`);
    const log = openSync(logFile, 'w');
    const stdio = inherit ? ['ignore', 'inherit', 'inherit'] : show ? ['ignore', 'pipe', 'pipe'] : ['ignore', log, log];
    const child = spawn(command, args, { cwd, env, stdio, detached: true });
    closeSync(log);
    if (show) {
      for (const stream of [child.stdout, child.stderr]) {
        readline.createInterface({ input: stream }).on('line', (line) => console.log(`${name.padEnd(8)}| ${line}`));
      }
    }
    const entry = { name, child, stopSignal, logFile, exited: false, expected: false, ended: undefined };
    entry.ended = new Promise((resolve) => {
      const end = (code, signal) => {
        if (entry.exited) return;
        entry.exited = true;
        onChange(living());
        resolve({ code, signal });
        if (!stopping && !entry.expected) onExit({ name, code, signal, lastLines: tail(logFile, 25) });
      };
      child.once('exit', end);
      child.once('error', (error) => end(error.message, null));
    });
    running.push(entry);
    onChange(living());
    return entry;
  }

  const living = () => running.filter((entry) => !entry.exited).map(({ name, child }) => ({ name, pid: child.pid }));

  async function stop(entry) {
    entry.expected = true;
    const { pid } = entry.child;
    if (pid === undefined) return;
    if (!entry.exited) signalGroup(pid, entry.stopSignal);
    const gone = await waitUntil(() => entry.exited && !groupLives(pid), STOP_AFTER);
    if (!gone) {
      signalGroup(pid, 'SIGKILL');
      await waitUntil(() => entry.exited && !groupLives(pid), 2_000);
    }
  }

  async function stopAll() {
    stopping = true;
    for (const entry of [...running].reverse()) await stop(entry);
  }

  return { start, stop, stopAll };
}
