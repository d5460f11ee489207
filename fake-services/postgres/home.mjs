import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { chmodSync, chownSync, mkdirSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';

export const isRoot = process.getuid?.() === 0;

/** PostgreSQL refuses to run as root: then its programs run as Debian's user postgres, otherwise as whoever called. */
export function asServer(command, args) {
  if (!isRoot) return [command, args];
  return ['setpriv', ['--reuid=postgres', '--regid=postgres', '--clear-groups', command, ...args]];
}

function serverCanPass(folder) {
  const [command, args] = asServer('test', ['-x', folder]);
  return spawnSync(command, args).status === 0;
}

function makeHome(folder) {
  mkdirSync(folder, { recursive: true });
  if (isRoot) {
    const owner = (name) => Number(spawnSync('id', [name, 'postgres'], { encoding: 'utf8' }).stdout);
    chownSync(folder, owner('-u'), owner('-g'));
  }
  chmodSync(folder, 0o700);
  return folder;
}

/**
 * The folder the cluster lives in. Wanted is `folder`; when a folder above it is closed to user postgres, a folder
 * outside, named after the wanted path, so that the next start finds the same data again.
 */
export function clusterHome(folder, say) {
  mkdirSync(path.dirname(folder), { recursive: true });
  if (!isRoot || serverCanPass(path.dirname(folder))) return makeHome(folder);
  const key = createHash('sha256').update(folder).digest('hex').slice(0, 12);
  for (const base of ['/var/lib', tmpdir()]) {
    if (!serverCanPass(base) || !statSync(base).isDirectory()) continue;
    const home = path.join(base, `loamline-${key}`);
    mkdirSync(home, { recursive: true });
    say(`The user postgres may not enter ${path.dirname(folder)}, so the database is kept in ${home}.`);
    return makeHome(home);
  }
  throw new Error(`The user postgres may enter neither ${path.dirname(folder)} nor /var/lib nor ${tmpdir()}.`);
}
