import type { z } from 'zod';
import type { OriginalReading } from '@/db/schema';
import type { editRowInput } from '@/lib/schemas/review';
import { readValueText, VALUE_TEXT_REASONS } from '@/lib/schemas/valueText';
import type { RowColumns } from './reviewRow';
import { impossibleSentence, oddDoubts, type ValueFacts } from './valueRules';

export type CellEdits = Pick<z.output<typeof editRowInput>, 'analyte' | 'value' | 'unit' | 'method' | 'form'>;

export type Edited =
  | { ok: true; facts: ValueFacts; doubts: { code: string; sentence: string }[] }
  | { ok: false; field: 'value' | 'analyte'; sentence: string };

const originalOf = (row: RowColumns): OriginalReading => ({
  analyte: row.analyte,
  printed: row.printed,
  value: row.value,
  qualifier: row.qualifier,
  unit: row.unit,
  method: row.method,
  form: row.form,
});

/** The row after an edit, or the sentence why it cannot be. The reader's doubts end here: a person has looked at the row. */
export function applyEdit(before: ValueFacts, edits: CellEdits): Edited {
  const typed = edits.value === undefined ? undefined : readValueText(edits.value);
  if (typed && !typed.ok) return { ok: false, field: 'value', sentence: VALUE_TEXT_REASONS[typed.reason] };
  const facts: ValueFacts = {
    analyte: edits.analyte ?? before.analyte,
    printed: typed ? typed.printed : before.printed,
    value: typed ? typed.value : before.value,
    qualifier: typed ? typed.qualifier : before.qualifier,
    unit: edits.unit === undefined ? before.unit : edits.unit,
    method: edits.method === undefined ? before.method : edits.method,
    form: edits.form === undefined ? before.form : edits.form,
  };
  const impossible = impossibleSentence(facts);
  if (impossible) return { ok: false, field: 'value', sentence: impossible };
  return { ok: true, facts, doubts: oddDoubts(facts) };
}

/** Columns of a saved edit; what the page says is kept the first time and never again. */
export function editColumns(row: RowColumns, edited: Extract<Edited, { ok: true }>, by: string, at: Date) {
  return {
    ...edited.facts,
    doubts: edited.doubts,
    state: row.state === 'added' ? ('added' as const) : ('edited' as const),
    original: row.state === 'added' ? null : (row.original ?? originalOf(row)),
    editedBy: by,
    editedAt: at,
  };
}
