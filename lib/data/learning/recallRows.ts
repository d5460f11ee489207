import { and, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { readingRow } from '@/db/schema';
import { isAnalyteKey, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import type { SiteId } from '@/lib/domain/ids';
import { type LearntResult, withoutMemory } from '@/lib/reading/memory/apply';
import type { Reading } from '@/lib/reading/types';
import type { ReportRow } from '../reports/getReportInSite';
import { learntFrom } from '../reports/writeReadingRows';
import { loadReview } from '../review/loadReview';
import type { RowColumns } from '../review/reviewRow';
import { recallLayout } from './recallLayout';

/** A stored row as the reader's page alone gave it. null: nothing the reader read. */
function asRead(row: RowColumns): LearntResult | null {
  const before = { analyte: row.analyte, form: row.form, unit: row.unit, method: row.method, ...row.learnt?.before };
  if (row.state === 'removed' || before.analyte === null || !isAnalyteKey(before.analyte) || row.label === '')
    return null;
  return withoutMemory({
    analyte: before.analyte,
    label: row.label,
    printed: row.printed,
    value: row.value === null ? null : Number(row.value),
    qualifier: row.qualifier,
    unit: before.unit !== null && isUnitKey(before.unit) ? before.unit : null,
    unitPrinted: row.unitPrinted,
    form: before.form,
    method: before.method !== null && isMethodKey(before.method) ? before.method : null,
    methodPrinted: row.methodPrinted,
    rating: row.rating,
    primary: row.isPrimary,
    page: row.page,
    box: row.box,
    cell: row.cell === null ? null : { ...row.cell, sheet: Number(row.cell.sheet ?? 1) },
    confidence: row.confidence ?? 0,
    doubts: row.doubts,
  });
}

function columnsOf(read: LearntResult) {
  return {
    analyte: read.analyte as string | null,
    unit: read.unit as string | null,
    method: read.method as string | null,
    form: read.form,
    confidence: read.confidence as number | null,
    doubts: read.doubts.map(({ code, sentence }) => ({ code, sentence })),
    learnt: learntFrom(read),
  };
}

/** Holds an open review against what is known of its layout now. Rows that somebody has looked at stay as they are. */
export async function recallRows(tx: Transaction, siteId: SiteId, report: ReportRow): Promise<void> {
  const { samples, rows } = await loadReview(tx, siteId, report.id);
  const bySample = samples.map((sample) =>
    rows.flatMap((row) => {
      const read = row.reportSampleId === sample.id ? asRead(row) : null;
      return read === null ? [] : [{ row, read }];
    }),
  );
  const reading: Reading = {
    file: report.fileName ?? '',
    kind: 'soil',
    error: null,
    pages: report.pages ?? 0,
    warnings: [],
    lab: { name: report.laboratoryPrinted },
    samples: samples.map((sample, at) => ({
      sampleId: sample.printedName,
      labNumber: sample.labNumber,
      fieldName: sample.fieldName,
      depth: null,
      dateSampled: null,
      dateSampledPrinted: null,
      dateReported: null,
      dateReportedPrinted: null,
      results: bySample[at]?.map(({ read }) => read) ?? [],
    })),
    recommendations: [],
  };
  const recalled = await recallLayout(tx, siteId, reading);
  for (const [at, sample] of recalled.reading.samples.entries()) {
    for (const [index, read] of sample.results.entries()) {
      const row = bySample[at]?.[index]?.row;
      if (row === undefined || row.state !== 'proposed' || row.editedAt !== null) continue;
      const { analyte, unit, method, form, confidence, doubts, learnt } = row;
      const next = columnsOf(read);
      const cells = [analyte, unit, method, form];
      const changed = JSON.stringify([next.analyte, next.unit, next.method, next.form]) !== JSON.stringify(cells);
      const rest = JSON.stringify([next.confidence, next.doubts, next.learnt?.on, next.learnt?.filled]);
      if (!changed && rest === JSON.stringify([confidence, doubts, learnt?.on, learnt?.filled])) continue;
      await tx
        .update(readingRow)
        .set({ ...next, ...(changed ? { version: sql`${readingRow.version} + 1` } : {}) })
        .where(and(eq(readingRow.siteId, siteId), eq(readingRow.id, row.id), eq(readingRow.version, row.version)));
    }
  }
}
