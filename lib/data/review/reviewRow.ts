import type { readingRow } from '@/db/schema';
import type { ReviewRow } from '@/lib/schemas/review';
import { impossibleSentence } from './valueRules';

export type RowColumns = typeof readingRow.$inferSelect;

/** Below this the reader itself says that a look is worth it. */
const SURE = 0.95;

const isDoubtful = (row: RowColumns): boolean =>
  row.state !== 'removed' &&
  (row.doubts.length > 0 || (row.confidence !== null && row.confidence < SURE && row.editedAt === null));

export function toReviewRow(row: RowColumns, names: ReadonlyMap<string, string>): ReviewRow {
  return {
    id: row.id,
    reportSampleId: row.reportSampleId,
    ordinal: row.ordinal,
    analyte: row.analyte,
    label: row.label,
    printed: row.printed,
    value: row.value,
    qualifier: row.qualifier,
    unit: row.unit,
    unitPrinted: row.unitPrinted,
    form: row.form,
    method: row.method,
    methodPrinted: row.methodPrinted,
    rating: row.rating,
    isPrimary: row.isPrimary,
    page: row.page,
    box: row.box,
    cell: row.cell,
    confidence: row.confidence,
    learnt: row.learnt && { on: row.learnt.on, filled: row.learnt.filled },
    doubts: row.doubts,
    doubtful: isDoubtful(row),
    impossible: row.state === 'removed' ? null : impossibleSentence(row),
    state: row.state,
    original: row.original,
    version: row.version,
    editedBy: row.editedBy === null ? null : (names.get(row.editedBy) ?? null),
    editedAt: row.editedAt?.toISOString() ?? null,
  };
}

const rank = (row: ReviewRow): number => {
  if (row.state === 'removed') return 3;
  return row.impossible !== null ? 0 : row.doubtful ? 1 : 2;
};

/** Sample by sample; in each what needs a look first, then the order of the page, then what was removed. */
export function inReviewOrder(rows: readonly ReviewRow[], sampleIds: readonly string[]): ReviewRow[] {
  const place = new Map(sampleIds.map((id, at) => [id, at]));
  const at = (row: ReviewRow) => place.get(row.reportSampleId) ?? sampleIds.length;
  return [...rows].sort(
    (a, b) => at(a) - at(b) || rank(a) - rank(b) || a.ordinal - b.ordinal || a.id.localeCompare(b.id),
  );
}
