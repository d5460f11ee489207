import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { type LearntFrom, readingRow, recommendation, reportSample } from '@/db/schema';
import { addDays, parseDay } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import type { LearntReading, LearntResult, LearntSample } from '@/lib/reading/memory/apply';
import type { Depth } from '@/lib/reading/types';
import type { Ctx } from '../context';
import { dayOf } from '../days';
import { refreshHistoryDoubts } from '../review/refreshHistoryDoubts';
import type { ReportRow } from './getReportInSite';
import { loadKnownNames, plainName, suggestPlot } from './suggestPlots';

const AT_ONCE = 1000;
const CM_PER_INCH = 2.54;

function* slices<T>(all: readonly T[]): Generator<T[]> {
  for (let at = 0; at < all.length; at += AT_ONCE) yield all.slice(at, at + AT_ONCE);
}

const amount = (value: number | null): string | null =>
  value === null || !Number.isFinite(value) ? null : String(value);

export const centimetres = (depth: Depth | null, end: 'top' | 'bottom'): string | null => {
  if (depth === null || !Number.isFinite(depth[end])) return null;
  return String(Math.round(depth[end] * (depth.unit === 'in' ? CM_PER_INCH : 1) * 100) / 100);
};

/** A day the calendar has, between 1950 and tomorrow anywhere; the printed words stay beside it either way. */
export function believableDay(text: string | null, ctx: Ctx): string | null {
  if (text === null || !parseDay(text).ok || text < '1950-01-01') return null;
  return text <= addDays(dayOf(ctx.now, 'UTC'), 2) ? text : null;
}

type SampleValues = Omit<typeof reportSample.$inferInsert, 'id'>;

function sampleValues(
  reportRow: ReportRow,
  ctx: Ctx,
  sample: LearntSample,
  at: number,
  plotId: string | null,
): SampleValues {
  return {
    siteId: reportRow.siteId,
    reportId: reportRow.id,
    ordinal: at + 1,
    printedName: sample.sampleId,
    labNumber: sample.labNumber,
    fieldName: sample.fieldName,
    sampledPrinted: sample.dateSampledPrinted,
    takenOn: believableDay(sample.dateSampled, ctx),
    reportedOn: believableDay(sample.dateReported, ctx),
    reportedPrinted: sample.dateReportedPrinted,
    depthFromCm: centimetres(sample.depth, 'top'),
    depthToCm: centimetres(sample.depth, 'bottom'),
    plotId,
    composite: 1,
  };
}

/** Two bags of one plot and day in one report, with numbers of their own, are a field duplicate rather than one bag twice. */
function numberBags(samples: SampleValues[]): void {
  const bags = new Map<string, Set<string>>();
  for (const sample of samples) {
    if (!sample.plotId || !sample.takenOn || !sample.labNumber) continue;
    const key = [sample.plotId, sample.takenOn, sample.depthFromCm, sample.depthToCm].join('|');
    const numbers = bags.get(key) ?? new Set();
    bags.set(key, numbers.add(sample.labNumber));
    sample.composite = Math.min(9, [...numbers].indexOf(sample.labNumber) + 1);
  }
}

export const learntFrom = ({ learnt }: LearntResult): LearntFrom | null =>
  learnt ? { on: learnt.on, filled: [...learnt.filled], before: learnt.before } : null;

function rowValues(reportRow: ReportRow, reportSampleId: string, read: LearntResult, ordinal: number) {
  return {
    siteId: reportRow.siteId,
    reportId: reportRow.id,
    reportSampleId,
    ordinal,
    analyte: read.analyte,
    label: read.label,
    printed: read.printed,
    value: amount(read.value),
    qualifier: read.qualifier,
    unit: read.unit,
    unitPrinted: read.unitPrinted,
    form: read.form,
    method: read.method,
    methodPrinted: read.methodPrinted,
    rating: read.rating,
    isPrimary: read.primary,
    page: read.page,
    box: read.box === null ? null : ([...read.box] as [number, number, number, number]),
    cell: read.cell === null ? null : { ...read.cell, sheet: String(read.cell.sheet) },
    confidence: read.confidence,
    learnt: learntFrom(read),
    doubts: read.doubts.map(({ code, sentence }) => ({ code, sentence })),
  };
}

/** Replaces whatever an earlier try left, so that a file read twice stands there once. */
export async function writeReadingRows(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  reportRow: ReportRow,
  reading: LearntReading,
  /** Where somebody has said which plot each sample is of; else its name decides. */
  plotOf?: (sample: LearntSample) => string | null,
): Promise<void> {
  const ofReport = { siteId, reportId: reportRow.id };
  await tx
    .delete(recommendation)
    .where(and(eq(recommendation.siteId, siteId), eq(recommendation.reportId, reportRow.id)));
  await tx.delete(reportSample).where(and(eq(reportSample.siteId, siteId), eq(reportSample.reportId, reportRow.id)));

  const known = await loadKnownNames(tx, siteId, reportRow.id);
  const only = reading.samples.length === 1 ? reportRow.droppedOnPlotId : null;
  const samples = reading.samples.map((sample, at) => {
    const named = { printedName: sample.sampleId, fieldName: sample.fieldName };
    return sampleValues(reportRow, ctx, sample, at, plotOf ? plotOf(sample) : (only ?? suggestPlot(named, known)));
  });
  numberBags(samples);

  const ids = new Map<number, string>();
  for (const slice of slices(samples)) {
    const written = await tx
      .insert(reportSample)
      .values(slice)
      .returning({ id: reportSample.id, ordinal: reportSample.ordinal });
    for (const row of written) ids.set(row.ordinal, row.id);
  }
  let ordinal = 0;
  const rows = reading.samples.flatMap((sample, at) =>
    sample.results.map((read) => {
      ordinal += 1;
      return rowValues(reportRow, ids.get(at + 1) ?? '', read, ordinal);
    }),
  );
  for (const slice of slices(rows)) await tx.insert(readingRow).values(slice);
  await refreshHistoryDoubts(tx, siteId, [...ids.values()]);

  const byName = new Map(reading.samples.map((sample, at) => [plainName(sample.sampleId), ids.get(at + 1)]));
  const advice = reading.recommendations.map((one) => ({
    ...ofReport,
    reportSampleId: one.sampleId === null ? null : (byName.get(plainName(one.sampleId)) ?? null),
    item: one.item,
    amount: amount(one.amount),
    printed: one.printed,
    unit: one.unit,
    page: one.page,
    box: one.box === null ? null : ([...one.box] as [number, number, number, number]),
  }));
  for (const slice of slices(advice)) await tx.insert(recommendation).values(slice);
}
