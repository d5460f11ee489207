import { eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { result, sample } from '@/db/schema';
import { listPlots } from '@/lib/data/plots/listPlots';
import { setAside } from '@/lib/data/reports/setAside';
import { correctResult } from '@/lib/data/results/correctResult';
import { latestResults } from '@/lib/data/results/latestResults';
import { listResults } from '@/lib/data/results/listResults';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { addRow } from '@/lib/data/review/addRow';
import { editRow } from '@/lib/data/review/editRow';
import { setSameAs } from '@/lib/data/review/setSameAs';
import { setSample } from '@/lib/data/review/setSample';
import { withSite } from '@/lib/data/transaction';
import { ctxAs, makePlot, useWorld } from '../support/factory';
import { problemOf, readResult, readSample } from '../support/reports';
import { B, only, P, PH, useReviewBench } from '../support/review';

const world = useWorld();
const { bench, reading, ready, review, confirm, live, at } = useReviewBench();

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
    const before = await listPlots({ ctx: bench.owner, input: { siteId: bench.here.id } });
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
      confirmedBy: bench.here.people.owner.name,
    });
    const after = await listPlots({ ctx: bench.owner, input: { siteId: bench.here.id } });
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
    const both = await Promise.allSettled([confirm(reportId, bench.owner), confirm(reportId, bench.adviser)]);
    const won = both.findIndex((one) => one.status === 'fulfilled');
    const lost = both.find((one) => one.status === 'rejected');
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    const winner = won === 0 ? bench.here.people.owner.name : bench.here.people.adviser.name;
    expect(lost?.reason).toMatchObject({ code: 'conflict', reason: 'report-confirmed' });
    expect(lost?.reason.sentence).toContain(`already confirmed by ${winner}`);
    expect(await live(plotId)).toHaveLength(3);
  });

  it('waits for nothing half done: a report with open questions stays in review', async () => {
    const plotId = await makePlot(bench.here.id, { name: 'Blocked bed' });
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
    await editRow({ ctx: bench.helper, input: { ...at(odd, reportId), value: '6.8' } });
    const lost = only(seen.samples.filter((one) => one.plotId === null));
    const out = { siteId: bench.here.id, reportId, reportSampleId: lost.id, version: lost.version };
    await setSample({ ctx: bench.helper, input: { ...out, leftOutReason: 'A neighbour’s bag' } });
    expect((await confirm(reportId)).results).toBe(2);
  });

  it('names the same value twice, a row without an analyte and a row without a value', async () => {
    const { reportId } = await ready({ results: [PH, { ...PH, printed: '6.4', value: 6.4 }] });
    const { samples } = await review(reportId);
    const input = { siteId: bench.here.id, reportId, reportSampleId: only(samples).id };
    await addRow({ ctx: bench.helper, input });
    await addRow({ ctx: bench.helper, input: { ...input, analyte: 'zinc' } });
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
    expect(await problemOf(editRow({ ctx: bench.owner, input: { ...at(row, reportId), value: '5' } }))).toMatchObject({
      code: 'conflict',
      reason: 'report-confirmed',
    });
    expect((await problemOf(setAside({ ctx: bench.owner, input: { siteId: bench.here.id, reportId } }))).reason).toBe(
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
    await Promise.all([confirm(reportId), confirm(second, bench.adviser)]);
    const bags = await withSite(bench.here.id, (tx) => tx.select().from(sample).where(eq(sample.plotId, plotId)));
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
    const input = { siteId: bench.here.id, reportId: copy, reportSampleId: mine.id, version: mine.version };
    await setSameAs({ ctx: bench.helper, input: { ...input, sameAsId: twin.reportSampleId } });
    await setAside({ ctx: bench.owner, input: { siteId: bench.here.id, reportId } });
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
    const input = { siteId: bench.here.id, reportId: csv, reportSampleId: mine.id, version: mine.version };
    const marked = await setSameAs({ ctx: bench.helper, input: { ...input, sameAsId: twin.reportSampleId } });
    expect(marked.sameAsId).toBe(twin.reportSampleId);
    expect(await problemOf(confirm(csv))).toMatchObject({ reason: 'blocked' });
    const chain = only((await review(reportId)).samples);
    const back = {
      siteId: bench.here.id,
      reportId,
      reportSampleId: chain.id,
      version: chain.version,
      sameAsId: mine.id,
    };
    expect(await problemOf(setSameAs({ ctx: bench.helper, input: back }))).toMatchObject({ reason: 'same-as-chain' });

    await confirm(reportId);
    expect((await confirm(csv)).results).toBe(0);
    expect(await live(plotId)).toHaveLength(5);
    const leaning = withdrawReport({
      ctx: bench.owner,
      input: { siteId: bench.here.id, reportId, reason: 'wrong plot' },
    });
    expect(await problemOf(leaning)).toMatchObject({ reason: 'same-as-leans' });
    await withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId: csv, reason: 'not needed' } });
    await withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId, reason: 'wrong plot' } });
    expect(await live(plotId)).toEqual([]);
  });

  it('asks before the same numbers count twice, also when page and file are confirmed at the same moment', async () => {
    const { reportId, plotId, one } = await ready();
    const copy = await reading([one]);
    const both = await Promise.allSettled([confirm(reportId), confirm(copy, bench.adviser)]);
    expect(both.filter((each) => each.status === 'fulfilled')).toHaveLength(1);
    const lost = both.find((each) => each.status === 'rejected');
    expect(lost?.reason).toMatchObject({ reason: 'blocked', current: { blockers: [{ code: 'same-analysis' }] } });
    expect(await live(plotId)).toHaveLength(3);
    const open = both[0]?.status === 'rejected' ? reportId : copy;
    const mine = only((await review(open)).samples);
    await confirm(open, bench.owner, [mine.id]);
    expect((await live(plotId)).map((each) => each.analysis).sort()).toEqual([1, 1, 1, 2, 2, 2]);
  });
});

describe('withdrawing and correcting', () => {
  it('supersedes the results with the reason, keeps rows and edits, and confirms again after mending', async () => {
    const { reportId, plotId } = await ready();
    const ph = only((await review(reportId)).rows.filter((row) => row.analyte === 'soil_ph_water'));
    await editRow({ ctx: bench.helper, input: { ...at(ph, reportId), value: '6.6' } });
    await confirm(reportId);
    const at2 = { siteId: bench.here.id, reportId };
    expect((await problemOf(withdrawReport({ ctx: bench.helper, input: { ...at2, reason: 'x' } }))).code).toBe(
      'forbidden',
    );
    expect((await problemOf(withdrawReport({ ctx: bench.owner, input: { ...at2, reason: ' ' } }))).code).toBe(
      'invalid',
    );
    const back = await withdrawReport({ ctx: bench.owner, input: { ...at2, reason: 'Wrong day' } });
    expect(back.state).toBe('in-review');
    expect(await live(plotId)).toEqual([]);
    const old = await withSite(bench.here.id, (tx) => tx.select().from(result).where(eq(result.reportId, reportId)));
    expect(old.map((row) => row.supersededReason)).toEqual(['Wrong day', 'Wrong day', 'Wrong day']);
    const seen = await review(reportId);
    expect(seen.rows.find((row) => row.id === ph.id)).toMatchObject({ value: '6.6', original: { value: '6.3' } });
    const one = only(seen.samples);
    await setSample({
      ctx: bench.owner,
      input: { ...at2, reportSampleId: one.id, version: one.version, takenOn: '2026-04-20' },
    });
    await confirm(reportId, bench.adviser);
    expect((await live(plotId)).map((row) => row.takenOn)).toEqual(['2026-04-20', '2026-04-20', '2026-04-20']);
    const bags = await withSite(bench.here.id, (tx) => tx.select().from(sample).where(eq(sample.plotId, plotId)));
    expect(bags.map((bag) => bag.takenOn)).toEqual(['2026-04-20']);
    expect(
      (await problemOf(withdrawReport({ ctx: bench.owner, input: { ...at2, reportId: one.id, reason: 'x' } }))).code,
    ).toBe('not-found');
  });

  it('writes a correction beside the confirmed number, once, and carries it into a later review', async () => {
    const { reportId, plotId } = await ready();
    await confirm(reportId);
    const wrong = only((await live(plotId)).filter((one) => one.analyte === 'phosphorus'));
    const input = { siteId: bench.here.id, resultId: wrong.id, value: '25', reason: 'Digits swapped' };
    expect((await problemOf(correctResult({ ctx: bench.helper, input }))).code).toBe('forbidden');
    const both = await Promise.allSettled([
      correctResult({ ctx: bench.owner, input }),
      correctResult({ ctx: bench.adviser, input }),
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
    const impossible = { siteId: bench.here.id, resultId: ph.id, value: '63', reason: 'x' };
    expect((await problemOf(correctResult({ ctx: bench.owner, input: impossible }))).code).toBe('invalid');
    expect(only((await live(plotId)).filter((one) => one.id === ph.id)).value).toBe('6.3');
    await withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId, reason: 'again' } });
    await confirm(reportId);
    expect((await live(plotId)).find((one) => one.analyte === 'phosphorus')?.value).toBe('25');
    const foreign = await ctxAs(bench.there.people.owner);
    const theirs = { ...input, siteId: bench.there.id, resultId: ph.id };
    expect((await problemOf(correctResult({ ctx: foreign, input: theirs }))).code).toBe('not-found');
  });

  it('lists by plot, analyte and day, and the newest of each', async () => {
    const { reportId, plotId, one } = await ready();
    await confirm(reportId);
    const later = await reading([
      { ...one, labNumber: 'next', dateSampled: '2026-10-02', results: [{ ...PH, printed: '6.9', value: 6.9 }] },
    ]);
    await confirm(later);
    const asked = { siteId: bench.here.id, plotId };
    const ph = await listResults({ ctx: bench.owner, input: { ...asked, analyte: 'soil_ph_water' } });
    expect(ph.results.map((each) => each.value)).toEqual(['6.9', '6.3']);
    const early = await listResults({ ctx: bench.owner, input: { ...asked, to: '2026-05-01' } });
    expect(early.results).toHaveLength(3);
    const newest = (await latestResults({ ctx: bench.owner, input: asked })).results;
    expect(new Map(newest.map((each) => [each.analyte, each.takenOn]))).toEqual(
      new Map([
        ['soil_ph_water', '2026-10-02'],
        ['phosphorus', '2026-04-10'],
        ['boron', '2026-04-10'],
      ]),
    );
    const all = (await latestResults({ ctx: bench.owner, input: { siteId: bench.here.id } })).results;
    expect(all.filter((each) => each.plotId === plotId)).toEqual(newest);
    const viewer = await ctxAs(bench.here.people.viewer);
    expect((await listResults({ ctx: viewer, input: asked })).results).toHaveLength(4);
    const foreign = await makePlot(bench.there.id);
    expect(
      (await problemOf(listResults({ ctx: bench.owner, input: { siteId: bench.here.id, plotId: foreign } }))).code,
    ).toBe('not-found');
  });
});
