import { spawn } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { cruiseTree } from './cruise.mjs';
import { TEXT_RULES } from './textRules.mjs';

/* `npm run check`: format, lint, types, layering, dead code, texts. Needs no database. --result: a file for the counts. */
const root = fileURLToPath(new URL('../..', import.meta.url));
const { values: options } = parseArgs({ options: { result: { type: 'string' } } });

/** Findings of a tool: its output when it fails, nothing otherwise. */
function tool(...args) {
  return new Promise((resolve, reject) => {
    const env = { ...process.env, NO_COLOR: '1', FORCE_COLOR: '0' };
    const child = spawn(process.execPath, args, { cwd: root, env, stdio: ['ignore', 'pipe', 'pipe'] });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) stream.on('data', (text) => (output += text));
    child.once('error', reject);
    child.once('close', (code) => resolve(code === 0 ? [] : [output.trim() || `ended with ${code}`]));
  });
}

async function layering() {
  const { violations } = await cruiseTree(root);
  return violations.map(({ rule, from, to }) => `${rule}: ${from} → ${to}`);
}

const steps = {
  'format and lint': () =>
    tool('node_modules/@biomejs/biome/bin/biome', 'check', '--error-on-warnings', '--max-diagnostics=40', '.'),
  types: () => tool('node_modules/typescript/bin/tsc', '--noEmit', '--pretty', 'false'),
  layering,
  'dead code': () =>
    tool('node_modules/knip/bin/knip.js', '--config', '.knip.json', '--no-progress', '--no-config-hints'),
  ...Object.fromEntries(Object.entries(TEXT_RULES).map(([name, rule]) => [name, async () => rule(root)])),
};

async function take([name, step]) {
  const began = performance.now();
  const findings = await step().catch((error) => [error.message]);
  const seconds = ((performance.now() - began) / 1000).toFixed(1);
  console.log(`${findings.length === 0 ? 'ok    ' : 'FAILED'}  ${name.padEnd(18)}${seconds.padStart(6)} s`);
  for (const finding of findings) console.log(finding.replace(/^/gm, '        '));
  return findings.length === 0;
}

const results = await Promise.all(Object.entries(steps).map(take));
const passed = results.filter(Boolean).length;
const failed = results.length - passed;
if (options.result !== undefined) writeFileSync(options.result, JSON.stringify({ passed, failed }));
console.log(`${passed} checks passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
