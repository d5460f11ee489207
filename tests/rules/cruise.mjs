import { execFile } from 'node:child_process';
import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const CONFIG = fileURLToPath(new URL('./layering.mjs', import.meta.url));
const CRUISER = fileURLToPath(
  new URL('../../node_modules/dependency-cruiser/bin/dependency-cruise.mjs', import.meta.url),
);
const ROOTS = ['app', 'lib', 'db', 'fake-services', 'tests', 'fixtures', 'proxy.ts', 'instrumentation.ts'];

function run(args, cwd) {
  return new Promise((resolve, reject) => {
    execFile(process.execPath, args, { cwd, maxBuffer: 256 * 1024 * 1024 }, (error, stdout, stderr) => {
      try {
        resolve(JSON.parse(stdout));
      } catch {
        reject(new Error(`dependency-cruiser did not answer: ${stderr || error?.message}`));
      }
    });
  });
}

/** Every broken layering rule under `root`: { modules, violations: [{ rule, from, to }] }. No module at all is an error. */
export async function cruiseTree(root) {
  const present = ROOTS.filter((place) => existsSync(path.join(root, place)));
  const { summary, modules } = await run([CRUISER, '--config', CONFIG, '--output-type', 'json', ...present], root);
  const own = modules.filter(({ source }) => !/(^|\/)node_modules\//.test(source) && /\.(tsx?|mjs)$/.test(source));
  if (own.length === 0)
    throw new Error('dependency-cruiser looked at 0 modules: it checks nothing with this TypeScript.');
  const violations = summary.violations.map(({ rule, from, to }) => ({ rule: rule.name, from, to }));
  return { modules: own.length, violations };
}
