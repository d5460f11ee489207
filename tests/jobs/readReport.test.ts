import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { asc, eq } from 'drizzle-orm';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { laboratory, readingRow, recommendation, report, reportSample } from '@/db/schema';
import { bringBack } from '@/lib/data/reports/bringBack';
import { getReport } from '@/lib/data/reports/getReport';
import { getReportFile } from '@/lib/data/reports/getReportFile';
import { readAgain } from '@/lib/data/reports/readAgain';
import { setAside } from '@/lib/data/reports/setAside';
import { takeByHand } from '@/lib/data/reports/takeByHand';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withSite } from '@/lib/data/transaction';
import type { SheetRows } from '@/lib/jobs/readFile/messages';
import { giveUpReport, type ReadFile, readReportWith } from '@/lib/jobs/readReport/handler';
import { sweepUploads } from '@/lib/jobs/sweepUploads/handler';
import { type Reading, refusedReading } from '@/lib/reading/types';
import { REPORTS } from '../reading/compare';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { calmStore, pdfBytes, problemOf, readResult, readSample, soilReading, tellStore } from '../support/reports';

const world = useWorld();

let here: TestSite;
let north: string;
let south: string;

beforeAll(async () => {
  here = await makeSite('Here');
  north = await makePlot(here.id, { name: 'North bed' });
  south = await makePlot(here.id, { name: 'Bed' });
});
afterEach(calmStore);

const twoSamples = () =>
  soilReading(
    [
      readSample({
        sampleId: 'NORTH BED.',
        labNumber: '4711',
        dateSampled: '2026-04-10',
        dateSampledPrinted: '10 Apr 2026',
        depth: { top: 0, bottom: 6, unit: 'in' },
        results: [
          readResult({ analyte: 'soil_ph_water', printed: '6.3', unit: 'pH' }),
          readResult({ analyte: 'boron', printed: '<0.1', value: 0.1, qualifier: '<', unit: 'mg/kg' }),
        ],
      }),
      readSample({
        sampleId: 'somewhere else',
        labNumber: '4712',
        dateSampled: '2923-04-10',
        results: [readResult({ analyte: 'soil_ph_water', printed: '7.1', unit: 'pH' })],
      }),
    ],
    {
      pages: 3,
      warnings: [{ code: 'odd', sentence: 'A warning.' }],
      recommendations: [
        { sampleId: 'North Bed', item: 'lime', amount: 5, printed: '5 lb', unit: 'lb/1000ft2', page: 1, box: null },
      ],
    },
  );

async function uploaded(plotId?: string): Promise<string> {
  const ctx = await ctxAs(here.people.helper);
  const input = { siteId: here.id, fileName: 'r.pdf', bytes: pdfBytes(), ...(plotId ? { plotId } : {}) };
  return (await uploadReport({ ctx, input })).reportId;
}

const run = async (id: string, readFile: ReadFile) =>
  readReportWith(readFile)({
    ctx: await ctxWorker(),
    payload: { siteId: here.id, id },
    signal: new AbortController().signal,
  });
const giveUp = async (id: string) =>
  giveUpReport({ ctx: await ctxWorker(), payload: { siteId: here.id, id }, signal: new AbortController().signal });
const answering =
  (reading: Reading): ReadFile =>
  () =>
    Promise.resolve(reading);

async function stand(id: string) {
  return withSite(here.id, async (tx) => {
    const [row] = await tx.select().from(report).where(eq(report.id, id));
    const samples = await tx
      .select()
      .from(reportSample)
      .where(eq(reportSample.reportId, id))
      .orderBy(asc(reportSample.ordinal));
    const rows = await tx.select().from(readingRow).where(eq(readingRow.reportId, id)).orderBy(asc(readingRow.ordinal));
    const advice = await tx.select().from(recommendation).where(eq(recommendation.reportId, id));
    if (!row) throw new Error('The report is gone.');
    return { row, samples, rows, advice };
  });
}
const jobsFor = (id: string) =>
  world.owner()`select 1 from queue.job where data ->> 'id' = ${id} and name = 'read-report'`;

describe('reading a workbook', () => {
  const send = async (name: string) => {
    const bytes = new Uint8Array(readFileSync(join(REPORTS, 'sheets', name)));
    return (
      await uploadReport({ ctx: await ctxAs(here.people.helper), input: { siteId: here.id, fileName: name, bytes } })
    ).reportId;
  };
  const read = async (id: string, rows: SheetRows) =>
    readReportWith(answering(twoSamples()), () => Promise.resolve(rows))({
      ctx: await ctxWorker(),
      payload: { siteId: here.id, id },
      signal: new AbortController().signal,
    });
  const cells = async (id: string) =>
    getReportFile({ ctx: await ctxAs(here.people.helper), input: { siteId: here.id, reportId: id, as: 'cells' } });

  it('keeps its cells beside it for the review', async () => {
    const id = await send('hidden-parts.xlsx');
    const sheets = [{ number: 1, name: 'Results', rows: [['pH'], ['6.4']] }];
    await read(id, { ok: true, sheets, remarks: [] });
    const file = await cells(id);
    expect(file.contentType).toBe('application/json');
    expect(JSON.parse(new TextDecoder().decode(file.bytes))).toEqual({ sheets });
    expect((await stand(id)).row.state).toBe('in-review');
  });

  it('goes without them when there are none', async () => {
    const id = await send('days-from-1904.xlsx');
    await read(id, { ok: false, error: { code: 'broken-sheet', sentence: 'It is damaged.' } });
    await expect(cells(id)).rejects.toMatchObject({ code: 'not-found' });
    expect((await stand(id)).row.state).toBe('in-review');
  });
});

describe('reading a report', () => {
  it('writes samples, rows and recommendations, and brings the report to review', async () => {
    const id = await uploaded();
    const seen: unknown[] = [];
    await run(id, async ({ onPage, fileName, bytes }) => {
      expect([fileName, new TextDecoder().decode(bytes).slice(0, 5)]).toEqual(['r.pdf', '%PDF-']);
      onPage?.(2, 3);
      await expect.poll(async () => (await stand(id)).row.pagesRead).toBe(2);
      const { row } = await stand(id);
      seen.push(row.state, row.pages);
      return twoSamples();
    });
    expect(seen).toEqual(['reading', 3]);
    const { row, samples, rows, advice } = await stand(id);
    expect(row).toMatchObject({
      state: 'in-review',
      pages: 3,
      pagesRead: 3,
      laboratoryPrinted: 'Marsh Lane Soil Bench',
    });
    expect(row.warnings).toEqual([{ code: 'odd', sentence: 'A warning.' }]);
    const [lab] = await withSite(here.id, (tx) => tx.select().from(laboratory));
    expect([lab?.name, lab?.id]).toEqual(['Marsh Lane Soil Bench', row.laboratoryId]);
    expect(samples.map((one) => [one.printedName, one.plotId, one.takenOn, one.depthFromCm, one.depthToCm])).toEqual([
      ['NORTH BED.', north, '2026-04-10', '0', '15.24'],
      ['somewhere else', null, null, null, null],
    ]);
    expect(rows.map((one) => [one.analyte, one.printed, one.value, one.qualifier, one.unit, one.state])).toEqual([
      ['soil_ph_water', '6.3', '6.3', '=', 'pH', 'proposed'],
      ['boron', '<0.1', '0.1', '<', 'mg/kg', 'proposed'],
      ['soil_ph_water', '7.1', '7.1', '=', 'pH', 'proposed'],
    ]);
    expect(rows[0]).toMatchObject({ page: 1, box: [0.5, 0.2, 0.55, 0.22], confidence: 0.98 });
    expect(advice.map((one) => [one.item, one.amount, one.reportSampleId])).toEqual([['lime', '5', samples[0]?.id]]);
  });

  it('gives a single sample to the plot the file was dropped on', async () => {
    const id = await uploaded(south);
    const [first] = twoSamples().samples;
    await run(id, answering(soilReading(first ? [first] : [])));
    expect((await stand(id)).samples.map((one) => one.plotId)).toEqual([south]);
  });

  it('numbers two bags of one plot and day that came in one report', async () => {
    const id = await uploaded();
    const bag = (labNumber: string) =>
      readSample({
        sampleId: 'North bed',
        labNumber,
        dateSampled: '2026-04-11',
        results: [readResult({ analyte: 'soil_ph_water', printed: '6.3', unit: 'pH' })],
      });
    await run(id, answering(soilReading([bag('1'), bag('2')])));
    expect((await stand(id)).samples.map((one) => [one.plotId, one.composite])).toEqual([
      [north, 1],
      [north, 2],
    ]);
  });

  it('acts once when the job is delivered twice, at the same time and afterwards', async () => {
    const id = await uploaded();
    let calls = 0;
    const slow: ReadFile = async () => {
      calls += 1;
      return twoSamples();
    };
    await Promise.all([run(id, slow), run(id, slow)]);
    await run(id, slow);
    expect(calls).toBe(1);
    const { samples, rows } = await stand(id);
    expect([samples.length, rows.length]).toEqual([2, 3]);
  });

  it('reads a file again whose worker was killed, and doubles nothing', async () => {
    const id = await uploaded();
    let release: (reading: Reading) => void = () => {};
    let began: () => void = () => {};
    const started = new Promise<void>((resolve) => {
      began = resolve;
    });
    const lost = run(id, () => {
      began();
      return new Promise<Reading>((resolve) => {
        release = resolve;
      });
    });
    await started;
    let early = 0;
    await run(id, async () => {
      early += 1;
      return twoSamples();
    });
    expect(early).toBe(0);
    await world.moveClock(151);
    await run(id, answering(twoSamples()));
    expect((await stand(id)).row.state).toBe('in-review');
    // The first worker was only slow after all: it comes too late to write.
    release(soilReading([readSample({ results: [readResult({ analyte: 'soil_ph_water', printed: '9.9' })] })]));
    await lost;
    const { samples, rows } = await stand(id);
    expect([samples.length, rows.length]).toEqual([2, 3]);
    expect(rows.map((one) => one.printed)).not.toContain('9.9');
    await world.moveClock(0);
  });

  it('leaves a failed try ready for the next one, and says after the last what went wrong', async () => {
    const id = await uploaded();
    const boom: ReadFile = () => Promise.reject(new Error('boom'));
    await expect(run(id, boom)).rejects.toThrow('boom');
    expect((await stand(id)).row.state).toBe('received');
    await expect(run(id, boom)).rejects.toThrow('boom');
    await giveUp(id);
    const { row } = await stand(id);
    expect(row).toMatchObject({ state: 'unreadable', refusalCode: 'reader-failed' });
    expect(row.refusalSentence).toContain('It is kept');
    await giveUp(id);
    expect((await stand(id)).row.version).toBe(row.version);
  });

  it('never parses bytes that are not the ones that were stored', async () => {
    const id = await uploaded();
    await tellStore({ garbage: 1, method: 'GET' });
    let parsed = 0;
    const count: ReadFile = async () => {
      parsed += 1;
      return twoSamples();
    };
    await expect(run(id, count)).rejects.toMatchObject({ reason: 'file-changed' });
    expect(parsed).toBe(0);
    await giveUp(id);
    expect((await stand(id)).row).toMatchObject({ state: 'unreadable', refusalCode: 'file-changed' });
  });

  it('waits for a store that is down and reads when it is back', async () => {
    const id = await uploaded();
    await tellStore({ fail: 10, method: 'GET' });
    await expect(run(id, answering(twoSamples()))).rejects.toMatchObject({ reason: 'file-store' });
    await giveUp(id);
    const said = await getReport({ ctx: await ctxAs(here.people.viewer), input: { siteId: here.id, reportId: id } });
    expect([said.state, said.refusal?.sentence]).toEqual([
      'received',
      expect.stringContaining('once the store is back'),
    ]);
    await calmStore();
    await world.moveClock(181);
    await sweepUploads(await ctxWorker());
    await world.moveClock(0);
    expect(await jobsFor(id)).toHaveLength(2);
    await run(id, answering(twoSamples()));
    expect((await stand(id)).row).toMatchObject({ state: 'in-review', refusalCode: null });
  });

  it.each([
    [
      'refused',
      refusedReading({ file: 'r.pdf', pages: 2, error: { code: 'encrypted', sentence: 'Locked.' } }),
      'unreadable',
      'encrypted',
    ],
    [
      'not soil',
      { ...soilReading([]), kind: 'not-soil' as const, warnings: [{ code: 'tissue', sentence: 'Plant tissue.' }] },
      'not-soil',
      'tissue',
    ],
    ['soil without a row', soilReading([readSample({})]), 'unreadable', 'no-rows'],
  ])('keeps a file that is %s, says why, and lets its numbers be typed in', async (_, reading, state, code) => {
    const id = await uploaded(north);
    await run(id, answering(reading));
    expect((await stand(id)).row).toMatchObject({ state, refusalCode: code });
    expect((await stand(id)).rows).toEqual([]);
    const ctx = await ctxAs(here.people.helper);
    const taken = await takeByHand({ ctx, input: { siteId: here.id, reportId: id } });
    expect(taken.state).toBe('in-review');
    expect((await stand(id)).samples.map((one) => one.plotId)).toEqual([north]);
    expect(await problemOf(takeByHand({ ctx, input: { siteId: here.id, reportId: id } }))).toMatchObject({
      code: 'conflict',
      reason: 'report-in-review',
    });
  });

  it('reads again what gave nothing, when an owner asks for it', async () => {
    const id = await uploaded();
    await run(id, answering(soilReading([])));
    const owner = await ctxAs(here.people.owner);
    await readAgain({ ctx: owner, input: { siteId: here.id, reportId: id } });
    expect(await jobsFor(id)).toHaveLength(2);
    await run(id, answering(twoSamples()));
    expect((await stand(id)).row.state).toBe('in-review');
    const helper = await ctxAs(here.people.helper);
    expect(await problemOf(readAgain({ ctx: helper, input: { siteId: here.id, reportId: id } }))).toMatchObject({
      code: 'forbidden',
    });
  });

  it('sets aside and brings back; a helper takes back only what they sent', async () => {
    const id = await uploaded();
    await run(id, answering(twoSamples()));
    const [owner, helper, adviser] = await Promise.all(
      (['owner', 'helper', 'adviser'] as const).map((role) => ctxAs(here.people[role])),
    );
    if (!owner || !helper || !adviser) throw new Error('A role is missing.');
    const at = { siteId: here.id, reportId: id };
    expect((await setAside({ ctx: helper, input: at })).state).toBe('set-aside');
    expect(await problemOf(bringBack({ ctx: helper, input: at }))).toMatchObject({ code: 'forbidden' });
    expect((await bringBack({ ctx: adviser, input: at })).state).toBe('in-review');
    const mine = await uploadReport({ ctx: owner, input: { siteId: here.id, fileName: 'o.pdf', bytes: pdfBytes() } });
    await run(mine.reportId, answering(soilReading([])));
    const theirs = { siteId: here.id, reportId: mine.reportId };
    expect(await problemOf(setAside({ ctx: helper, input: theirs }))).toMatchObject({ code: 'forbidden' });
    await setAside({ ctx: owner, input: theirs });
    expect((await bringBack({ ctx: owner, input: theirs })).state).toBe('unreadable');
    const water = await uploadReport({ ctx: owner, input: { siteId: here.id, fileName: 'w.pdf', bytes: pdfBytes() } });
    await run(water.reportId, answering(soilReading([], { kind: 'not-soil' })));
    const wet = { siteId: here.id, reportId: water.reportId };
    await setAside({ ctx: owner, input: wet });
    expect((await bringBack({ ctx: owner, input: wet })).state).toBe('not-soil');
  });

  it('[E 45] finds nothing for a forged pair of site and report', async () => {
    const id = await uploaded();
    const other = await makeSite('Elsewhere');
    let calls = 0;
    await readReportWith(async () => {
      calls += 1;
      return twoSamples();
    })({ ctx: await ctxWorker(), payload: { siteId: other.id, id }, signal: new AbortController().signal });
    expect(calls).toBe(0);
    expect((await stand(id)).row.state).toBe('received');
  });
});

describe('the sweep of uploads', () => {
  it('asks again for what has waited three minutes, once', async () => {
    const waiting = await uploaded();
    const hanging = await uploaded();
    void run(hanging, () => new Promise(() => {}));
    await expect.poll(async () => (await stand(hanging)).row.state).toBe('reading');
    await sweepUploads(await ctxWorker());
    expect([await jobsFor(waiting), await jobsFor(hanging)].map((jobs) => jobs.length)).toEqual([1, 1]);
    await world.moveClock(181);
    await Promise.all([sweepUploads(await ctxWorker()), sweepUploads(await ctxWorker())]);
    await sweepUploads(await ctxWorker());
    expect([await jobsFor(waiting), await jobsFor(hanging)].map((jobs) => jobs.length)).toEqual([2, 2]);
    await run(hanging, answering(twoSamples()));
    expect((await stand(hanging)).rows).toHaveLength(3);
    await world.moveClock(0);
  });
});
