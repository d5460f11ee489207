import { readdirSync, readFileSync } from 'node:fs';
import { readFile as load } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { eq } from 'drizzle-orm';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { report } from '@/db/schema';
import { HOSTILE } from '@/fixtures/make/hostile';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withSite } from '@/lib/data/transaction';
import { ctxAs, makeSite, type TestSite, useWorld } from '../support/factory';
import { startWorker, type WorkerProcess } from '../support/workerProcess';

const world = useWorld();
const workers: WorkerProcess[] = [];
const WITHIN = { timeout: 120_000, interval: 200 };

let here: TestSite;
beforeAll(async () => {
  here = await makeSite('Here');
});
afterEach(async () => {
  await Promise.all(workers.splice(0).map((worker) => worker.killHard()));
});

async function begin(env: Record<string, string> = {}): Promise<WorkerProcess> {
  const worker = startWorker({ SWEEP_SECONDS: '600', ...env });
  workers.push(worker);
  await worker.ready();
  return worker;
}

const upload = async (bytes: Uint8Array, fileName: string) =>
  (await uploadReport({ ctx: await ctxAs(here.people.owner), input: { siteId: here.id, fileName, bytes } })).reportId;

const stand = (id: string) =>
  withSite(here.id, async (tx) => {
    const [row] = await tx.select().from(report).where(eq(report.id, id));
    if (!row) throw new Error('The report is gone.');
    return row;
  });

type Process = { pid: number; parent: number; state: string; program: string };

/** Every process of this machine that the system shows. */
function processes(): Process[] {
  return readdirSync('/proc').flatMap((name) => {
    if (!/^\d+$/.test(name)) return [];
    try {
      const [, state = '', parent = ''] = /\) (\S) (\d+)/.exec(readFileSync(`/proc/${name}/stat`, 'utf8')) ?? [];
      const program = readFileSync(`/proc/${name}/cmdline`, 'utf8').replaceAll('\0', ' ');
      return [{ pid: Number(name), parent: Number(parent), state, program }];
    } catch {
      return [];
    }
  });
}

const childrenOf = (parent: number) =>
  processes().filter(
    (one) => one.parent === parent && (one.state === 'Z' || one.program.includes('--max-old-space-size')),
  );

const POISON = [
  'bomb.pdf',
  'bomb-hex.pdf',
  'brackets.pdf',
  'tree-loop.pdf',
  'six-hundred.pdf',
  'cut-off.png',
  'declared.png',
  'bomb-lying.xlsx',
  'laughs.xml',
  'deep.json',
];

describe('ten poison files in a row', () => {
  it('each get their refusal from two workers, which stay healthy, and honest files after them are read', async () => {
    const before = new Set(readdirSync(tmpdir()));
    const two = [await begin(), await begin()];
    const sent: { id: string; fileName: string; codes: readonly string[] }[] = [];
    for (const fileName of POISON) {
      const found = HOSTILE.find((one) => one.fileName === fileName);
      if (found === undefined || !('codes' in found.want)) throw new Error(`${fileName} is no poison.`);
      sent.push({ id: await upload(await found.bytes(), fileName), fileName, codes: found.want.codes });
    }
    const honest = [
      await upload(await load('fixtures/reports/main-job/this-spring.csv'), 'this-spring.csv'),
      await upload(await load('fixtures/reports/main-job/last-spring.pdf'), 'last-spring.pdf'),
    ];
    for (const id of honest) await expect.poll(async () => (await stand(id)).state, WITHIN).toBe('in-review');
    for (const { id, fileName, codes } of sent) {
      await expect.poll(async () => (await stand(id)).state, { ...WITHIN, message: fileName }).toBe('unreadable');
      const { refusalCode, refusalSentence } = await stand(id);
      expect(codes).toContain(refusalCode);
      expect(refusalSentence).toMatch(/^[A-Z].{30,}\.$/s);
    }
    const jobs = await world.owner()<{ state: string; retry_count: number }[]>`
      select state, retry_count from queue.job where name = 'read-report'`;
    await expect
      .poll(
        async () =>
          (await world.owner()`select 1 from queue.job where name = 'read-report' and state <> 'completed'`).length,
        WITHIN,
      )
      .toBe(0);
    expect(jobs).toHaveLength(POISON.length + honest.length);
    expect(jobs.every((job) => job.retry_count === 0)).toBe(true);
    for (const worker of two) {
      expect(worker.alive()).toBe(true);
      await expect.poll(() => childrenOf(worker.pid()), WITHIN).toEqual([]);
    }
    const made = readdirSync(tmpdir()).filter(
      (name) => !before.has(name) && /tess|pdf|sharp|vips|traineddata|loam/i.test(name),
    );
    expect(made).toEqual([]);
  }, 300_000);
});

describe('a worker that is killed while a file keeps its reading process busy', () => {
  it('leaves no process behind, and the file is taken up again when its job has run out', async () => {
    const found = HOSTILE.find((one) => one.fileName === 'form-doubling-painted.pdf');
    if (found === undefined) throw new Error('The busy file is missing.');
    const first = await begin();
    const id = await upload(await found.bytes(), 'form-doubling-painted.pdf');
    await expect.poll(async () => (await stand(id)).state, WITHIN).toBe('reading');
    await expect.poll(() => childrenOf(first.pid()).length, WITHIN).toBe(1);
    const [child] = childrenOf(first.pid());
    const started = (await stand(id)).readingStartedAt;
    await first.killHard();
    const left = () => processes().filter((one) => one.pid === child?.pid && one.state !== 'Z');
    await expect.poll(left, { timeout: 15_000, interval: 100 }).toEqual([]);
    expect(await stand(id)).toMatchObject({ state: 'reading', refusalCode: null });
    // The clocks of queue and product go on by the 150 s after which the job runs out; no sweep helps.
    await world.owner()`update queue.job set started_on = started_on - interval '150 seconds' where name = 'read-report' and state = 'active'`;
    await world.moveClock(150);
    await begin();
    const asked = Date.now();
    await expect
      .poll(async () => (await stand(id)).readingStartedAt?.getTime(), { timeout: 60_000, interval: 200 })
      .not.toBe(started?.getTime());
    // 150 s and what it took from there are within the three minutes that a grower is promised.
    expect(Date.now() - asked).toBeLessThan(30_000);
    await world.moveClock(0);
  }, 180_000);
});
