import { readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

// Runs after the packages are there, in a process of its own; see build.mjs.
const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
const entryPoints = { worker: 'lib/jobs/worker.ts' };
// A program that a job starts for one file at a time stands as child.ts in the job's folder; here it becomes <folder>Child.mjs.
for (const file of readdirSync(path.join(root, 'lib/jobs'), { recursive: true })) {
  if (path.basename(file) !== 'child.ts') continue;
  entryPoints[`${path.basename(path.dirname(file))}Child`] = `lib/jobs/${file}`;
}

await build({
  absWorkingDir: root,
  entryPoints,
  bundle: true,
  platform: 'node',
  format: 'esm',
  target: 'node20',
  packages: 'external',
  // Without this a missing file of our own would count as a package and fail only when the worker starts.
  alias: { '@': root },
  outdir: '.next/worker',
  outExtension: { '.js': '.mjs' },
  sourcemap: true,
  logLevel: 'warning',
});
