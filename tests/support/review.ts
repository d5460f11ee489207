import { beforeAll } from 'vitest';
import type { Ctx } from '@/lib/data/context';
import { saveReading } from '@/lib/data/reports/saveReading';
import { startReading } from '@/lib/data/reports/startReading';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { listResults } from '@/lib/data/results/listResults';
import { getReview } from '@/lib/data/review/getReview';
import type { ReadSample } from '@/lib/reading/types';
import type { Result } from '@/lib/schemas/results';
import type { Review, ReviewRow } from '@/lib/schemas/review';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite } from './factory';
import { pdfBytes, readResult, readSample, soilReading } from './reports';

export const PH = readResult({ analyte: 'soil_ph_water', printed: '6.3', unit: 'pH', method: '1:1_water' });
export const P = readResult({ analyte: 'phosphorus', printed: '52', unit: 'mg/kg', method: 'M3' });
export const B = readResult({ analyte: 'boron', printed: '<0.1', value: 0.1, qualifier: '<', unit: 'mg/kg' });

export function only<T>(items: readonly T[]): T {
  const [item] = items;
  if (item === undefined || items.length !== 1) throw new Error(`Expected one, found ${items.length}.`);
  return item;
}

type Bench = { here: TestSite; there: TestSite; owner: Ctx; adviser: Ctx; helper: Ctx };

/** Two sites, the people of the first, and reports of it that stand in review. Call it at the top of a file, after useWorld. */
export function useReviewBench() {
  const bench = {} as Bench;
  beforeAll(async () => {
    bench.here = await makeSite('Here');
    bench.there = await makeSite('There');
    bench.owner = await ctxAs(bench.here.people.owner);
    bench.adviser = await ctxAs(bench.here.people.adviser);
    bench.helper = await ctxAs(bench.here.people.helper);
  });

  /** A report in review, through upload and reading as the worker does it. */
  async function reading(samples: readonly ReadSample[], fileName = 'r.pdf'): Promise<string> {
    const siteId = bench.here.id;
    const { reportId } = await uploadReport({ ctx: bench.helper, input: { siteId, fileName, bytes: pdfBytes() } });
    const ctx = await ctxWorker();
    const task = await startReading({ ctx, input: { siteId, id: reportId } });
    if (!task) throw new Error('The report could not be taken.');
    await saveReading({ ctx, input: { lease: task.lease, reading: soilReading(samples) } });
    return reportId;
  }

  let serial = 0;
  /** A plot of its own and a report with one sample of it, ready to confirm. */
  async function ready(over: Partial<ReadSample> = {}, fileName?: string) {
    serial += 1;
    const name = `Strip ${serial} end`;
    const plotId = await makePlot(bench.here.id, { name });
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

  return {
    bench,
    reading,
    ready,
    review: (reportId: string): Promise<Review> =>
      getReview({ ctx: bench.owner, input: { siteId: bench.here.id, reportId } }),
    confirm: (reportId: string, ctx = bench.owner, separateAnalyses: string[] = []) =>
      confirmReport({ ctx, input: { siteId: bench.here.id, reportId, separateAnalyses } }),
    live: async (plotId: string): Promise<Result[]> =>
      (await listResults({ ctx: bench.owner, input: { siteId: bench.here.id, plotId } })).results,
    at: (row: ReviewRow, reportId: string) => ({
      siteId: bench.here.id,
      reportId,
      rowId: row.id,
      version: row.version,
    }),
  };
}
