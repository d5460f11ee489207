import { chmodSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { copyPdfWorker, ensureBuild } from './support/build.mjs';
import { createChildren } from './support/children.mjs';
import { countsOfReport } from './support/counts.mjs';
import { ensureDebianPackages } from './support/debian.mjs';
import { ensureDependencies } from './support/dependencies.mjs';
import { pause } from './support/mischief.mjs';
import { createRunner } from './support/step.mjs';

/*
 * `npm test`: everything, with a cluster, store and mailbox of its own. `npm test -- <part of a file name>`: only those
 * tests. `npm run bench`: the measurements of tests/bench/main.ts beside a started stack.
 */
const root = fileURLToPath(new URL('..', import.meta.url));
const out = path.join(root, 'tests', '.out');
const VITEST = 'node_modules/vitest/vitest.mjs';
const words = process.argv.slice(2);
const isBench = words.includes('--bench');
const filters = words.filter((word) => word !== '--bench');

mkdirSync(out, { recursive: true });
const work = mkdtempSync(path.join(out, 'run-'));
// The user postgres must be able to enter.
chmodSync(work, 0o755);
const children = createChildren({
  logs: path.join(work, 'logs'),
  onExit: ({ name, code, signal, lastLines }) => {
    if (name === 'stack') finish(1, `The started stack ended by itself (${signal ?? code}):\n${lastLines}`);
  },
});
const run = createRunner({ children, root });
const total = { passed: 0, failed: 0, skipped: 0 };
const times = [];
let services;
let stackDatabase;
let finishing;

function add(counts) {
  for (const kind of Object.keys(total)) total[kind] += counts[kind] ?? 0;
}

async function timed(name, work) {
  const began = performance.now();
  try {
    return await work();
  } finally {
    times.push(`${name} ${((performance.now() - began) / 1000).toFixed(1)} s`);
  }
}

/** Runs to the end whatever happens and leaves nothing behind; the counts are the very last line. */
function finish(code, reason) {
  finishing ??= (async () => {
    if (reason !== undefined) console.error(reason);
    if (code === 1 && total.failed === 0) total.failed = 1;
    await children.stopAll();
    await services?.stop();
    rmSync(work, { recursive: true, force: true });
    if (stackDatabase !== undefined) rmSync(stackDatabase, { recursive: true, force: true });
    if (times.length > 0) console.log(`\n${times.join(', ')}`);
    if (total.skipped > 0) console.log(`${total.skipped} skipped`);
    if (!isBench) console.log(`${total.passed} passed, ${total.failed} failed`);
    process.exit(code !== 0 ? code : total.failed > 0 ? 1 : 0);
  })();
  return finishing;
}

async function succeeded(promise) {
  try {
    await promise;
    return true;
  } catch (error) {
    if (finishing === undefined) console.error(error.message);
    return false;
  }
}

async function check() {
  const result = path.join(work, 'check.json');
  await run('check', process.execPath, ['tests/rules/check.mjs', '--result', result], { inherit: true }).catch(
    () => undefined,
  );
  add(existsSync(result) ? JSON.parse(readFileSync(result, 'utf8')) : { failed: 1 });
}

async function vitest(name, config, env, patterns) {
  const report = path.join(work, `${name}.json`);
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const args = [VITEST, 'run', '--config', config, ...reporters, '--passWithNoTests', ...patterns];
  await run(name, process.execPath, args, { inherit: true, env: { ...process.env, ...env } }).catch(() => undefined);
  add(countsOfReport(report));
}

async function unitTests(patterns) {
  const { startTestServices } = await import('./testServices.mjs');
  const ready = await succeeded(
    timed('services', async () => {
      services = await startTestServices({ root });
    }),
  );
  if (!ready) return add({ failed: 1 });
  await timed('tests', () => vitest('tests', 'tests/vitest.config.ts', services.env, patterns));
  await services.stop();
  services = undefined;
}

/** The whole product as `npm start` starts it, with data of its own; resolves to what the tests may know about it. */
async function startStack(extra = {}) {
  const ready = path.join(work, 'ready.json');
  const args = ['fake-services/start.mjs', '--local', '--fast-database', '--port', '0', '--mail-port', '0'];
  const env = { ...process.env, LOAMLINE_GALLERY: '1', ...extra };
  children.start('stack', process.execPath, [...args, '--data', path.join(work, 'stack'), '--ready-file', ready], {
    cwd: root,
    env,
  });
  while (!existsSync(ready)) {
    if (finishing) return {};
    await pause(50);
  }
  const { DATABASE_FOLDER, ...known } = JSON.parse(readFileSync(ready, 'utf8'));
  stackDatabase = DATABASE_FOLDER;
  return { ...known, STACK_FOLDER: path.join(work, 'stack') };
}

/** The build counts as one check; it is made even while there is nothing to run in a browser. */
async function browserTests(patterns, hasTests) {
  const built = await succeeded(timed('build', () => ensureBuild({ root, run, say: console.log })));
  add(built ? { passed: 1 } : { failed: 1 });
  if (!built || !hasTests) return undefined;
  // What is due is looked for each second, so that a test that moves the clock does not wait for it.
  const env = await timed('stack', () => startStack({ SWEEP_SECONDS: '1' }));
  if (finishing) return undefined;
  return timed('browser tests', () => vitest('browser', 'tests/vitest.e2e.config.ts', env, patterns));
}

async function bench() {
  await ensureBuild({ root, run, say: console.log });
  const env = { ...process.env, ...(await startStack()) };
  await run('bench', process.execPath, ['--import', 'tsx', 'tests/bench/main.ts', ...filters], {
    env,
    inherit: true,
  });
}

function browserFiles() {
  const folder = path.join(root, 'tests/e2e');
  return existsSync(folder) ? readdirSync(folder, { recursive: true }).filter((file) => file.endsWith('.e2e.ts')) : [];
}

async function main() {
  ensureDebianPackages(
    ['postgresql', 'chromium', 'fonts-liberation', 'fonts-dejavu-core', 'poppler-utils'],
    console.log,
  );
  await ensureDependencies({ root, run, say: console.log });
  copyPdfWorker(root);
  if (isBench) return bench();
  const wanted = browserFiles().filter(
    (file) => filters.length === 0 || filters.some((word) => `tests/e2e/${file}`.includes(word)),
  );
  const onlyBrowser =
    filters.length > 0 && filters.every((word) => wanted.some((file) => `tests/e2e/${file}`.includes(word)));
  if (filters.length === 0) await timed('check', check);
  if (!onlyBrowser) await unitTests(filters);
  if (wanted.length > 0 || filters.length === 0) await browserTests(filters, wanted.length > 0);
  if (filters.length > 0 && total.passed + total.failed === 0)
    throw new Error(`No test file is named like ${filters.join(' or ')}.`);
  return undefined;
}

process.on('SIGINT', () => finish(130));
process.on('SIGTERM', () => finish(143));
main().then(
  () => finish(0),
  (error) => finish(1, error.message),
);
