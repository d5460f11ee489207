import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { findBinaries } from '../postgres/binaries.mjs';

const onPath = (name) => spawnSync('sh', ['-c', `command -v ${name}`]).status === 0;
const hasFonts = (folder) => existsSync(`/usr/share/fonts/truetype/${folder}`);

const PRESENT = {
  postgresql: () => findBinaries() !== undefined,
  chromium: () => onPath('chromium'),
  'fonts-liberation': () => hasFonts('liberation') || hasFonts('liberation2'),
  'fonts-dejavu-core': () => hasFonts('dejavu'),
  'poppler-utils': () => onPath('pdftoppm'),
};

/** Installs the missing ones of Debian's packages as root; otherwise throws a sentence with the line to type. */
export function ensureDebianPackages(names, say) {
  const missing = names.filter((name) => !PRESENT[name]());
  if (missing.length === 0) return;
  const isRoot = process.getuid?.() === 0;
  if (!isRoot || !onPath('apt-get')) {
    throw new Error(
      `These programs are missing: ${missing.join(', ')}. Nothing was changed. Install them, then start again:\n\n` +
        `  ${isRoot ? '' : 'sudo '}apt-get install -y --no-install-recommends ${missing.join(' ')}\n`,
    );
  }
  say(`Installing Debian's ${missing.join(', ')} …`);
  const options = ['-y', '-o', 'DPkg::Lock::Timeout=300', '-o', 'Acquire::Retries=3'];
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  for (const args of [
    ['update', ...options],
    ['install', '--no-install-recommends', ...options, ...missing],
  ]) {
    const result = spawnSync('apt-get', args, { env, encoding: 'utf8', stdio: ['ignore', 'pipe', 'pipe'] });
    if (result.status !== 0)
      throw new Error(`apt-get ${args[0]} failed:\n${result.stdout.slice(-1500)}${result.stderr}`);
  }
}
