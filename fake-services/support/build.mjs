import { createHash } from 'node:crypto';
import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const SOURCES = [
  'app',
  'lib',
  'db',
  'public',
  'next.config.mjs',
  'proxy.ts',
  'instrumentation.ts',
  'tsconfig.json',
  '.postcssrc.json',
  'package-lock.json',
];
const PDF_WORKER = 'pdf.worker.min.mjs';

function* filesUnder(root, place) {
  const full = path.join(root, place);
  if (!existsSync(full)) return;
  if (!statSync(full).isDirectory()) yield place;
  else for (const name of readdirSync(full).sort()) yield* filesUnder(root, `${place}/${name}`);
}

/** One hash over everything a build is made from; tests and the copied pdf worker change nothing in it. */
export function treeHash(root) {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of filesUnder(root, source)) {
      if (/\.test\.tsx?$/.test(file) || file === `public/${PDF_WORKER}`) continue;
      const bytes = readFileSync(path.join(root, file));
      hash.update(`${file}\0${bytes.length}\0`).update(bytes);
    }
  }
  return hash.digest('hex');
}

/** The browser loads the PDF reader's worker from our own origin, in the very version that is installed. */
export function copyPdfWorker(root) {
  const from = path.join(root, 'node_modules/pdfjs-dist/build', PDF_WORKER);
  const to = path.join(root, 'public', PDF_WORKER);
  mkdirSync(path.dirname(to), { recursive: true });
  if (!existsSync(to) || !readFileSync(to).equals(readFileSync(from))) copyFileSync(from, to);
}

/** Builds web and worker unless the last build was made from exactly this tree. */
export async function ensureBuild({ root, run, say }) {
  copyPdfWorker(root);
  const stamp = path.join(root, '.next', 'loamline-tree');
  const hash = treeHash(root);
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return false;
  say('Building (half a minute the first time) …');
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  await run('next-build', process.execPath, ['node_modules/next/dist/bin/next', 'build'], { env });
  await run('worker-build', process.execPath, ['fake-services/support/bundleWorker.mjs'], { env });
  writeFileSync(stamp, hash);
  return true;
}
