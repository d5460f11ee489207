import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { readFile as load } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readingRow, report, reportSample } from '@/db/schema';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withSite } from '@/lib/data/transaction';
import { ctxAs, makeSite, type TestSite, useWorld } from '../support/factory';
import { calmStore, pdfBytes, tellStore } from '../support/reports';

const world = useWorld();
const running: ChildProcess[] = [];
const WITHIN = { timeout: 25_000, interval: 100 };

function startWorker(): ChildProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'lib/jobs/worker.ts'], {
    env: { ...process.env, SWEEP_SECONDS: '1', LOG_LEVEL: 'silent' },
    stdio: 'ignore',
  });
  running.push(child);
  return child;
}

async function kill(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const gone = once(child, 'exit');
  child.kill('SIGKILL');
  await gone;
}

let here: TestSite;
beforeAll(async () => {
  here = await makeSite('Here');
});
afterAll(async () => {
  await calmStore();
  await Promise.all(running.map(kill));
});

const upload = async (bytes: Uint8Array, fileName: string) =>
  (await uploadReport({ ctx: await ctxAs(here.people.owner), input: { siteId: here.id, fileName, bytes } })).reportId;

const stand = (id: string) =>
  withSite(here.id, async (tx) => {
    const [row] = await tx.select().from(report).where(eq(report.id, id));
    const samples = await tx.select().from(reportSample).where(eq(reportSample.reportId, id));
    const rows = await tx.select().from(readingRow).where(eq(readingRow.reportId, id));
    return { state: row?.state, refusal: row?.refusalCode, samples: samples.length, rows: rows.length };
  });

describe('the worker as a process of its own', () => {
  it('is killed in mid-read, and its successor reads the file again without doubling anything', async () => {
    const id = await upload(await load('fixtures/reports/main-job/last-spring.pdf'), 'last-spring.pdf');
    await tellStore({ slow: 1, milliseconds: 9_000, method: 'GET' });
    const first = startWorker();
    await expect.poll(() => stand(id), WITHIN).toMatchObject({ state: 'reading' });
    await kill(first);
    await calmStore();
    // The store of the first try is still waiting; nothing of it may arrive.
    expect(await stand(id)).toEqual({ state: 'reading', refusal: null, samples: 0, rows: 0 });
    await world.moveClock(200);
    startWorker();
    await expect.poll(() => stand(id), WITHIN).toEqual({ state: 'in-review', refusal: null, samples: 3, rows: 39 });
  }, 60_000);

  it('goes on after a file that is no PDF inside', async () => {
    startWorker();
    const broken = await upload(pdfBytes(), 'broken.pdf');
    const good = await upload(await load('fixtures/reports/main-job/this-spring.csv'), 'this-spring.csv');
    await expect.poll(() => stand(good), WITHIN).toMatchObject({ state: 'in-review', samples: 3 });
    await expect.poll(() => stand(broken), WITHIN).toMatchObject({ state: 'unreadable', rows: 0 });
    expect((await stand(broken)).refusal).not.toBeNull();
  }, 60_000);
});
