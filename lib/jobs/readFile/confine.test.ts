import { fork } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { bundleProgram } from '@/lib/services/program/bundle';
import { confinedArguments } from './confine';

const folder = mkdtempSync(join(tmpdir(), 'confined-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** A program that tries what a hostile file might, and tells what became of it. */
const PROBE = `
import { confine } from '${join(import.meta.dirname, 'confine.ts')}';
import { execFileSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { connect, createServer } from 'node:net';
import { createSocket } from 'node:dgram';
import { request } from 'node:http';
confine();
const tried = async (what) => { try { await what(); return 'done'; } catch (error) { return error.code ?? error.cause?.message ?? error.message; } };
const answer = {
  write: await tried(() => writeFileSync('${join(folder, 'written')}', 'x')),
  run: await tried(() => execFileSync('touch', ['${join(folder, 'run')}'])),
  connect: await tried(() => connect(8089, '127.0.0.1')),
  fetch: await tried(() => fetch('http://127.0.0.1:8089/')),
  request: await tried(() => new Promise((_, no) => request('http://127.0.0.1:8089/').on('error', no).end())),
  listen: await tried(() => createServer().listen(0)),
  send: await tried(() => createSocket('udp4').send('x', 8089, '127.0.0.1')),
  environment: Object.keys(process.env).join(),
};
process.send(answer, () => process.exit(0));
`;

describe('the process that opens files', () => {
  it('cannot write, run a program, or reach a network, and has no environment', async () => {
    const source = join(folder, 'probe.ts');
    writeFileSync(source, PROBE);
    const child = fork(await bundleProgram(source), [], {
      execArgv: confinedArguments(),
      env: { NODE_ENV: 'production' },
      cwd: '/',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    const [answer] = await once(child, 'message');
    const closed = 'The reading process opens no connection.';
    expect(answer).toEqual({
      write: 'ERR_ACCESS_DENIED',
      run: 'ERR_ACCESS_DENIED',
      connect: closed,
      fetch: closed,
      request: closed,
      listen: closed,
      send: closed,
      environment: 'NODE_ENV',
    });
    expect([existsSync(join(folder, 'written')), existsSync(join(folder, 'run'))]).toEqual([false, false]);
  });

  it('is given the flags by whichever name this Node knows them, or only the bound on memory', () => {
    const rest = ['--allow-addons', '--allow-worker'];
    expect(confinedArguments(new Set(['--permission', '--experimental-permission', ...rest]))[1]).toBe('--permission');
    expect(confinedArguments(new Set(['--experimental-permission', ...rest]))[1]).toBe('--experimental-permission');
    expect(confinedArguments(new Set(['--experimental-permission']))).toEqual([expect.stringContaining('old-space')]);
  });
});
