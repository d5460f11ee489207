import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { pause } from './mischief.mjs';

/** A number or text that differs for two processes which got the same id one after the other. */
export function startTimeOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return fields[0] === 'Z'
      ? undefined
      : `${readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim()}:${fields[19]}`;
  } catch {
    if (existsSync('/proc/self/stat')) return undefined;
    return spawnSync('ps', ['-o', 'lstart=', '-p', String(pid)], { encoding: 'utf8' }).stdout?.trim() || undefined;
  }
}

const withStart = ({ name = 'start', pid }) => ({ name, pid, started: startTimeOf(pid) });
const lives = ({ pid, started }) => started !== undefined && startTimeOf(pid) === started;

export function openPidFile(file) {
  const earlier = () => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined);
  let address;
  let children = [];
  let ours = false;

  function save() {
    ours = true;
    mkdirSync(path.dirname(file), { recursive: true });
    const known = { script: withStart({ pid: process.pid }), address, children };
    writeFileSync(`${file}.making`, JSON.stringify(known, null, 2));
    renameSync(`${file}.making`, file);
  }

  return {
    /** Refuses a second start of the same data; ends what a script killed with -9 left behind, and nothing else. */
    async recover(say) {
      const before = earlier();
      if (before === undefined) return;
      if (lives(before.script)) {
        const where = before.address === undefined ? '' : `, at ${before.address}`;
        throw new Error(
          `Loamline is already running here (process ${before.script.pid}${where}). Stop that one first.`,
        );
      }
      const leftovers = before.children.filter(lives).reverse();
      if (leftovers.length > 0)
        say(`Ending what an interrupted run left: ${leftovers.map(({ name }) => name).join(', ')}.`);
      for (const child of leftovers) {
        for (const [signal, patience] of [
          [child.name === 'postgres' ? 'SIGINT' : 'SIGTERM', 8_000],
          ['SIGKILL', 2_000],
        ]) {
          if (!lives(child)) break;
          process.kill(-child.pid, signal);
          for (let waited = 0; lives(child) && waited < patience; waited += 25) await pause(25);
        }
      }
    },
    /** From here on a second start is refused. */
    claim: save,
    children(list) {
      children = list.map(withStart);
      save();
    },
    address(url) {
      address = url;
      save();
    },
    remove() {
      if (ours) rmSync(file, { force: true });
    },
  };
}
