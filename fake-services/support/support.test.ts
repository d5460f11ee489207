import { spawn } from 'node:child_process';
import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { treeHash } from './build.mjs';
import { createChildren, type UnexpectedEnd } from './children.mjs';
import { countsOfReport } from './counts.mjs';
import { dependenciesAreInstalled } from './dependencies.mjs';
import { openPidFile, startTimeOf } from './pidFile.mjs';
import { freePort } from './ports.mjs';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'support-'));
});
afterEach(() => rm(folder, { recursive: true }));

async function write(file: string, text: string): Promise<void> {
  await mkdir(path.join(folder, path.dirname(file)), { recursive: true });
  await writeFile(path.join(folder, file), text);
}

const isAlive = (pid: number) => startTimeOf(pid) !== undefined;

describe('free ports', () => {
  it('moves past a busy port and past ports already given away', async () => {
    const busy = createServer();
    await new Promise<void>((resolve) => busy.listen(0, '127.0.0.1', resolve));
    const { port } = busy.address() as AddressInfo;
    const next = await freePort(port);
    expect(next).toBeGreaterThan(port);
    expect(await freePort(port, [next])).toBeGreaterThan(next);
    busy.close();
  });
});

describe('the children of a script', () => {
  it('end with everything they started, the last started first', async () => {
    const ended: string[] = [];
    const children = createChildren({ logs: path.join(folder, 'logs') });
    const first = children.start('first', 'sh', ['-c', 'sleep 100 & echo $! && wait']);
    const second = children.start('second', 'sleep', ['100']);
    for (const [name, { ended: end }] of Object.entries({ first, second })) void end.then(() => ended.push(name));
    const log = path.join(folder, 'logs/first.log');
    await vi.waitFor(async () => expect(await readFile(log, 'utf8')).toMatch(/^\d+\n$/));
    const grandchild = Number(await readFile(log, 'utf8'));
    expect(isAlive(grandchild)).toBe(true);
    await children.stopAll();
    expect(ended).toEqual(['second', 'first']);
    expect(isAlive(grandchild)).toBe(false);
  });

  it('are missed when they end by themselves, with their last words', async () => {
    const missed = await new Promise<UnexpectedEnd>((resolve) => {
      const children = createChildren({ logs: path.join(folder, 'logs'), onExit: resolve });
      children.start('web', 'sh', ['-c', 'echo out of soil; exit 3']);
    });
    expect(missed).toMatchObject({ name: 'web', code: 3, lastLines: 'out of soil' });
  });

  it('are missed when their program does not exist', async () => {
    const missed = await new Promise<UnexpectedEnd>((resolve) => {
      const children = createChildren({ logs: path.join(folder, 'logs'), onExit: resolve });
      children.start('web', '/no/such/program', []);
    });
    expect(missed.code).toContain('ENOENT');
  });
});

describe('the pid file', () => {
  const startSleeper = () => {
    const child = spawn('sleep', ['100'], { detached: true, stdio: 'ignore' });
    const { pid } = child;
    if (pid === undefined) throw new Error('sleep did not start');
    return { child, pid };
  };

  it('ends the recorded leftovers of a dead script and nobody who got such a number later', async () => {
    const leftover = startSleeper();
    const stranger = startSleeper();
    const file = path.join(folder, 'running.json');
    const known = {
      script: { pid: 2 ** 22 + 1, started: 'long ago' },
      children: [
        { name: 'web', pid: leftover.pid, started: startTimeOf(leftover.pid) },
        { name: 'worker', pid: stranger.pid, started: 'another boot:1' },
      ],
    };
    await writeFile(file, JSON.stringify(known));
    const said: string[] = [];
    await openPidFile(file).recover((text: string) => said.push(text));
    expect(said).toEqual(['Ending what an interrupted run left: web.']);
    expect(isAlive(leftover.pid)).toBe(false);
    expect(isAlive(stranger.pid)).toBe(true);
    stranger.child.kill();
  });

  it('refuses a second run beside a living one, and leaves its record alone', async () => {
    const file = path.join(folder, 'running.json');
    const first = openPidFile(file);
    first.claim();
    first.address('http://127.0.0.1:3000');
    const second = openPidFile(file);
    await expect(second.recover(() => undefined)).rejects.toThrow(/already running here \(process \d+, at http/);
    second.remove();
    expect(JSON.parse(await readFile(file, 'utf8')).script.pid).toBe(process.pid);
  });
});

describe('installed packages', () => {
  const lock = (packages: object) => JSON.stringify({ packages: { '': { name: 'x' }, ...packages } });
  const state = async (wanted: object, installed: object) => {
    await write('package-lock.json', lock(wanted));
    await write('node_modules/.package-lock.json', lock(installed));
    return dependenciesAreInstalled(folder);
  };

  it('are enough only in the versions of the lock; another platform’s optional ones may be missing', async () => {
    await write('package-lock.json', lock({}));
    expect(dependenciesAreInstalled(folder)).toBe(false);
    const a = { 'node_modules/a': { version: '1.0.0' } };
    expect(await state(a, a)).toBe(true);
    expect(await state({ 'node_modules/a': { version: '1.0.1' } }, a)).toBe(false);
    expect(await state({ ...a, 'node_modules/b': { version: '1.0.0' } }, a)).toBe(false);
    expect(await state({ ...a, 'node_modules/b': { version: '1.0.0', optional: true } }, a)).toBe(true);
  });
});

describe('the hash of the tree', () => {
  it('changes with any source, not with tests or the copied worker of the PDF reader', async () => {
    await write('lib/a.ts', 'one');
    const before = treeHash(folder);
    await write('lib/a.test.ts', 'x');
    await write('public/pdf.worker.min.mjs', 'x');
    await write('README.md', 'x');
    expect(treeHash(folder)).toBe(before);
    await write('lib/a.ts', 'two');
    const changed = treeHash(folder);
    expect(changed).not.toBe(before);
    await write('next.config.mjs', 'x');
    expect(treeHash(folder)).not.toBe(changed);
  });
});

describe('the counts of a test run', () => {
  const counts = async (report: object) => {
    await write('report.json', JSON.stringify({ numPendingTests: 0, numTodoTests: 0, testResults: [], ...report }));
    return countsOfReport(path.join(folder, 'report.json'));
  };

  it('never call a run good that was not', async () => {
    expect(await counts({ numPassedTests: 5, numFailedTests: 0, success: true })).toEqual({
      passed: 5,
      failed: 0,
      skipped: 0,
    });
    const broken = [{ status: 'failed', assertionResults: [] }];
    expect(await counts({ numPassedTests: 5, numFailedTests: 1, success: false, testResults: broken })).toMatchObject({
      failed: 2,
    });
    expect(await counts({ numPassedTests: 5, numFailedTests: 0, success: false })).toMatchObject({ failed: 1 });
    expect(countsOfReport(path.join(folder, 'none.json'))).toEqual({ passed: 0, failed: 1, skipped: 0 });
  });
});
