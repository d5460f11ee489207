import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';

const OLDEST = 15;
const DEBIAN = '/usr/lib/postgresql';

/** The folder of initdb, postgres and psql: Debian's (the cluster's own major version if it has one), else the one on PATH. */
export function findBinaries(version) {
  const majors = existsSync(DEBIAN)
    ? readdirSync(DEBIAN).filter((name) => existsSync(path.join(DEBIAN, name, 'bin', 'initdb')))
    : [];
  const wanted = majors
    .map(Number)
    .filter((major) => (version === undefined ? major >= OLDEST : major === version))
    .sort((a, b) => a - b)[0];
  if (wanted !== undefined) return path.join(DEBIAN, String(wanted), 'bin');
  const onPath = spawnSync('sh', ['-c', 'command -v initdb'], { encoding: 'utf8' }).stdout.trim();
  return onPath === '' ? undefined : path.dirname(onPath);
}
