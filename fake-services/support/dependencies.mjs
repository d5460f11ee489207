import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

/** True when every package of the lock stands in node_modules in that version, by npm's own record of what it installed. */
export function dependenciesAreInstalled(root) {
  const record = path.join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(record)) return false;
  const packagesOf = (file) => JSON.parse(readFileSync(file, 'utf8')).packages;
  const installed = packagesOf(record);
  return Object.entries(packagesOf(path.join(root, 'package-lock.json'))).every(
    ([place, { version, optional, devOptional, peer }]) => {
      if (place === '') return true;
      if (installed[place] === undefined) return Boolean(optional || devOptional || peer);
      return installed[place].version === version;
    },
  );
}

export async function ensureDependencies({ root, run, say }) {
  if (dependenciesAreInstalled(root)) return;
  say('Installing the packages of package-lock.json …');
  await run('npm-ci', 'npm', ['ci', '--prefer-offline', '--no-audit', '--no-fund', '--include=dev']);
}
