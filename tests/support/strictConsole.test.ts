import { execFile } from 'node:child_process';
import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));

it('fails a test that lets the program complain, and only that one', async () => {
  await mkdir(path.join(root, 'tests/.out'), { recursive: true });
  const folder = await mkdtemp(path.join(root, 'tests/.out/console-'));
  const setup = path.join(root, 'tests/support/strictConsole.ts');
  await writeFile(path.join(folder, 'vitest.config.mjs'), `export default { test: { setupFiles: ['${setup}'] } };`);
  await writeFile(
    path.join(folder, 'planted.test.mjs'),
    `import { it } from 'vitest';
     it('quiet', () => {});
     it('complains', () => console.error('the roof leaks'));
     it('quiet again', () => {});`,
  );
  const report = await new Promise<string>((resolve) => {
    const args = [path.join(root, 'node_modules/vitest/vitest.mjs'), 'run', '--root', folder, '--reporter=json'];
    execFile(process.execPath, args, { cwd: folder }, (_error, stdout) => resolve(stdout));
  });
  await rm(folder, { recursive: true });
  const { testResults } = JSON.parse(report);
  const states = testResults[0].assertionResults.map(({ title, status }: { title: string; status: string }) => [
    title,
    status,
  ]);
  expect(states).toEqual([
    ['quiet', 'passed'],
    ['complains', 'failed'],
    ['quiet again', 'passed'],
  ]);
});
