import type { z } from 'zod';
import type { OriginalReading, RowState } from '@/db/schema';
import type { editRowInput } from '@/lib/schemas/review';
import { readValueText, VALUE_TEXT_REASONS, type ValueText } from '@/lib/schemas/valueText';
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

type Printed = Pick<ValueFacts, 'printed' | 'value' | 'qualifier'>;

/** Undo puts back the page's own characters ("1,934", "52 VH"): they mean what the reader took them for. */
function typedValue(text: string, before: Printed, original: Printed | null): ValueText & { known?: true } {
  const known = [before, original].find(
    (one) => one !== null && one.printed.trim() !== '' && one.printed.trim() === text,
  );
  if (!known) return readValueText(text);
  return { ok: true, printed: known.printed, value: known.value, qualifier: known.qualifier, known: true };
}

const FACTS = ['analyte', 'printed', 'value', 'qualifier', 'unit', 'method', 'form'] as const;

/** The row after an edit, or the sentence why it cannot be. The reader's doubts end here: a person has looked at the row. */
export function applyEdit(before: ValueFacts, edits: CellEdits, original: OriginalReading | null = null): Edited {
  const typed = edits.value === undefined ? undefined : typedValue(edits.value, before, original);
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
  // What the page says may be put back even where it cannot be confirmed: the review names it.
  const impossible = typed?.known ? null : impossibleSentence(facts);
  if (impossible) return { ok: false, field: 'value', sentence: impossible };
  return { ok: true, facts, doubts: oddDoubts(facts) };
}

/** Columns of a saved edit; what the page says is kept the first time and never again. */
export function editColumns(row: RowColumns, edited: Extract<Edited, { ok: true }>, by: string, at: Date) {
  const original = row.state === 'added' ? null : (row.original ?? originalOf(row));
  const undone = original !== null && FACTS.every((fact) => original[fact] === edited.facts[fact]);
  const state: RowState = row.state === 'added' ? 'added' : undone ? 'proposed' : 'edited';
  return {
    ...edited.facts,
    doubts: edited.doubts,
    state,
    original: undone ? null : original,
    editedBy: by,
    editedAt: at,
  };
}
