import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, rename, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';

const made = new Map<string, Promise<string>>();

async function make(source: string): Promise<string> {
  const { build } = await import('esbuild');
  const output = await build({
    entryPoints: [source],
    bundle: true,
    write: false,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    logLevel: 'silent',
  });
  const text = output.outputFiles[0]?.text ?? '';
  // Inside the packages' folder, so that the program finds them from where it lies.
  const packages = dirname(dirname(createRequire(import.meta.url).resolve('esbuild/package.json')));
  const folder = join(packages, '.cache', 'loamline');
  const path = join(folder, `${createHash('sha256').update(text).digest('hex').slice(0, 16)}.mjs`);
  if (existsSync(path)) return path;
  await mkdir(folder, { recursive: true });
  // Two processes may make the same program at once; the name appears only when the file is whole.
  const half = `${path}.${process.pid}`;
  await writeFile(half, text);
  await rename(half, path);
  return path;
}

/**
 * A program of ours in one plain file, for a child process. A loader that translates on the fly would read every package
 * as well and cost each child a second and 200 MB.
 */
export function bundleProgram(source: string): Promise<string> {
  const known = made.get(source) ?? make(source);
  made.set(source, known);
  return known;
}
