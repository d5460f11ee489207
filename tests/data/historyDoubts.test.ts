import { describe, expect, it } from 'vitest';
import { recheckReviews } from '@/lib/data/learning/recheckReviews';
import { withdrawReport } from '@/lib/data/results/withdrawReport';
import { acceptRow } from '@/lib/data/review/acceptRow';
import { setSample } from '@/lib/data/review/setSample';
import type { ReadResult } from '@/lib/reading/types';
import { ctxWorker, makePlot, useWorld } from '../support/factory';
import { readResult, readSample } from '../support/reports';
import { only, useReviewBench } from '../support/review';

useWorld();
const { bench, reading, review, confirm, at } = useReviewBench();

const P = (printed: string, over: Partial<ReadResult> = {}) =>
  readResult({
    analyte: 'phosphorus',
    label: 'Phosphorus',
    printed,
    unit: 'mg/kg',
    method: 'M3',
    form: 'element',
    ...over,
  });
const K = (printed: string, over: Partial<ReadResult> = {}) =>
  readResult({
    analyte: 'potassium',
    label: 'Potassium',
    printed,
    unit: 'mg/kg',
    method: 'M3',
    form: 'element',
    ...over,
  });

let serial = 0;
const newPlot = async () => {
  serial += 1;
  const name = `Border ${serial} west`;
  return { name, plotId: await makePlot(bench.here.id, { name }) };
};
const sampleOf = (name: string, day: string, results: readonly ReadResult[]) =>
  readSample({ sampleId: name, dateSampled: day, results });

/** Doubt codes by label, without those of the layout: all these reports are of one. */
async function codes(reportId: string): Promise<Record<string, string[]>> {
  const seen = await review(reportId);
  return Object.fromEntries(
    seen.rows.map((row) => [
      row.label,
      row.doubts.map((doubt) => doubt.code).filter((code) => code !== 'learnt-otherwise'),
    ]),
  );
}
const warnings = async (reportId: string) => (await review(reportId)).report.warnings.map((one) => one.code);
const assign = async (reportId: string, plotId: string | null) => {
  const sample = only((await review(reportId)).samples);
  const input = { siteId: bench.here.id, reportId, reportSampleId: sample.id, version: sample.version, plotId };
  return setSample({ ctx: bench.helper, input });
};

describe('a report held against the history of its plot', () => {
  it('is asked about a jump by two when it is read, by its sample’s name', async () => {
    const { name } = await newPlot();
    await confirm(await reading([sampleOf(name, '2025-04-10', [P('40'), K('150')])]));
    const now = await reading([sampleOf(name, '2026-04-10', [P('81'), K('298')])]);
    expect(await codes(now)).toEqual({ Phosphorus: ['factor-two'], Potassium: ['factor-two'] });
    const row = (await review(now)).rows.find((one) => one.label === 'Phosphorus');
    expect(row?.doubts[0]?.sentence).toContain('40 then, 81 now');
    expect(row).toMatchObject({ value: '81', version: 1, doubtful: true });
  });

  it('is asked when the sample gets its plot later, and no longer when it gets another one', async () => {
    const { name, plotId } = await newPlot();
    const other = await newPlot();
    await confirm(await reading([sampleOf(name, '2025-04-10', [P('40'), K('150')])]));
    const now = await reading([
      sampleOf('Bag 7', '2026-04-10', [P('40', { method: 'Olsen' }), K('300', { unit: 'lb/acre' })]),
    ]);
    expect(await codes(now)).toEqual({ Phosphorus: [], Potassium: [] });
    await assign(now, plotId);
    expect(await codes(now)).toEqual({ Phosphorus: ['method-changed'], Potassium: ['unit-changed'] });
    expect(await warnings(now)).toEqual(['sample-renamed']);
    await assign(now, other.plotId);
    expect(await codes(now)).toEqual({ Phosphorus: [], Potassium: [] });
    expect(await warnings(now)).toEqual([]);
  });

  it('asks once where two samples of one name go to a plot', async () => {
    const { name, plotId } = await newPlot();
    await confirm(await reading([sampleOf(name, '2025-04-10', [P('40')])]));
    const now = await reading([sampleOf('Bag 9', '2026-04-10', [P('41')]), sampleOf('Bag 9', '2026-05-10', [P('42')])]);
    const { samples } = await review(now);
    for (const { id: reportSampleId, version } of samples) {
      const input = { siteId: bench.here.id, reportId: now, reportSampleId, version, plotId };
      await setSample({ ctx: bench.helper, input });
    }
    expect(await warnings(now)).toEqual(['sample-renamed']);
  });

  it('keeps the reader’s own doubts, and lets "it is right" stand until the plot changes', async () => {
    const { name, plotId } = await newPlot();
    await confirm(await reading([sampleOf(name, '2025-04-10', [P('40')])]));
    const unsure = { code: 'two-readings', sentence: 'Two readings differ: 80 and 30.' };
    const now = await reading([sampleOf('Bag 8', '2026-04-10', [P('80', { doubts: [unsure] })])]);
    await assign(now, plotId);
    expect(await codes(now)).toEqual({ Phosphorus: ['two-readings', 'factor-two'] });
    const row = only((await review(now)).rows);
    await acceptRow({ ctx: bench.helper, input: at(row, now) });
    const sample = only((await review(now)).samples);
    const depths = { depthFromCm: 0, depthToCm: 20 };
    const input = {
      siteId: bench.here.id,
      reportId: now,
      reportSampleId: sample.id,
      version: sample.version,
      ...depths,
    };
    await setSample({ ctx: bench.helper, input });
    expect(await codes(now)).toEqual({ Phosphorus: [] });
  });

  it('asks about numbers per acre of a potting mix', async () => {
    const density = readResult({ analyte: 'density', label: 'Density', printed: '0.3', unit: 'g/cm3' });
    const now = await reading([sampleOf('Bench', '2026-04-10', [K('240', { unit: 'lb/acre' }), P('40'), density])]);
    expect(await codes(now)).toEqual({ Potassium: ['area-unit-light-soil'], Phosphorus: [], Density: [] });
  });

  it('is asked once an earlier year is confirmed beside it, and no longer when that is withdrawn', async () => {
    const { name } = await newPlot();
    const before = await reading([sampleOf(name, '2025-04-10', [P('40'), K('150')])]);
    const now = await reading([sampleOf(name, '2026-04-10', [P('81'), K('298')])]);
    const again = async () => recheckReviews({ ctx: await ctxWorker(), input: { siteId: bench.here.id, id: before } });
    await confirm(before);
    await again();
    expect(await codes(now)).toEqual({ Phosphorus: ['factor-two'], Potassium: ['factor-two'] });
    const reason = 'Wrong plot.';
    await withdrawReport({ ctx: bench.owner, input: { siteId: bench.here.id, reportId: before, reason } });
    await again();
    expect(await codes(now)).toEqual({ Phosphorus: [], Potassium: [] });
  });
});
