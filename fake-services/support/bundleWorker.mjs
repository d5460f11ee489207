import { readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

// Runs after the packages are there, in a process of its own; see build.mjs.
const root = fileURLToPath(new URL('../..', import.meta.url));
// Programs the worker starts for one file each are entry points too: by name, x.child.ts and x.thread.ts.
const beside = readdirSync(path.join(root, 'lib'), { recursive: true })
  .map((file) => `lib/${file}`)
  .filter((file) => /\.(child|thread)\.ts$/.test(file));

await build({
  absWorkingDir: root,
  entryPoints: ['lib/jobs/worker.ts', ...beside],
  bundle: true,
  platform: 'node',
  format: 'esm',
  target: 'node20',
  packages: 'external',
  outbase: '.',
  outdir: '.next/worker',
  outExtension: { '.js': '.mjs' },
  sourcemap: true,
  logLevel: 'warning',
});
