import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { layoutMemory, report } from '@/db/schema';
import { isAnalyteKey, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import type { SiteId } from '@/lib/domain/ids';
import { findLayout, layoutOf } from '@/lib/reading/memory/layout';
import { type ConfirmedRow, lessonsOf } from '@/lib/reading/memory/lessons';
import type { Cell } from '@/lib/reading/types';
import type { Ctx, SignedIn } from '../context';
import type { ReportRow } from '../reports/getReportInSite';
import type { RowColumns } from '../review/reviewRow';
import type { SampleColumns } from '../review/sampleStore';
import { loadLayouts } from './storedLayouts';

type Input = {
  tx: Transaction;
  ctx: Ctx;
  siteId: SiteId;
  person: SignedIn;
  report: ReportRow;
  /** Samples that were left in; what was left out teaches nothing. */
  samples: readonly SampleColumns[];
  rows: readonly RowColumns[];
};

const placeOf = (row: RowColumns) => ({
  label: row.label,
  page: row.page,
  box: row.box,
  cell: row.cell === null ? null : ({ ...row.cell, sheet: Number(row.cell.sheet ?? 1) } satisfies Cell),
});

const confirmedRow = (row: RowColumns): ConfirmedRow => ({
  ...placeOf(row),
  analyte: row.analyte !== null && isAnalyteKey(row.analyte) ? row.analyte : null,
  method: row.method !== null && isMethodKey(row.method) ? row.method : null,
  unit: row.unit !== null && isUnitKey(row.unit) ? row.unit : null,
  form: row.form,
  removed: row.state === 'removed',
});

/** Keeps what the labels of a report meant that a person has just confirmed. A typed report has no layout. */
export async function learnFromReport({ tx, ctx, siteId, person, report: of, samples, rows }: Input): Promise<void> {
  if (of.origin !== 'file') return;
  const bySample = samples.map((sample) => rows.filter((row) => row.reportSampleId === sample.id && row.label !== ''));
  const layout = layoutOf({
    laboratory: of.laboratoryPrinted,
    samples: bySample.map((sample) => sample.map(placeOf)),
  });
  const lessons = lessonsOf(bySample.flat().map(confirmedRow));
  if (layout === null || lessons.length === 0) return;
  const known = findLayout(layout, await loadLayouts(tx, siteId, layout.laboratory));
  const fingerprint = known?.fingerprint ?? layout.fingerprint;
  const learnt = {
    fingerprint,
    laboratory: layout.laboratory,
    laboratoryPrinted: of.laboratoryPrinted,
    shape: layout.shape,
    headings: [...layout.headings],
    lessons: lessons.map((one) => ({ ...one, columns: [...one.columns] })),
    learntBy: person.id,
    learntAt: ctx.now,
  };
  await tx
    .insert(layoutMemory)
    .values({ siteId, reportId: of.id, ...learnt })
    .onConflictDoUpdate({ target: [layoutMemory.siteId, layoutMemory.reportId], set: learnt });
  if (of.layoutFingerprint !== fingerprint) {
    await tx
      .update(report)
      .set({ layoutFingerprint: fingerprint })
      .where(and(eq(report.siteId, siteId), eq(report.id, of.id)));
  }
}

/** Takes back what was learnt from this report alone; what others taught of the same layout stays. */
export async function unlearnReport(tx: Transaction, siteId: SiteId, reportId: string): Promise<void> {
  await tx.delete(layoutMemory).where(and(eq(layoutMemory.siteId, siteId), eq(layoutMemory.reportId, reportId)));
}
