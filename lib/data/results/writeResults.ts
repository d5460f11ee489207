import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { reportSample, result } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Ctx, SignedIn } from '../context';
import type { ReportRow } from '../reports/getReportInSite';
import type { RowColumns } from '../review/reviewRow';
import type { SampleColumns } from '../review/sampleStore';
import { milligramsPerKilogram, unitBasisOf } from '../review/unitBasis';
import { findOrMakeSample } from './findOrMakeSample';

const AT_ONCE = 1000;

type Input = {
  tx: Transaction;
  ctx: Ctx;
  siteId: SiteId;
  person: SignedIn;
  report: ReportRow;
  samples: readonly SampleColumns[];
  rows: readonly RowColumns[];
};

/** 1, or the next number where the bag was analysed before: a laboratory duplicate, never an average and never a clash. */
async function nextAnalysis(tx: Transaction, siteId: SiteId, sampleId: string): Promise<number> {
  const [row] = await tx
    .select({ last: sql<number>`coalesce(max(${result.analysis}), 0)::int` })
    .from(result)
    .where(and(eq(result.siteId, siteId), eq(result.sampleId, sampleId), isNull(result.supersededAt)));
  return (row?.last ?? 0) + 1;
}

const tie = (tx: Transaction, siteId: SiteId, id: string, sampleId: string) =>
  tx
    .update(reportSample)
    .set({ sampleId })
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.id, id)));

/** The same analysis in another form points to the same bag and yields nothing of its own. */
async function tieOtherForm({ tx, siteId }: Input, sample: SampleColumns, sameAsId: string): Promise<void> {
  const [other] = await tx
    .select({ sampleId: reportSample.sampleId })
    .from(reportSample)
    .where(and(eq(reportSample.siteId, siteId), eq(reportSample.id, sameAsId)));
  if (!other?.sampleId) throw new Error('The other form has no bag though its report is confirmed.');
  await tie(tx, siteId, sample.id, other.sampleId);
}

/** Results of every sample that counts; answers how many. The plots are held by the caller. */
export async function writeResults(input: Input): Promise<number> {
  const { tx, ctx, siteId, person, report, samples, rows } = input;
  const values: (typeof result.$inferInsert)[] = [];
  for (const sample of samples) {
    if (sample.sameAsId !== null) {
      await tieOtherForm(input, sample, sample.sameAsId);
      continue;
    }
    const { plotId, takenOn } = sample;
    if (plotId === null || takenOn === null) throw new Error('A sample without plot or day came through the blockers.');
    const sampleId = await findOrMakeSample(tx, siteId, ctx, { ...sample, plotId, takenOn });
    const earlier = values.filter((one) => one.sampleId === sampleId).map((one) => one.analysis ?? 1);
    const analysis = Math.max(await nextAnalysis(tx, siteId, sampleId), Math.max(0, ...earlier) + 1);
    await tie(tx, siteId, sample.id, sampleId);
    for (const row of rows) {
      if (row.reportSampleId !== sample.id || row.state === 'removed' || row.analyte === null) continue;
      values.push({
        siteId,
        sampleId,
        reportId: report.id,
        reportSampleId: sample.id,
        readingRowId: row.id,
        analysis,
        plotId,
        takenOn,
        depthFromCm: sample.depthFromCm,
        depthToCm: sample.depthToCm,
        laboratoryId: report.laboratoryId,
        analyte: row.analyte,
        method: row.method,
        form: row.form,
        unit: row.unit,
        unitBasis: unitBasisOf(row.unit, row.analyte),
        value: row.value,
        valueSi: milligramsPerKilogram(row.value, row.unit),
        qualifier: row.qualifier,
        printed: row.printed,
        unitPrinted: row.unitPrinted,
        confirmedBy: person.id,
        confirmedAt: ctx.now,
      });
    }
  }
  for (let at = 0; at < values.length; at += AT_ONCE) await tx.insert(result).values(values.slice(at, at + AT_ONCE));
  return values.length;
}
