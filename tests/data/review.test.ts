import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { plot } from '@/db/schema';
import { setLaboratory } from '@/lib/data/reports/setLaboratory';
import { typeReport } from '@/lib/data/reports/typeReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { acceptRow } from '@/lib/data/review/acceptRow';
import { addRow } from '@/lib/data/review/addRow';
import { addSample } from '@/lib/data/review/addSample';
import { editRow } from '@/lib/data/review/editRow';
import { editRows } from '@/lib/data/review/editRows';
import { getReview } from '@/lib/data/review/getReview';
import { removeRow } from '@/lib/data/review/removeRow';
import { restoreRow } from '@/lib/data/review/restoreRow';
import { setSample } from '@/lib/data/review/setSample';
import { withSite } from '@/lib/data/transaction';
import { ctxAs, makePlot, useWorld } from '../support/factory';
import { problemOf } from '../support/reports';
import { B, only, P, PH, useReviewBench } from '../support/review';

useWorld();
const { bench, ready, review, confirm, live, at } = useReviewBench();

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
    const edited = await editRow({ ctx: bench.helper, input: { ...at(row, reportId), value: '6,8' } });
    expect(edited).toMatchObject({
      printed: '6,8',
      value: '6.8',
      state: 'edited',
      version: 2,
      editedBy: bench.here.people.helper.name,
      original: { printed: '6.3', value: '6.3', analyte: 'soil_ph_water' },
    });
    const stale = await problemOf(editRow({ ctx: bench.owner, input: { ...at(row, reportId), value: '6.4' } }));
    expect(stale).toMatchObject({ code: 'conflict', reason: 'stale-version', current: edited });
    const again = await editRow({ ctx: bench.owner, input: { ...at(edited, reportId), value: '<6.9' } });
    expect(again).toMatchObject({ value: '6.9', qualifier: '<', original: { printed: '6.3' } });
  });

  it('takes the page’s own characters back as the page meant them', async () => {
    const { reportId } = await ready({ results: [{ ...P, printed: '1,934', value: 1934 }] });
    const row = only((await review(reportId)).rows);
    const edited = await editRow({ ctx: bench.helper, input: { ...at(row, reportId), value: '19' } });
    expect(edited).toMatchObject({ value: '19', state: 'edited' });
    const undone = await editRow({ ctx: bench.helper, input: { ...at(edited, reportId), value: '1,934' } });
    expect(undone).toMatchObject({ value: '1934', printed: '1,934', state: 'proposed', original: null, version: 3 });
  });

  it('lets one of two edits at the same moment win', async () => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'phosphorus'));
    const both = await Promise.allSettled([
      editRow({ ctx: bench.owner, input: { ...at(row, reportId), value: '53' } }),
      editRow({ ctx: bench.helper, input: { ...at(row, reportId), value: '54' } }),
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
    const problem = await problemOf(editRow({ ctx: bench.helper, input: { ...at(row, reportId), value } }));
    expect(problem.code).toBe('invalid');
    expect(problem.fields?.value).toContain(words);
    const after = only((await review(reportId)).rows.filter((one) => one.id === row.id));
    expect([after.printed, after.version]).toEqual(['6.3', 1]);
  });

  it('points out an odd value without refusing it, until somebody says it is right', async () => {
    const { reportId } = await ready();
    const row = only((await review(reportId)).rows.filter((one) => one.analyte === 'soil_ph_water'));
    const odd = await editRow({ ctx: bench.helper, input: { ...at(row, reportId), value: '12.9' } });
    expect(odd.doubts.map((one) => one.code)).toEqual(['implausible']);
    expect(odd.doubtful).toBe(true);
    const right = await acceptRow({ ctx: bench.helper, input: at(odd, reportId) });
    expect([right.doubts, right.doubtful, right.value]).toEqual([[], false, '12.9']);
  });

  it('saves a paste row by row: good ones stand, stale and impossible ones say why', async () => {
    const { reportId } = await ready();
    const { rows } = await review(reportId);
    const [first, second, third] = rows;
    if (!first || !second || !third) throw new Error('Three rows were expected.');
    const moved = await editRow({ ctx: bench.owner, input: { ...at(second, reportId), value: '77' } });
    const { outcomes } = await editRows({
      ctx: bench.helper,
      input: {
        siteId: bench.here.id,
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
      ctx: bench.helper,
      input: { siteId: bench.here.id, reportId, reportSampleId, analyte: 'zinc', value: '3.1', unit: 'mg/kg' },
    });
    expect(added).toMatchObject({ state: 'added', original: null, value: '3.1', page: null });
    const gone = await removeRow({ ctx: bench.helper, input: at(added, reportId) });
    expect(gone.state).toBe('removed');
    expect(await problemOf(editRow({ ctx: bench.helper, input: { ...at(gone, reportId), value: '1' } }))).toMatchObject(
      {
        reason: 'row-removed',
      },
    );
    expect((await restoreRow({ ctx: bench.helper, input: at(gone, reportId) })).state).toBe('added');
    const ph = only(before.rows.filter((row) => row.analyte === 'soil_ph_water'));
    const away = await removeRow({ ctx: bench.helper, input: at(ph, reportId) });
    expect((await review(reportId)).rows.at(-1)?.id).toBe(ph.id);
    expect((await restoreRow({ ctx: bench.helper, input: at(away, reportId) })).state).toBe('proposed');
  });

  it('assigns a sample against its version, within the calendar and this site', async () => {
    const { reportId, plotId } = await ready();
    const one = only((await review(reportId)).samples);
    const input = { siteId: bench.here.id, reportId, reportSampleId: one.id, version: one.version };
    const set = await setSample({
      ctx: bench.helper,
      input: { ...input, plotId, takenOn: '2026-04-12', depthToCm: 20, cores: 12, composite: 2 },
    });
    expect(set).toMatchObject({ takenOn: '2026-04-12', depthFromCm: '0', depthToCm: '20', cores: 12, composite: 2 });
    expect(await problemOf(setSample({ ctx: bench.owner, input: { ...input, cores: 3 } }))).toMatchObject({
      reason: 'stale-version',
      current: set,
    });
    const next = { ...input, version: set.version };
    for (const takenOn of ['1949-12-31', '2026-02-30', '2999-01-01']) {
      expect((await problemOf(setSample({ ctx: bench.helper, input: { ...next, takenOn } }))).code).toBe('invalid');
    }
    expect((await problemOf(setSample({ ctx: bench.helper, input: { ...next, depthFromCm: 30 } }))).code).toBe(
      'invalid',
    );
    const foreign = await makePlot(bench.there.id);
    expect((await problemOf(setSample({ ctx: bench.helper, input: { ...next, plotId: foreign } }))).code).toBe(
      'not-found',
    );
  });

  it('ties row, sample and report together and keeps other sites and viewers out', async () => {
    const [one, two] = [await ready(), await ready()];
    const row = (await review(two.reportId)).rows[0];
    if (!row) throw new Error('A row was expected.');
    const crossed = { ...at(row, one.reportId), value: '5' };
    expect((await problemOf(editRow({ ctx: bench.owner, input: crossed }))).code).toBe('not-found');
    const batch = { siteId: bench.here.id, reportId: one.reportId, edits: [{ rowId: row.id, version: 1, value: '5' }] };
    expect((await problemOf(editRows({ ctx: bench.owner, input: batch }))).code).toBe('not-found');
    const stranger = await ctxAs(bench.there.people.owner);
    const elsewhere = { siteId: bench.there.id, reportId: one.reportId };
    expect((await problemOf(getReview({ ctx: stranger, input: elsewhere }))).code).toBe('not-found');
    expect((await problemOf(confirmReport({ ctx: stranger, input: elsewhere }))).code).toBe('not-found');
    const viewer = await ctxAs(bench.here.people.viewer);
    const mine = { siteId: bench.here.id, reportId: one.reportId };
    expect((await problemOf(getReview({ ctx: viewer, input: mine }))).code).toBe('forbidden');
    expect((await problemOf(confirmReport({ ctx: bench.helper, input: mine }))).code).toBe('forbidden');
  });

  it('sets the laboratory by choice or by a new name', async () => {
    const { reportId } = await ready();
    const { report } = await review(reportId);
    const input = { siteId: bench.here.id, reportId, version: report.version, laboratoryName: 'Chalk Hill Analysis' };
    const set = await setLaboratory({ ctx: bench.helper, input });
    expect((await review(reportId)).report.laboratory?.name).toBe('Chalk Hill Analysis');
    expect(await problemOf(setLaboratory({ ctx: bench.helper, input }))).toMatchObject({ reason: 'stale-version' });
    expect(set.version).toBe(report.version + 1);
  });
});

describe('a report typed in by hand', () => {
  it('has its samples at once and takes its rows in review', async () => {
    const plotId = await makePlot(bench.here.id, { name: 'Typed bed' });
    const made = await typeReport({
      ctx: bench.helper,
      input: {
        siteId: bench.here.id,
        laboratoryName: 'Paper Lab',
        samples: [{ name: 'A', plotId, takenOn: '2019-03-02' }],
      },
    });
    expect(made.state).toBe('in-review');
    const seen = await review(made.reportId);
    expect(seen.report).toMatchObject({ origin: 'typed', fileName: null, laboratory: { name: 'Paper Lab' } });
    const input = { siteId: bench.here.id, reportId: made.reportId, reportSampleId: only(seen.samples).id };
    await addRow({ ctx: bench.helper, input: { ...input, analyte: 'soil_ph_water', value: '5.9', unit: 'pH' } });
    const more = await addSample({
      ctx: bench.helper,
      input: { siteId: bench.here.id, reportId: made.reportId, name: 'B' },
    });
    expect(more.ordinal).toBe(2);
    const out = { ...input, reportSampleId: more.id, version: more.version, leftOutReason: 'empty' };
    await setSample({ ctx: bench.helper, input: out });
    expect((await confirm(made.reportId)).results).toBe(1);
    expect((await live(plotId)).map((one) => [one.value, one.unitBasis])).toEqual([['5.9', 'index']]);
    const archived = await withSite(bench.here.id, (tx) => tx.select().from(plot).where(eq(plot.id, plotId)));
    expect(archived[0]?.archivedAt).toBeNull();
  });
});
