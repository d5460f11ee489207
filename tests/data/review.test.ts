import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { plot, result, sample } from '@/db/schema';
import type { Ctx } from '@/lib/data/context';
import { listPlots } from '@/lib/data/plots/listPlots';
import { saveReading } from '@/lib/data/reports/saveReading';
import { setAside } from '@/lib/data/reports/setAside';
import { setLaboratory } from '@/lib/data/reports/setLaboratory';
import { startReading } from '@/lib/data/reports/startReading';
import { typeReport } from '@/lib/data/reports/typeReport';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { correctResult } from '@/lib/data/results/correctResult';
import { latestResults } from '@/lib/data/results/latestResults';
import { listResults } from '@/lib/data/results/listResults';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { acceptRow } from '@/lib/data/review/acceptRow';
import { addRow } from '@/lib/data/review/addRow';
import { addSample } from '@/lib/data/review/addSample';
import { editRow } from '@/lib/data/review/editRow';
import { editRows } from '@/lib/data/review/editRows';
import { getReview } from '@/lib/data/review/getReview';
import { removeRow } from '@/lib/data/review/removeRow';
import { restoreRow } from '@/lib/data/review/restoreRow';
import { setSameAs } from '@/lib/data/review/setSameAs';
import { setSample } from '@/lib/data/review/setSample';
import { withSite } from '@/lib/data/transaction';
import type { ReadSample } from '@/lib/reading/types';
import type { Review, ReviewRow } from '@/lib/schemas/review';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { pdfBytes, problemOf, readResult, readSample, soilReading } from '../support/reports';

const world = useWorld();

let here: TestSite;
let there: TestSite;
let owner: Ctx;
let adviser: Ctx;
let helper: Ctx;

beforeAll(async () => {
  here = await makeSite('Here');
  there = await makeSite('There');
  [owner, adviser, helper] = await Promise.all([
    ctxAs(here.people.owner),
    ctxAs(here.people.adviser),
    ctxAs(here.people.helper),
  ]);
});

const PH = readResult({ analyte: 'soil_ph_water', printed: '6.3', unit: 'pH', method: '1:1_water' });
const P = readResult({ analyte: 'phosphorus', printed: '52', unit: 'mg/kg', method: 'M3' });
const B = readResult({ analyte: 'boron', printed: '<0.1', value: 0.1, qualifier: '<', unit: 'mg/kg' });

/** A report in review, through upload and reading as the worker does it. */
async function reading(samples: readonly ReadSample[], fileName = 'r.pdf'): Promise<string> {
  const { reportId } = await uploadReport({ ctx: helper, input: { siteId: here.id, fileName, bytes: pdfBytes() } });
  const ctx = await ctxWorker();
  const task = await startReading({ ctx, input: { siteId: here.id, id: reportId } });
  if (!task) throw new Error('The report could not be taken.');
  await saveReading({ ctx, input: { lease: task.lease, reading: soilReading(samples) } });
  return reportId;
}

const review = (reportId: string): Promise<Review> => getReview({ ctx: owner, input: { siteId: here.id, reportId } });
const confirm = (reportId: string, ctx = owner, separateAnalyses: string[] = []) =>
  confirmReport({ ctx, input: { siteId: here.id, reportId, separateAnalyses } });
const live = async (plotId: string) => (await listResults({ ctx: owner, input: { siteId: here.id, plotId } })).results;

function only<T>(items: readonly T[]): T {
  const [item] = items;
  if (item === undefined || items.length !== 1) throw new Error(`Expected one, found ${items.length}.`);
  return item;
}
const at = (row: ReviewRow, reportId: string) => ({ siteId: here.id, reportId, rowId: row.id, version: row.version });

let serial = 0;
/** A plot of its own and a report with one sample of it, ready to confirm. */
async function ready(over: Partial<ReadSample> = {}, fileName?: string) {
  serial += 1;
  const name = `Strip ${serial} end`;
  const plotId = await makePlot(here.id, { name });
  const one = readSample({
    sampleId: name,
    labNumber: `L-${serial}`,
    dateSampled: '2026-04-10',
    depth: { top: 0, bottom: 15, unit: 'cm' },
    results: [PH, P, B],
    ...over,
  });
  return { plotId, one, reportId: await reading([one], fileName) };
}

describe('the review', () => {
  it('shows doubtful rows first, with plots, laboratories and what is missing', async () => {
    const { reportId, plotId } = await ready({
      dateSampled: null,
      results: [PH, { ...P, confidence: 0.6 }, { ...B, doubts: [{ code: 'unit-missing', sentence: 'No unit.' }] }],
    });
    const seen = await review(reportId);
    expect(seen.rows.map((row) => [row.analyte, row.doubtful])).toEqual([
      ['phosphorus', true],
      ['boron', true],
      ['soil_ph_water', false],
    ]);
    expect(only(seen.samples)).toMatchObject({ plotId, takenOn: null, version: 1 });
    expect(seen.plots.map((one) => one.id)).toContain(plotId);
    expect(seen.laboratories.map((one) => one.name)).toContain('Marsh Lane Soil Bench');
    expect(seen.blockers.map((one) => one.code)).toEqual(['no-day']);
  });

  it('keeps what the page says beside an edit, and answers a stale edit with both values', async () => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'soil_ph_water'));
    const edited = await editRow({ ctx: helper, input: { ...at(row, reportId), value: '6,8' } });
    expect(edited).toMatchObject({
      printed: '6,8',
      value: '6.8',
      state: 'edited',
      version: 2,
      editedBy: here.people.helper.name,
      original: { printed: '6.3', value: '6.3', analyte: 'soil_ph_water' },
    });
    const stale = await problemOf(editRow({ ctx: owner, input: { ...at(row, reportId), value: '6.4' } }));
    expect(stale).toMatchObject({ code: 'conflict', reason: 'stale-version', current: edited });
    const again = await editRow({ ctx: owner, input: { ...at(edited, reportId), value: '<6.9' } });
    expect(again).toMatchObject({ value: '6.9', qualifier: '<', original: { printed: '6.3' } });
  });

  it('takes the page’s own characters back as the page meant them', async () => {
    const { reportId } = await ready({ results: [{ ...P, printed: '1,934', value: 1934 }] });
    const row = only((await review(reportId)).rows);
    const edited = await editRow({ ctx: helper, input: { ...at(row, reportId), value: '19' } });
    expect(edited).toMatchObject({ value: '19', state: 'edited' });
    const undone = await editRow({ ctx: helper, input: { ...at(edited, reportId), value: '1,934' } });
    expect(undone).toMatchObject({ value: '1934', printed: '1,934', state: 'proposed', original: null, version: 3 });
  });

  it('lets one of two edits at the same moment win', async () => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'phosphorus'));
    const both = await Promise.allSettled([
      editRow({ ctx: owner, input: { ...at(row, reportId), value: '53' } }),
      editRow({ ctx: helper, input: { ...at(row, reportId), value: '54' } }),
    ]);
    const won = both.find((one) => one.status === 'fulfilled');
    const lost = both.find((one) => one.status === 'rejected');
    expect(lost?.reason).toMatchObject({ code: 'conflict', current: won?.value });
  });

  it.each([
    ['63', 'scale ends at 14'],
    ['-1', 'cannot be below 0'],
    ['abc', 'not a value'],
    ['1,500', 'two ways'],
  ])('refuses the impossible pH %s with a sentence, and keeps the old one', async (value, words) => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'soil_ph_water'));
    const problem = await problemOf(editRow({ ctx: helper, input: { ...at(row, reportId), value } }));
    expect(problem.code).toBe('invalid');
    expect(problem.fields?.value).toContain(words);
    const after = only((await review(reportId)).rows.filter((one) => one.id === row.id));
    expect([after.printed, after.version]).toEqual(['6.3', 1]);
  });

  it('points out an odd value without refusing it, until somebody says it is right', async () => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'soil_ph_water'));
    const odd = await editRow({ ctx: helper, input: { ...at(row, reportId), value: '12.9' } });
    expect(odd.doubts.map((one) => one.code)).toEqual(['implausible']);
    expect(odd.doubtful).toBe(true);
    const right = await acceptRow({ ctx: helper, input: at(odd, reportId) });
    expect([right.doubts, right.doubtful, right.value]).toEqual([[], false, '12.9']);
  });

  it('saves a paste row by row: good ones stand, stale and impossible ones say why', async () => {
    const { reportId } = await ready();
    const { rows } = await review(reportId);
    const [first, second, third] = rows;
    if (!first || !second || !third) throw new Error('Three rows were expected.');
    const moved = await editRow({ ctx: owner, input: { ...at(second, reportId), value: '77' } });
    const { outcomes } = await editRows({
      ctx: helper,
      input: {
        siteId: here.id,
        reportId,
        edits: [
          { rowId: first.id, version: first.version, value: '7.0' },
          { rowId: second.id, version: second.version, value: '78' },
          { rowId: third.id, version: third.version, value: '-3' },
        ],
      },
    });
    expect(outcomes.map((one) => [one.rowId, one.outcome.kind])).toEqual([
      [first.id, 'saved'],
      [second.id, 'stale'],
      [third.id, 'refused'],
    ]);
    expect(outcomes[1]?.outcome).toMatchObject({ current: moved });
    const after = new Map((await review(reportId)).rows.map((row) => [row.id, row.printed]));
    expect([after.get(first.id), after.get(second.id), after.get(third.id)]).toEqual(['7.0', '77', third.printed]);
  });

  it('adds, removes and brings back rows', async () => {
    const { reportId } = await ready();
    const before = await review(reportId);
    const reportSampleId = only(before.samples).id;
    const added = await addRow({
      ctx: helper,
      input: { siteId: here.id, reportId, reportSampleId, analyte: 'zinc', value: '3.1', unit: 'mg/kg' },
    });
    expect(added).toMatchObject({ state: 'added', original: null, value: '3.1', page: null });
    const gone = await removeRow({ ctx: helper, input: at(added, reportId) });
    expect(gone.state).toBe('removed');
    expect(await problemOf(editRow({ ctx: helper, input: { ...at(gone, reportId), value: '1' } }))).toMatchObject({
      reason: 'row-removed',
    });
    expect((await restoreRow({ ctx: helper, input: at(gone, reportId) })).state).toBe('added');
    const ph = only(before.rows.filter((row) => row.analyte === 'soil_ph_water'));
    const away = await removeRow({ ctx: helper, input: at(ph, reportId) });
    expect((await review(reportId)).rows.at(-1)?.id).toBe(ph.id);
    expect((await restoreRow({ ctx: helper, input: at(away, reportId) })).state).toBe('proposed');
  });

  it('assigns a sample against its version, within the calendar and this site', async () => {
    const { reportId, plotId } = await ready();
    const one = only((await review(reportId)).samples);
    const input = { siteId: here.id, reportId, reportSampleId: one.id, version: one.version };
    const set = await setSample({
      ctx: helper,
      input: { ...input, plotId, takenOn: '2026-04-12', depthToCm: 20, cores: 12, composite: 2 },
    });
    expect(set).toMatchObject({ takenOn: '2026-04-12', depthFromCm: '0', depthToCm: '20', cores: 12, composite: 2 });
    expect(await problemOf(setSample({ ctx: owner, input: { ...input, cores: 3 } }))).toMatchObject({
      reason: 'stale-version',
      current: set,
    });
    const next = { ...input, version: set.version };
    for (const takenOn of ['1949-12-31', '2026-02-30', '2999-01-01']) {
      expect((await problemOf(setSample({ ctx: helper, input: { ...next, takenOn } }))).code).toBe('invalid');
    }
    expect((await problemOf(setSample({ ctx: helper, input: { ...next, depthFromCm: 30 } }))).code).toBe('invalid');
    const foreign = await makePlot(there.id);
    expect((await problemOf(setSample({ ctx: helper, input: { ...next, plotId: foreign } }))).code).toBe('not-found');
  });

  it('ties row, sample and report together and keeps other sites and viewers out', async () => {
    const [one, two] = [await ready(), await ready()];
    const row = (await review(two.reportId)).rows[0];
    if (!row) throw new Error('A row was expected.');
    const crossed = { ...at(row, one.reportId), value: '5' };
    expect((await problemOf(editRow({ ctx: owner, input: crossed }))).code).toBe('not-found');
    const batch = { siteId: here.id, reportId: one.reportId, edits: [{ rowId: row.id, version: 1, value: '5' }] };
    expect((await problemOf(editRows({ ctx: owner, input: batch }))).code).toBe('not-found');
    const stranger = await ctxAs(there.people.owner);
    const elsewhere = { siteId: there.id, reportId: one.reportId };
    expect((await problemOf(getReview({ ctx: stranger, input: elsewhere }))).code).toBe('not-found');
    expect((await problemOf(confirmReport({ ctx: stranger, input: elsewhere }))).code).toBe('not-found');
    const viewer = await ctxAs(here.people.viewer);
    const mine = { siteId: here.id, reportId: one.reportId };
    expect((await problemOf(getReview({ ctx: viewer, input: mine }))).code).toBe('forbidden');
    expect((await problemOf(confirmReport({ ctx: helper, input: mine }))).code).toBe('forbidden');
  });

  it('sets the laboratory by choice or by a new name', async () => {
    const { reportId } = await ready();
    const { report } = await review(reportId);
    const input = { siteId: here.id, reportId, version: report.version, laboratoryName: 'Chalk Hill Analysis' };
    const set = await setLaboratory({ ctx: helper, input });
    expect((await review(reportId)).report.laboratory?.name).toBe('Chalk Hill Analysis');
    expect(await problemOf(setLaboratory({ ctx: helper, input }))).toMatchObject({ reason: 'stale-version' });
    expect(set.version).toBe(report.version + 1);
  });
});

describe('confirming', () => {
  it('makes results with basis, limit and place, shows them on the plot, and asks for the effects again', async () => {
    const { reportId, plotId } = await ready({
      results: [
        PH,
        P,
        B,
        readResult({ analyte: 'calcium', printed: '2.1', unit: 'g/kg' }),
        readResult({ analyte: 'potassium', printed: '300', unit: 'lb/acre' }),
      ],
    });
    const before = await listPlots({ ctx: owner, input: { siteId: here.id } });
    expect(before.plots.find((one) => one.id === plotId)?.lastTest).toBeNull();
    const done = await confirm(reportId);
    expect(done).toEqual({ reportId, state: 'confirmed', results: 5, plotIds: [plotId] });
    const results = await live(plotId);
    const facts = results.map((one) => [one.analyte, one.value, one.qualifier, one.unitBasis, one.valueSi]);
    expect(new Set(facts.map((fact) => fact.join(' ')))).toEqual(
      new Set([
        'soil_ph_water 6.3 = index ',
        'phosphorus 52 = mass 52',
        'boron 0.1 < mass 0.1',
        'calcium 2.1 = mass 2100',
        'potassium 300 = area ',
      ]),
    );
    expect(results[0]).toMatchObject({
      takenOn: '2026-04-10',
      depthToCm: '15',
      analysis: 1,
      composite: 1,
      confirmedBy: here.people.owner.name,
    });
    const after = await listPlots({ ctx: owner, input: { siteId: here.id } });
    expect(after.plots.find((one) => one.id === plotId)?.lastTest).toEqual({
      takenOn: '2026-04-10',
      ph: { takenOn: '2026-04-10', value: '6.3', printed: '6.3' },
    });
    const jobs =
      await world.owner()`select 1 from queue.job where name = 'recheck-effects' and data ->> 'id' = ${plotId}`;
    expect(jobs).toHaveLength(1);
  });

  it('lets one of two people win and tells the other who did', async () => {
    const { reportId, plotId } = await ready();
    const both = await Promise.allSettled([confirm(reportId, owner), confirm(reportId, adviser)]);
    const won = both.findIndex((one) => one.status === 'fulfilled');
    const lost = both.find((one) => one.status === 'rejected');
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    const winner = won === 0 ? here.people.owner.name : here.people.adviser.name;
    expect(lost?.reason).toMatchObject({ code: 'conflict', reason: 'report-confirmed' });
    expect(lost?.reason.sentence).toContain(`already confirmed by ${winner}`);
    expect(await live(plotId)).toHaveLength(3);
  });

  it('waits for nothing half done: a report with open questions stays in review', async () => {
    const plotId = await makePlot(here.id, { name: 'Blocked bed' });
    const day = { dateSampled: '2026-05-01' };
    const reportId = await reading([
      readSample({
        sampleId: 'Blocked bed',
        ...day,
        results: [PH, readResult({ analyte: 'buffer_ph', printed: '68', unit: 'pH' })],
      }),
      readSample({ sampleId: 'nowhere', ...day, results: [PH] }),
    ]);
    const blocked = await problemOf(confirm(reportId));
    expect(blocked).toMatchObject({ code: 'conflict', reason: 'blocked' });
    const codes = (await review(reportId)).blockers.map((one) => one.code);
    expect(codes.sort()).toEqual(['impossible', 'no-plot']);
    expect((await review(reportId)).report.state).toBe('in-review');
    expect(await live(plotId)).toEqual([]);

    const seen = await review(reportId);
    const odd = only(seen.rows.filter((row) => row.impossible !== null));
    await editRow({ ctx: helper, input: { ...at(odd, reportId), value: '6.8' } });
    const lost = only(seen.samples.filter((one) => one.plotId === null));
    const out = { siteId: here.id, reportId, reportSampleId: lost.id, version: lost.version };
    await setSample({ ctx: helper, input: { ...out, leftOutReason: 'A neighbour’s bag' } });
    expect((await confirm(reportId)).results).toBe(2);
  });

  it('names the same value twice, a row without an analyte and a row without a value', async () => {
    const { reportId } = await ready({ results: [PH, { ...PH, printed: '6.4', value: 6.4 }] });
    const { samples } = await review(reportId);
    const input = { siteId: here.id, reportId, reportSampleId: only(samples).id };
    await addRow({ ctx: helper, input });
    await addRow({ ctx: helper, input: { ...input, analyte: 'zinc' } });
    expect((await review(reportId)).blockers.map((one) => one.code).sort()).toEqual([
      'no-analyte',
      'no-value',
      'twice',
    ]);
  });

  it('closes a confirmed review to edits', async () => {
    const { reportId } = await ready();
    const row = (await review(reportId)).rows[0];
    if (!row) throw new Error('A row was expected.');
    await confirm(reportId);
    expect(await problemOf(editRow({ ctx: owner, input: { ...at(row, reportId), value: '5' } }))).toMatchObject({
      code: 'conflict',
      reason: 'report-confirmed',
    });
    expect((await problemOf(setAside({ ctx: owner, input: { siteId: here.id, reportId } }))).reason).toBe(
      'report-confirmed',
    );
  });

  it('counts a second analysis of a bag as one of its own, on the same bag', async () => {
    const { reportId, plotId, one } = await ready();
    await confirm(reportId);
    const second = await reading([{ ...one, labNumber: 'L-other', results: [{ ...PH, printed: '6.5', value: 6.5 }] }]);
    await confirm(second);
    const results = (await live(plotId)).filter((each) => each.analyte === 'soil_ph_water');
    expect(results.map((each) => [each.analysis, each.value])).toEqual([
      [1, '6.3'],
      [2, '6.5'],
    ]);
    expect(new Set(results.map((each) => each.sampleId)).size).toBe(1);
  });

  it('makes one bag of two reports confirmed at the same moment', async () => {
    const { reportId, plotId, one } = await ready();
    const second = await reading([{ ...one, labNumber: 'L-two', results: [{ ...PH, printed: '7.9', value: 7.9 }] }]);
    await Promise.all([confirm(reportId), confirm(second, adviser)]);
    const bags = await withSite(here.id, (tx) => tx.select().from(sample).where(eq(sample.plotId, plotId)));
    expect(bags).toHaveLength(1);
    const ph = (await live(plotId)).filter((each) => each.analyte === 'soil_ph_water');
    expect(ph.map((each) => each.analysis).sort()).toEqual([1, 2]);
  });
});

describe('one analysis in two forms', () => {
  it('lets go of a report that is set aside, so that the other form stands for itself', async () => {
    const { reportId, plotId, one } = await ready();
    const copy = await reading([one]);
    const mine = only((await review(copy)).samples);
    const twin = only(mine.candidates);
    const input = { siteId: here.id, reportId: copy, reportSampleId: mine.id, version: mine.version };
    await setSameAs({ ctx: helper, input: { ...input, sameAsId: twin.reportSampleId } });
    await setAside({ ctx: owner, input: { siteId: here.id, reportId } });
    expect(only((await review(copy)).samples).sameAsId).toBeNull();
    expect((await confirm(copy)).results).toBe(3);
    expect(await live(plotId)).toHaveLength(3);
  });

  it('does not ask when most numbers differ', async () => {
    const { reportId, one } = await ready();
    await confirm(reportId);
    const other = await reading([
      {
        ...one,
        results: [
          { ...PH, printed: '7.7', value: 7.7 },
          { ...P, printed: '12', value: 12 },
        ],
      },
    ]);
    const seen = await review(other);
    expect(only(seen.samples).candidates).toEqual([]);
    expect(seen.blockers).toEqual([]);
  });

  it('compares cell by cell, ties to the same bag and yields no results', async () => {
    const four = [
      PH,
      P,
      B,
      readResult({ analyte: 'zinc', printed: '3', unit: 'mg/kg' }),
      readResult({ analyte: 'copper', printed: '2', unit: 'mg/kg' }),
    ];
    const { reportId, plotId, one } = await ready({ results: four }, 'page.pdf');
    const csv = await reading(
      [{ ...one, results: four.map((row) => (row.analyte === 'copper' ? { ...row, printed: '3', value: 3 } : row)) }],
      'data.csv.pdf',
    );
    const mine = only((await review(csv)).samples);
    const twin = only(mine.candidates);
    expect(twin).toMatchObject({ reportId, reportState: 'in-review', shared: 5, equal: 4 });
    expect(twin.differences.map((cell) => [cell.analyte, cell.here, cell.there])).toEqual([['copper', '3', '2']]);
    const input = { siteId: here.id, reportId: csv, reportSampleId: mine.id, version: mine.version };
    const marked = await setSameAs({ ctx: helper, input: { ...input, sameAsId: twin.reportSampleId } });
    expect(marked.sameAsId).toBe(twin.reportSampleId);
    expect(await problemOf(confirm(csv))).toMatchObject({ reason: 'blocked' });
    const chain = only((await review(reportId)).samples);
    const back = { siteId: here.id, reportId, reportSampleId: chain.id, version: chain.version, sameAsId: mine.id };
    expect(await problemOf(setSameAs({ ctx: helper, input: back }))).toMatchObject({ reason: 'same-as-chain' });

    await confirm(reportId);
    expect((await confirm(csv)).results).toBe(0);
    expect(await live(plotId)).toHaveLength(5);
    const leaning = withdrawReport({ ctx: owner, input: { siteId: here.id, reportId, reason: 'wrong plot' } });
    expect(await problemOf(leaning)).toMatchObject({ reason: 'same-as-leans' });
    await withdrawReport({ ctx: owner, input: { siteId: here.id, reportId: csv, reason: 'not needed' } });
    await withdrawReport({ ctx: owner, input: { siteId: here.id, reportId, reason: 'wrong plot' } });
    expect(await live(plotId)).toEqual([]);
  });

  it('asks before the same numbers count twice, also when page and file are confirmed at the same moment', async () => {
    const { reportId, plotId, one } = await ready();
    const copy = await reading([one]);
    const both = await Promise.allSettled([confirm(reportId), confirm(copy, adviser)]);
    expect(both.filter((each) => each.status === 'fulfilled')).toHaveLength(1);
    const lost = both.find((each) => each.status === 'rejected');
    expect(lost?.reason).toMatchObject({ reason: 'blocked', current: { blockers: [{ code: 'same-analysis' }] } });
    expect(await live(plotId)).toHaveLength(3);
    const open = both[0]?.status === 'rejected' ? reportId : copy;
    const mine = only((await review(open)).samples);
    await confirm(open, owner, [mine.id]);
    expect((await live(plotId)).map((each) => each.analysis).sort()).toEqual([1, 1, 1, 2, 2, 2]);
  });
});

describe('withdrawing and correcting', () => {
  it('supersedes the results with the reason, keeps rows and edits, and confirms again after mending', async () => {
    const { reportId, plotId } = await ready();
    const ph = only((await review(reportId)).rows.filter((row) => row.analyte === 'soil_ph_water'));
    await editRow({ ctx: helper, input: { ...at(ph, reportId), value: '6.6' } });
    await confirm(reportId);
    const at2 = { siteId: here.id, reportId };
    expect((await problemOf(withdrawReport({ ctx: helper, input: { ...at2, reason: 'x' } }))).code).toBe('forbidden');
    expect((await problemOf(withdrawReport({ ctx: owner, input: { ...at2, reason: ' ' } }))).code).toBe('invalid');
    const back = await withdrawReport({ ctx: owner, input: { ...at2, reason: 'Wrong day' } });
    expect(back.state).toBe('in-review');
    expect(await live(plotId)).toEqual([]);
    const old = await withSite(here.id, (tx) => tx.select().from(result).where(eq(result.reportId, reportId)));
    expect(old.map((row) => row.supersededReason)).toEqual(['Wrong day', 'Wrong day', 'Wrong day']);
    const seen = await review(reportId);
    expect(seen.rows.find((row) => row.id === ph.id)).toMatchObject({ value: '6.6', original: { value: '6.3' } });
    const one = only(seen.samples);
    await setSample({
      ctx: owner,
      input: { ...at2, reportSampleId: one.id, version: one.version, takenOn: '2026-04-20' },
    });
    await confirm(reportId, adviser);
    expect((await live(plotId)).map((row) => row.takenOn)).toEqual(['2026-04-20', '2026-04-20', '2026-04-20']);
    const bags = await withSite(here.id, (tx) => tx.select().from(sample).where(eq(sample.plotId, plotId)));
    expect(bags.map((bag) => bag.takenOn)).toEqual(['2026-04-20']);
    expect(
      (await problemOf(withdrawReport({ ctx: owner, input: { ...at2, reportId: one.id, reason: 'x' } }))).code,
    ).toBe('not-found');
  });

  it('writes a correction beside the confirmed number, once, and carries it into a later review', async () => {
    const { reportId, plotId } = await ready();
    await confirm(reportId);
    const wrong = only((await live(plotId)).filter((one) => one.analyte === 'phosphorus'));
    const input = { siteId: here.id, resultId: wrong.id, value: '25', reason: 'Digits swapped' };
    expect((await problemOf(correctResult({ ctx: helper, input }))).code).toBe('forbidden');
    const both = await Promise.allSettled([
      correctResult({ ctx: owner, input }),
      correctResult({ ctx: adviser, input }),
    ]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    expect(both.find((one) => one.status === 'rejected')?.reason).toMatchObject({
      code: 'conflict',
      reason: 'superseded',
    });
    const right = only((await live(plotId)).filter((one) => one.analyte === 'phosphorus'));
    expect(right).toMatchObject({
      value: '25',
      valueSi: '25',
      supersedesId: wrong.id,
      correctionReason: 'Digits swapped',
    });
    const ph = only((await live(plotId)).filter((one) => one.analyte === 'soil_ph_water'));
    const impossible = { siteId: here.id, resultId: ph.id, value: '63', reason: 'x' };
    expect((await problemOf(correctResult({ ctx: owner, input: impossible }))).code).toBe('invalid');
    expect(only((await live(plotId)).filter((one) => one.id === ph.id)).value).toBe('6.3');
    await withdrawReport({ ctx: owner, input: { siteId: here.id, reportId, reason: 'again' } });
    await confirm(reportId);
    expect((await live(plotId)).find((one) => one.analyte === 'phosphorus')?.value).toBe('25');
    const foreign = await ctxAs(there.people.owner);
    const theirs = { ...input, siteId: there.id, resultId: ph.id };
    expect((await problemOf(correctResult({ ctx: foreign, input: theirs }))).code).toBe('not-found');
  });

  it('lists by plot, analyte and day, and the newest of each', async () => {
    const { reportId, plotId, one } = await ready();
    await confirm(reportId);
    const later = await reading([
      { ...one, labNumber: 'next', dateSampled: '2026-10-02', results: [{ ...PH, printed: '6.9', value: 6.9 }] },
    ]);
    await confirm(later);
    const asked = { siteId: here.id, plotId };
    const ph = await listResults({ ctx: owner, input: { ...asked, analyte: 'soil_ph_water' } });
    expect(ph.results.map((each) => each.value)).toEqual(['6.9', '6.3']);
    const early = await listResults({ ctx: owner, input: { ...asked, to: '2026-05-01' } });
    expect(early.results).toHaveLength(3);
    const newest = (await latestResults({ ctx: owner, input: asked })).results;
    expect(new Map(newest.map((each) => [each.analyte, each.takenOn]))).toEqual(
      new Map([
        ['soil_ph_water', '2026-10-02'],
        ['phosphorus', '2026-04-10'],
        ['boron', '2026-04-10'],
      ]),
    );
    const all = (await latestResults({ ctx: owner, input: { siteId: here.id } })).results;
    expect(all.filter((each) => each.plotId === plotId)).toEqual(newest);
    const viewer = await ctxAs(here.people.viewer);
    expect((await listResults({ ctx: viewer, input: asked })).results).toHaveLength(4);
    const foreign = await makePlot(there.id);
    expect((await problemOf(listResults({ ctx: owner, input: { siteId: here.id, plotId: foreign } }))).code).toBe(
      'not-found',
    );
  });
});

describe('a report typed in by hand', () => {
  it('has its samples at once and takes its rows in review', async () => {
    const plotId = await makePlot(here.id, { name: 'Typed bed' });
    const made = await typeReport({
      ctx: helper,
      input: { siteId: here.id, laboratoryName: 'Paper Lab', samples: [{ name: 'A', plotId, takenOn: '2019-03-02' }] },
    });
    expect(made.state).toBe('in-review');
    const seen = await review(made.reportId);
    expect(seen.report).toMatchObject({ origin: 'typed', fileName: null, laboratory: { name: 'Paper Lab' } });
    const input = { siteId: here.id, reportId: made.reportId, reportSampleId: only(seen.samples).id };
    await addRow({ ctx: helper, input: { ...input, analyte: 'soil_ph_water', value: '5.9', unit: 'pH' } });
    const more = await addSample({ ctx: helper, input: { siteId: here.id, reportId: made.reportId, name: 'B' } });
    expect(more.ordinal).toBe(2);
    const out = { ...input, reportSampleId: more.id, version: more.version, leftOutReason: 'empty' };
    await setSample({ ctx: helper, input: out });
    expect((await confirm(made.reportId)).results).toBe(1);
    expect((await live(plotId)).map((one) => [one.value, one.unitBasis])).toEqual([['5.9', 'index']]);
    const archived = await withSite(here.id, (tx) => tx.select().from(plot).where(eq(plot.id, plotId)));
    expect(archived[0]?.archivedAt).toBeNull();
  });
});
