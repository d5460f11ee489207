import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { auditEvent, ownSheet, sheetMapping } from '@/db/schema';
import type { Ctx } from '@/lib/data/context';
import { getOwnSheet } from '@/lib/data/ownSheets/getOwnSheet';
import { importOwnSheet } from '@/lib/data/ownSheets/importOwnSheet';
import { mapOwnSheet } from '@/lib/data/ownSheets/mapOwnSheet';
import { getReport } from '@/lib/data/reports/getReport';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { listResults } from '@/lib/data/results/listResults';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { getReview } from '@/lib/data/review/getReview';
import { withSite } from '@/lib/data/transaction';
import { readReportJob } from '@/lib/jobs/readReport/definition';
import type { OwnSheet } from '@/lib/schemas/ownSheets';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { pdfBytes, problemOf, readResult, readSample, soilReading } from '../support/reports';

useWorld();

const SHEET = [
  'Bed,Date,pH,P (ppm),K (ppm),Remarks',
  'North,2019-04-10,6.1,44,150,wet',
  'South,2019-04-11,6.6,61,188,',
  'North,2020-04-12,6.2,47,155,dry',
  'Orchard,2020-04-12,5.9,20,99,',
  'South,,6.7,60,190,no day',
  'North,2021-04-14,73,52,160,slip of the pen',
].join('\n');

type Place = { site: TestSite; owner: Ctx; helper: Ctx; north: string; south: string };

async function place(): Promise<Place> {
  const site = await makeSite();
  const [north, south] = [await makePlot(site.id, { name: 'North' }), await makePlot(site.id, { name: 'South' })];
  return { site, owner: await ctxAs(site.people.owner), helper: await ctxAs(site.people.helper), north, south };
}

let serial = 0;
async function send(
  { site, helper }: Pick<Place, 'site' | 'helper'>,
  text = SHEET,
  name = 'old years.csv',
): Promise<string> {
  serial += 1;
  // Every file is another one: the same bytes would be recognised.
  const bytes = new TextEncoder().encode(`${text}\n${'\n'.repeat(serial)}`);
  const input = { siteId: site.id, fileName: name, bytes, ownSheet: 'true' as const };
  const { reportId } = await uploadReport({ ctx: helper, input });
  const signal = new AbortController().signal;
  await readReportJob.handle({ ctx: await ctxWorker(), payload: { siteId: site.id, id: reportId }, signal });
  return reportId;
}

const look = ({ site, helper }: Pick<Place, 'site' | 'helper'>, reportId: string) =>
  getOwnSheet({ ctx: helper, input: { siteId: site.id, reportId } });

function choice(sheet: OwnSheet) {
  if (!sheet.mapping) throw new Error('Nothing was proposed.');
  const { sheet: number, dateOrder, columns } = sheet.mapping;
  return { sheet: number, dateOrder, columns: columns.map(({ column, meaning }) => ({ column, meaning })) };
}

async function bring(here: Place, reportId: string, ctx = here.owner, over: { version?: number } = {}) {
  const sheet = await look(here, reportId);
  const plots = sheet.names.map(({ name, plotId }) => ({ name, plotId }));
  const input = { siteId: here.site.id, reportId, version: sheet.report.version, ...choice(sheet), plots, ...over };
  return importOwnSheet({ ctx, input });
}

const live = async ({ site, owner }: Place, plotId: string) =>
  (await listResults({ ctx: owner, input: { siteId: site.id, plotId } })).results;

describe('a grower’s own spreadsheet', () => {
  it('is read in the worker, its columns proposed, its rows shown with what is wrong', async () => {
    const here = await place();
    const reportId = await send(here);
    const sheet = await look(here, reportId);
    expect(sheet.report).toMatchObject({ origin: 'own-sheet', state: 'in-review', fileName: 'old years.csv' });
    expect(sheet.mapping?.columns.map((column) => [column.heading, column.meaning.kind])).toEqual([
      ['Bed', 'sample-name'],
      ['Date', 'date-sampled'],
      ['pH', 'result'],
      ['P (ppm)', 'result'],
      ['K (ppm)', 'result'],
      ['Remarks', 'skip'],
    ]);
    expect(sheet.counts).toMatchObject({ rows: 6, samples: 6, results: 18 });
    expect(sheet.names).toEqual([
      { name: 'North', samples: 3, withoutDay: 0, plotId: here.north },
      { name: 'South', samples: 2, withoutDay: 1, plotId: here.south },
      { name: 'Orchard', samples: 1, withoutDay: 0, plotId: null },
    ]);
    expect(sheet.problems.map((problem) => [problem.row, problem.code])).toContainEqual([6, 'date-missing']);
    expect(sheet.samples[5]?.results[0]).toMatchObject({ printed: '73', impossible: expect.stringContaining('14') });
  });

  it('becomes results in one go: typed by the grower, without laboratory, what cannot stand left out with its reason', async () => {
    const here = await place();
    const reportId = await send(here);
    const done = await bring(here, reportId);
    expect(done).toMatchObject({ state: 'confirmed', samples: 4, results: 11, known: 0, leftOut: 2 });
    const north = await live(here, here.north);
    expect(north.map((one) => `${one.takenOn} ${one.analyte} ${one.printed}`).sort()).toEqual([
      '2019-04-10 phosphorus 44',
      '2019-04-10 potassium 150',
      '2019-04-10 soil_ph_water 6.1',
      '2020-04-12 phosphorus 47',
      '2020-04-12 potassium 155',
      '2020-04-12 soil_ph_water 6.2',
      '2021-04-14 phosphorus 52',
      '2021-04-14 potassium 160',
    ]);
    expect(north.every((one) => one.laboratory === null && one.reportId === reportId)).toBe(true);
    expect(await live(here, here.south)).toHaveLength(3);
    const review = await getReview({ ctx: here.owner, input: { siteId: here.site.id, reportId } });
    expect(review.report).toMatchObject({ origin: 'own-sheet', state: 'confirmed' });
    expect(review.samples.map((one) => one.leftOutReason).filter((reason) => reason !== null)).toEqual([
      'No plot was chosen for it.',
      'The spreadsheet gives no day for it.',
    ]);
    expect(review.rows.flatMap((row) => row.doubts.map((doubt) => doubt.code))).toEqual(['implausible']);
    expect(review.rows.filter((row) => row.state === 'removed').map((row) => row.printed)).toEqual(['73']);
  });

  it('is undone by a withdrawal and can be brought in again', async () => {
    const here = await place();
    const reportId = await send(here);
    await bring(here, reportId);
    const input = { siteId: here.site.id, reportId, reason: 'The wrong file.' };
    await withdrawReport({ ctx: here.owner, input });
    expect(await live(here, here.north)).toEqual([]);
    expect((await look(here, reportId)).report.state).toBe('in-review');
    expect((await look(here, reportId)).names.map((one) => one.plotId)).toEqual([here.north, here.south, null]);
    expect(await bring(here, reportId)).toMatchObject({ results: 11 });
    expect(await live(here, here.north)).toHaveLength(8);
  });

  it('asks for no plot twice when it was taken back', async () => {
    const here = await place();
    const reportId = await send(here);
    const sheet = await look(here, reportId);
    const plots = [{ name: 'Orchard', plotId: here.south }];
    const at = { siteId: here.site.id, reportId };
    await importOwnSheet({ ctx: here.owner, input: { ...at, version: sheet.report.version, ...choice(sheet), plots } });
    await withdrawReport({ ctx: here.owner, input: { ...at, reason: 'Once more.' } });
    const again = await look(here, reportId);
    expect(again.names.find((one) => one.name === 'Orchard')?.plotId).toBe(here.south);
  });

  it('is brought in once by a double click, and not by somebody who sees an old state', async () => {
    const here = await place();
    const reportId = await send(here);
    const both = await Promise.allSettled([bring(here, reportId), bring(here, reportId)]);
    expect(both.map((one) => one.status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await live(here, here.north)).toHaveLength(8);
    const other = await send(here, SHEET.replaceAll('20', '18'));
    const stale = await problemOf(bring(here, other, here.owner, { version: 99 }));
    expect(stale).toMatchObject({ code: 'conflict', reason: 'stale-version' });
  });

  it('does not count again what a laboratory’s report already says', async () => {
    const here = await place();
    const at = { siteId: here.site.id };
    const { reportId } = await uploadReport({
      ctx: here.helper,
      input: { ...at, fileName: 'r.pdf', bytes: pdfBytes() },
    });
    const worker = await ctxWorker();
    const task = await startReading({ ctx: worker, input: { ...at, id: reportId } });
    if (!task) throw new Error('The report could not be taken.');
    const results = [
      readResult({ analyte: 'soil_ph_water', printed: '6.1', unit: 'pH' }),
      readResult({ analyte: 'phosphorus', printed: '44', unit: 'mg/kg', method: 'M3' }),
    ];
    const sample = readSample({ sampleId: 'North', dateSampled: '2019-04-10', results });
    await saveReading({ ctx: worker, input: { lease: task.lease, reading: soilReading([sample]) } });
    await confirmReport({ ctx: here.owner, input: { ...at, reportId } });

    const own = await send(here);
    expect(await bring(here, own)).toMatchObject({ samples: 3, results: 8, known: 1, leftOut: 2 });
    const first = (await live(here, here.north)).filter((one) => one.takenOn === '2019-04-10');
    expect(first.map((one) => one.reportId)).toEqual([reportId, reportId]);
    const refused = withdrawReport({ ctx: here.owner, input: { ...at, reportId, reason: 'Wrong.' } });
    expect((await problemOf(refused)).reason).toBe('same-as-leans');
  });

  it('remembers how its columns were read, for this site and these headings', async () => {
    const [here, there] = [await place(), await place()];
    const first = await send(here);
    const sheet = await look(here, first);
    const picked = choice(sheet);
    const columns = picked.columns.map((one) =>
      one.column === 4
        ? {
            ...one,
            meaning: {
              kind: 'result' as const,
              analyte: 'phosphorus' as const,
              unit: 'mg/kg',
              form: 'P2O5' as const,
              method: 'Olsen',
            },
          }
        : one,
    );
    const mapped = await mapOwnSheet({
      ctx: here.helper,
      input: { siteId: here.site.id, reportId: first, ...picked, columns },
    });
    expect(mapped.samples[0]?.results[1]).toMatchObject({ analyte: 'phosphorus', form: 'P2O5', method: 'Olsen' });
    expect((await look(here, first)).samples[0]?.results[1]).toMatchObject({ form: 'P2O5' });
    await bring(here, first);
    const next = await look(here, await send(here, SHEET.replaceAll('-04-', '-10-')));
    expect(next.rememberedOn).not.toBeNull();
    expect(next.mapping?.columns[3]?.meaning).toMatchObject({ form: 'P2O5', method: 'Olsen' });
    const elsewhere = await look(there, await send(there));
    expect(elsewhere.rememberedOn).toBeNull();
    expect(elsewhere.mapping?.columns[3]?.meaning).toMatchObject({ form: 'element', method: null });
    for (const table of [ownSheet, sheetMapping]) {
      const rows = await withSite(there.site.id, (tx) => tx.select({ siteId: table.siteId }).from(table));
      expect(rows.every((row) => row.siteId === there.site.id)).toBe(true);
    }
  });

  it('lets a helper map it and only those who decide bring it in; a stranger finds nothing', async () => {
    const here = await place();
    const elsewhere = await place();
    const reportId = await send(here);
    expect((await problemOf(bring(here, reportId, here.helper))).code).toBe('forbidden');
    const viewer = await ctxAs(here.site.people.viewer);
    const input = { siteId: here.site.id, reportId };
    expect((await problemOf(getOwnSheet({ ctx: viewer, input }))).code).toBe('forbidden');
    expect((await problemOf(getOwnSheet({ ctx: elsewhere.owner, input }))).code).toBe('not-found');
    const under = { siteId: elsewhere.site.id, reportId };
    expect((await problemOf(getOwnSheet({ ctx: elsewhere.owner, input: under }))).code).toBe('not-found');
    const sheet = await look(here, reportId);
    const foreign = importOwnSheet({
      ctx: here.owner,
      input: {
        ...input,
        version: sheet.report.version,
        ...choice(sheet),
        plots: [{ name: 'North', plotId: elsewhere.north }],
      },
    });
    expect((await problemOf(foreign)).code).toBe('not-found');
    expect((await look(here, reportId)).report.state).toBe('in-review');
    const trail = await withSite(here.site.id, (tx) =>
      tx.select().from(auditEvent).where(eq(auditEvent.act, 'sheet.import')),
    );
    expect(trail).toEqual([]);
  });

  it('keeps a file that is no sheet of results, with a sentence', async () => {
    const here = await place();
    const reportId = await send(here, 'Shopping,Price\nbread,2\n');
    const report = await getReport({ ctx: here.owner, input: { siteId: here.site.id, reportId } });
    expect(report).toMatchObject({ state: 'unreadable', refusal: { code: 'no-results' } });
    const pdf = await send(here, '%PDF-1.4\n%%EOF', 'old.pdf');
    const refused = await getReport({ ctx: here.owner, input: { siteId: here.site.id, reportId: pdf } });
    expect(refused).toMatchObject({ state: 'unreadable', refusal: { code: 'not-a-sheet' } });
  });

  it('takes a name that runs over two lines in its cell for one line', async () => {
    const here = await place();
    const reportId = await send(here, 'Bed,Date,pH\n"North\nbed\u202e",2019-04-10,6.1');
    expect((await look(here, reportId)).names.map((one) => one.name)).toEqual(['North bed']);
    const sheet = await look(here, reportId);
    const plots = [{ name: 'North bed', plotId: here.north }];
    const input = { siteId: here.site.id, reportId, version: sheet.report.version, ...choice(sheet), plots };
    expect(await importOwnSheet({ ctx: here.owner, input })).toMatchObject({ results: 1 });
  });

  it('says how many samples are taken at once, and imports none of more', async () => {
    const here = await place();
    const lines = Array.from({ length: 1001 }, (_, at) => `North,${2019 + (at % 5)}-04-10,6.${at % 9}`);
    const reportId = await send(here, ['Bed,Date,pH', ...lines].join('\n'));
    expect(await problemOf(bring(here, reportId))).toMatchObject({ code: 'too-large', reason: 'too-many-samples' });
    expect((await look(here, reportId)).report.state).toBe('in-review');
  });

  it('imports nothing at all when no name has a plot', async () => {
    const here = await place();
    const reportId = await send(here);
    const sheet = await look(here, reportId);
    const input = { siteId: here.site.id, reportId, version: sheet.report.version, ...choice(sheet), plots: [] };
    expect((await problemOf(importOwnSheet({ ctx: here.owner, input }))).reason).toBe('nothing-to-import');
    expect((await look(here, reportId)).report.state).toBe('in-review');
  });
});
