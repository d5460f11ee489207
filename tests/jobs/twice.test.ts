import { readFile } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { effectCheck, outbox, pageCopy, readingRow, report } from '@/db/schema';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { createBatch } from '@/lib/data/batches/createBatch';
import { setBatchMail } from '@/lib/data/batches/setBatchMail';
import { askCopy } from '@/lib/data/copies/askCopy';
import { setMailPreference } from '@/lib/data/mail/preferences';
import { queueMail } from '@/lib/data/mail/queueMail';
import { requeueMail } from '@/lib/data/mail/requeueMail';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { getReview } from '@/lib/data/review/getReview';
import { setSample } from '@/lib/data/review/setSample';
import { withPeople, withSite } from '@/lib/data/transaction';
import type { SiteId } from '@/lib/domain/ids';
import type { JobDefinition } from '@/lib/jobs/job';
import { JOB_NAMES, type JobName, type JobPayload } from '@/lib/jobs/names';
import { JOB_DEFINITIONS } from '@/lib/jobs/registry';
import { getFile } from '@/lib/services/storage/storage';
import { ctxAs, ctxWorker, makePlot, makeSite, makeTest, useWorld } from '../support/factory';
import { pdfBytes, readResult, readSample, soilReading } from '../support/reports';

/** Every job may be delivered twice: the second time, and a second worker at the same time, change nothing. */
const world = useWorld();
let backup: postgres.Sql;
beforeAll(() => {
  backup = postgres(world.urls().backupUrl, { max: 1 });
});
afterAll(() => backup.end());

/** One line a table; progress of time (attempts, moments) is not left out, since the second run must not write at all. */
async function everyTable(): Promise<Record<string, unknown>> {
  const tables = await backup<{ name: string }[]>`
    select relname as name from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace order by 1`;
  const sums: Record<string, unknown> = {};
  for (const { name } of tables) {
    const [row] =
      await backup`select md5(coalesce(string_agg(t::text, ',' order by t::text), '')) as sum from ${backup(name)} t`;
    sums[name] = row?.sum;
  }
  return sums;
}

const boxOf = async (to: string): Promise<unknown[]> =>
  (await fetch(`${process.env.MAILBOX_URL}/box.json?to=${encodeURIComponent(to)}`)).json();

/** What to run and, afterwards, how often it acted: exactly once is 1. */
type Case<N extends JobName> = { payload: JobPayload<N>; acted: () => Promise<number> };

const CASES: { [N in JobName]: () => Promise<Case<N>> } = {
  'read-report': async () => {
    const site = await makeSite();
    const bytes = new Uint8Array(await readFile('fixtures/reports/main-job/this-spring.csv'));
    const ctx = await ctxAs(site.people.owner);
    const { reportId: id } = await uploadReport({ ctx, input: { siteId: site.id, fileName: 'spring.csv', bytes } });
    return {
      payload: { siteId: site.id, id },
      acted: () =>
        withSite(site.id, async (tx) => {
          const [row] = await tx.select().from(report).where(eq(report.id, id));
          const rows = await tx.select().from(readingRow).where(eq(readingRow.reportId, id));
          const keys = new Set(rows.map((one) => `${one.reportSampleId} ${one.ordinal}`));
          expect(row?.state).toBe('in-review');
          expect(rows.length).toBeGreaterThan(0);
          return rows.length / keys.size;
        }),
    };
  },
  'send-mail': async () => {
    const to = `once-${Date.now()}@garden.test`;
    const message = { subject: 'A letter', html: '<p>A letter</p>', text: 'A letter' };
    const { id } = await withPeople((tx) =>
      queueMail(tx, { personId: null, to, kind: 'reminder', dedupeKey: 'once', message }),
    );
    if (!id) throw new Error('The letter was not queued.');
    return {
      payload: { id },
      acted: async () => {
        const [row] = await withPeople((tx) => tx.select().from(outbox).where(eq(outbox.id, id)));
        expect(row?.state).toBe('sent');
        return (await boxOf(to)).length;
      },
    };
  },
  'recheck-effects': async () => {
    const site = await makeSite();
    const plotId = await makePlot(site.id);
    const ph = (value: string) => [{ analyte: 'soil_ph_water', value, unit: 'pH' }];
    await makeTest(site, plotId, '2025-04-12', ph('7.3'));
    await makeTest(site, plotId, '2026-04-11', ph('6.8'));
    await recordApplication({
      ctx: await ctxAs(site.people.owner),
      input: {
        siteId: site.id,
        plotId,
        material: { key: 'elemental-sulfur-90' },
        amount: 9,
        amountUnit: 'lb',
        appliedOn: '2025-04-20',
        intents: [{ analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.5, low: null, high: null, source: 'typed' }],
      },
    });
    return {
      payload: { siteId: site.id, id: plotId },
      acted: () => withSite(site.id, async (tx) => (await tx.select().from(effectCheck)).length),
    };
  },
  'recheck-reviews': async () => {
    const site = await makeSite();
    const plotId = await makePlot(site.id, { name: 'North' });
    const ctx = await ctxAs(site.people.owner);
    const send = async () =>
      (await uploadReport({ ctx, input: { siteId: site.id, fileName: 'r.pdf', bytes: pdfBytes() } })).reportId;
    const [open, first] = [await send(), await send()];
    await read(site.id, open, '12.8');
    await read(site.id, first, '6.4');
    const input = { siteId: site.id, reportId: first };
    const review = await getReview({ ctx, input });
    const [sample] = review.samples;
    if (sample?.plotId !== plotId) throw new Error('The sample did not find its plot by its name.');
    const at = { ...input, reportSampleId: sample.id, version: sample.version, takenOn: '2026-04-10' };
    await setSample({ ctx, input: at });
    await confirmReport({ ctx, input });
    return {
      payload: { siteId: site.id, id: first },
      acted: () =>
        withSite(site.id, async (tx) => {
          const rows = await tx.select().from(readingRow).where(eq(readingRow.reportId, open));
          return rows.flatMap((row) => row.doubts).filter((doubt) => doubt.code === 'factor-two').length;
        }),
    };
  },
  'tell-batch': async () => {
    const { site, batchId } = await aBatchThatIsRead();
    return { payload: { siteId: site.id, id: batchId }, acted: () => lettersOf(site.people.owner.email) };
  },
  'tell-report': async () => {
    const site = await makeSite();
    const ctx = await ctxAs(site.people.owner);
    await setMailPreference({ ctx, input: { kind: 'report-ready', wanted: true } });
    const { reportId: id } = await uploadReport({
      ctx,
      input: { siteId: site.id, fileName: 'r.pdf', bytes: pdfBytes() },
    });
    await read(site.id, id);
    return { payload: { siteId: site.id, id }, acted: () => lettersOf(site.people.owner.email) };
  },
  'mask-page': async () => {
    const { site, copyId, copy } = await aCopy();
    const files = async () => {
      const row = await copy();
      expect(row?.state).toBe('ready');
      return (row?.pictureKey === null ? 0 : 1) * (row?.bundleKey === null ? 0 : 1);
    };
    return { payload: { siteId: site.id, id: copyId }, acted: files };
  },
  'drop-copy': async () => {
    const { site, copyId, copy } = await aCopy();
    await run('mask-page', { siteId: site.id, id: copyId });
    return {
      payload: { siteId: site.id, id: copyId },
      acted: async () => {
        const row = await copy();
        expect(row?.state).toBe('thrown-away');
        await expect(getFile(row?.pictureKey ?? '', row?.pictureSha256 ?? '')).rejects.toThrow('not-found');
        return 1;
      },
    };
  },
};

const lettersOf = async (to: string): Promise<number> =>
  (await withPeople((tx) => tx.select().from(outbox).where(eq(outbox.toAddress, to)))).length;

/** Taken and read, as the worker does it. */
async function read(siteId: SiteId, id: string, printed = '6.4'): Promise<void> {
  const ctx = await ctxWorker();
  const task = await startReading({ ctx, input: { siteId, id } });
  if (!task) throw new Error('The report could not be taken.');
  const results = [readResult({ analyte: 'potassium', printed, unit: 'mg/kg' })];
  const sample = readSample({ sampleId: 'North', results });
  await saveReading({ ctx, input: { lease: task.lease, reading: soilReading([sample]) } });
}

async function aBatchThatIsRead() {
  const site = await makeSite();
  const ctx = await ctxAs(site.people.owner);
  const at = { siteId: site.id };
  const files = ['a.pdf', 'b.pdf'].map((name) => ({ name, bytes: 9 }));
  const { batchId, fileIds } = await createBatch({ ctx, input: { ...at, files } });
  await setBatchMail({ ctx, input: { ...at, batchId, wanted: true } });
  for (const batchFileId of fileIds) {
    const sent = await uploadReport({ ctx, input: { ...at, fileName: 'a.pdf', bytes: pdfBytes(), batchFileId } });
    await read(site.id, sent.reportId);
  }
  return { site, batchId };
}

async function aCopy() {
  const site = await makeSite();
  const ctx = await ctxAs(site.people.owner);
  const bytes = new Uint8Array(await readFile('fixtures/reports/main-job/last-spring.pdf'));
  const { reportId } = await uploadReport({ ctx, input: { siteId: site.id, fileName: 'last-spring.pdf', bytes } });
  await read(site.id, reportId);
  const { id: copyId } = await askCopy({ ctx, input: { siteId: site.id, reportId, page: 1 } });
  const copy = () =>
    withSite(site.id, async (tx) => (await tx.select().from(pageCopy).where(eq(pageCopy.id, copyId)))[0]);
  return { site, copyId, copy };
}

async function run(name: JobName, payload: unknown): Promise<void> {
  const job = JOB_DEFINITIONS.find((one) => one.name === name) as JobDefinition | undefined;
  if (!job) throw new Error(`No definition handles ${name}.`);
  const signal = new AbortController().signal;
  await job.handle({ ctx: await ctxWorker(), payload: payload as JobPayload<JobName>, signal });
}

describe('a job delivered twice acts once', () => {
  it('has a case for every job there is, and a definition', () => {
    expect(JOB_DEFINITIONS.map((job) => job.name).sort()).toEqual([...JOB_NAMES].sort());
    expect(Object.keys(CASES).sort()).toEqual([...JOB_NAMES].sort());
  });

  it.each(JOB_NAMES)('%s, one after the other', async (name) => {
    const { payload, acted } = await CASES[name]();
    await run(name, payload);
    expect(await acted()).toBe(1);
    const before = await everyTable();
    await run(name, payload);
    expect(await everyTable()).toEqual(before);
    expect(await acted()).toBe(1);
  });

  it.each(JOB_NAMES)('%s, at the same time', async (name) => {
    const { payload, acted } = await CASES[name]();
    const answers = await Promise.allSettled([run(name, payload), run(name, payload)]);
    // One may be told to come back later; then it comes back, as the queue would bring it.
    if (answers.some((answer) => answer.status === 'rejected')) await run(name, payload);
    expect(await acted()).toBe(1);
  });

  it('the sweep of unsent mail asks for one job a message, however often it runs', async () => {
    const { payload } = await CASES['send-mail']();
    const jobs = async () =>
      (await world.owner()`select 1 from queue.job where name = 'send-mail' and data ->> 'id' = ${payload.id}`).length;
    expect(await jobs()).toBe(1);
    await world.moveClock(6 * 60);
    const sweep = async () => requeueMail({ ctx: await ctxWorker(), input: {} });
    await Promise.all([sweep(), sweep()]);
    await sweep();
    expect(await jobs()).toBe(2);
    await world.moveClock(0);
  });
});
