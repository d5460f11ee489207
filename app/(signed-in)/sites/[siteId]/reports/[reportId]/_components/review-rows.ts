import { ANALYTES, analyte, isAnalyteKey, METHODS, methodsOf, UNITS } from '@/lib/domain/analytes';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { Review, ReviewRow, ReviewSample } from '@/lib/schemas/review';
import { readValueText, VALUE_TEXT_REASONS } from '@/lib/schemas/valueText';
import type { GridColumn, GridDoubt, GridOption, GridRow } from '@/lib/ui/grid/types';
import type { PageMark } from '@/lib/ui/page-view/types';

export const EDITABLE = ['analyte', 'value', 'unit', 'method', 'form'] as const;
export type CellId = (typeof EDITABLE)[number];
export const isCellId = (text: string): text is CellId => EDITABLE.some((one) => one === text);

const NOT_GIVEN: GridOption = { value: '', label: 'not given' };
const ANALYTE_OPTIONS: readonly GridOption[] = ANALYTES.map((one) => ({ value: one.key, label: one.label }));
const UNIT_OPTIONS: readonly GridOption[] = [
  NOT_GIVEN,
  ...UNITS.map((unit) => ({ value: unit.key, label: unit.label })),
];
const ALL_METHODS: readonly GridOption[] = [
  NOT_GIVEN,
  ...METHODS.map((method) => ({ value: method.key, label: method.label })),
];
/** As what the number is given: the element itself, its oxide, its ion. */
const FORMS = ['element', 'P2O5', 'K2O', 'NO3', 'SO4', 'CaO', 'MgO'] as const;
const FORM_OPTIONS: readonly GridOption[] = [NOT_GIVEN, ...FORMS.map((form) => ({ value: form, label: form }))];

/** The words of one cell as the grid holds them. */
export function cellText(row: ReviewRow, cell: CellId): string {
  if (cell === 'value') return row.printed;
  return row[cell] ?? '';
}

export const sampleLabel = (sample: Pick<ReviewSample, 'fieldName' | 'printedName' | 'labNumber' | 'ordinal'>) =>
  sample.fieldName ?? sample.printedName ?? sample.labNumber ?? `Sample ${sample.ordinal}`;

/** An earlier sample of this report that names the same bag. */
export function twinOf(sample: ReviewSample, all: readonly ReviewSample[]): ReviewSample | undefined {
  if (sample.plotId === null || sample.takenOn === null || sample.sameAsId !== null) return undefined;
  return all.find(
    (one) =>
      one.ordinal < sample.ordinal &&
      one.leftOutReason === null &&
      one.sameAsId === null &&
      one.plotId === sample.plotId &&
      one.takenOn === sample.takenOn &&
      one.composite === sample.composite,
  );
}

/** The methods of this analyte, and the row's own if it is another. */
function methodOptions(row: ReviewRow): readonly GridOption[] {
  if (row.analyte === null || !isAnalyteKey(row.analyte)) return ALL_METHODS;
  const known = methodsOf(row.analyte).map((method) => ({ value: method.key as string, label: method.label }));
  const own = ALL_METHODS.filter(
    (option) => option.value === row.method && !known.some((one) => one.value === row.method),
  );
  return known.length === 0 ? ALL_METHODS : [NOT_GIVEN, ...known, ...own.filter((one) => one.value !== '')];
}

const DOUBT_OF_CELL: Readonly<Record<string, CellId>> = {
  'unit-missing': 'unit',
  'unit-unusual': 'unit',
  'unit-from-statement': 'unit',
  'unit-changed': 'unit',
  'area-unit-light-soil': 'unit',
  'method-changed': 'method',
  'method-missing': 'method',
  'ph-method-missing': 'method',
  'name-ambiguous': 'analyte',
};

const UNSURE: GridDoubt = {
  code: 'unsure',
  sentence: 'The reader was not sure of this one. Compare it with the page.',
};

/** Each doubt at the cell that it is about; what cannot be true first. */
export function doubtsOf(row: ReviewRow): Record<string, GridDoubt[]> {
  const found: Record<string, GridDoubt[]> = {};
  const put = (cell: CellId, doubt: GridDoubt) => {
    found[cell] = [...(found[cell] ?? []), doubt];
  };
  if (row.impossible !== null) put('value', { code: 'impossible', sentence: row.impossible, mustMend: true });
  if (row.analyte === null) {
    const sentence = 'Say what this row measures, or remove it.';
    put('analyte', { code: 'no-analyte', sentence, mustMend: true });
  }
  // An impossible value is odd as well; one sentence is enough.
  const rest = row.impossible === null ? row.doubts : row.doubts.filter((doubt) => doubt.code !== 'implausible');
  for (const doubt of rest) put(DOUBT_OF_CELL[doubt.code] ?? 'value', doubt);
  if (row.doubtful && row.doubts.length === 0 && row.impossible === null) put('value', UNSURE);
  return found;
}

const learntDay = (row: ReviewRow): string | null => (row.learnt === null ? null : dayInWords(asDay(row.learnt.on)));

/** Under each cell that the page left open and an earlier confirmation of the layout answers. */
export function notesOf(row: ReviewRow): Record<string, string> {
  const day = learntDay(row);
  if (day === null || row.learnt === null) return {};
  const words = `as you confirmed on ${day}`;
  const untouched = (cell: CellId) => row.original === null || (cell !== 'value' && row.original[cell] === row[cell]);
  return Object.fromEntries(
    row.learnt.filled
      .filter(isCellId)
      .filter(untouched)
      .map((cell) => [cell, words]),
  );
}

export function placeOf(row: ReviewRow): string {
  const day = learntDay(row);
  return day === null || row.learnt?.filled.length
    ? printedPlace(row)
    : `${printedPlace(row)}, as you confirmed on ${day}`;
}

function printedPlace(row: ReviewRow): string {
  if (row.page !== null && row.box !== null) return `Page ${row.page}`;
  if (row.cell) {
    const sheet = Number(row.cell.sheet ?? 1) > 1 ? `Sheet ${row.cell.sheet}, line` : 'Line';
    return `${sheet} ${row.cell.row}, column ${row.cell.column}`;
  }
  return 'Entered by hand';
}

/** What the page says: the laboratory's own words, number and unit, each once. */
export function printedWords(row: ReviewRow): string {
  if (row.state === 'added') return '';
  const value = row.original?.printed ?? row.printed;
  const told = row.unitPrinted && (row.label.includes(row.unitPrinted) || value.trimEnd().endsWith(row.unitPrinted));
  const unit = row.unitPrinted && !told ? ` ${row.unitPrinted}` : '';
  return [row.label, `${value}${unit}`].filter(Boolean).join(': ');
}

export function toGridRow(row: ReviewRow, subtitle: string | undefined): GridRow {
  const cells: Record<string, string> = { printed: printedWords(row) };
  for (const cell of EDITABLE) cells[cell] = cellText(row, cell);
  return {
    id: row.id,
    version: row.version,
    ...(subtitle ? { subtitle } : {}),
    cells,
    doubts: doubtsOf(row),
    notes: notesOf(row),
    options: { method: methodOptions(row) },
    place: placeOf(row),
  };
}

/** Texts that stand on the page or stood there: they are taken as the page means them. */
export function knownTexts(rows: readonly ReviewRow[]): ReadonlySet<string> {
  return new Set(rows.flatMap((row) => [row.printed.trim(), ...(row.original ? [row.original.printed.trim()] : [])]));
}

export function valueFault(text: string, known: ReadonlySet<string>): string | null {
  if (known.has(text.trim())) return null;
  const read = readValueText(text);
  return read.ok ? null : VALUE_TEXT_REASONS[read.reason];
}

const ELEMENT_ONLY = new Set([null, '', 'element']);

export function columnsFor(rows: readonly ReviewRow[], readOnly: boolean): readonly GridColumn[] {
  const known = knownTexts(rows);
  const anyForm = rows.some((row) => !ELEMENT_ONLY.has(row.form) || row.state === 'added');
  const anyPrinted = rows.some((row) => printedWords(row) !== '');
  const form: GridColumn = {
    id: 'form',
    header: 'Given as',
    kind: 'select',
    options: FORM_OPTIONS,
    widthClass: 'w-24',
  };
  const printed: GridColumn = { id: 'printed', header: 'On the page', kind: 'readonly', widthClass: 'w-36' };
  const columns: GridColumn[] = [
    {
      id: 'analyte',
      header: 'Analyte',
      kind: 'select',
      options: ANALYTE_OPTIONS,
      rowHeader: true,
      widthClass: 'w-44',
      // An empty analyte cannot be saved, and the list has no such line.
      validate: (value) => (isAnalyteKey(value) ? null : 'Not one of the choices. Press Enter and pick one.'),
    },
    {
      id: 'value',
      header: 'Value',
      kind: 'number',
      widthClass: 'w-40',
      validate: (value) => valueFault(value, known),
    },
    { id: 'unit', header: 'Unit', kind: 'select', options: UNIT_OPTIONS, widthClass: 'w-24' },
    { id: 'method', header: 'Method', kind: 'select', options: ALL_METHODS, widthClass: 'w-32' },
    ...(anyForm ? [form] : []),
    ...(anyPrinted ? [printed] : []),
  ];
  return readOnly
    ? columns.map((column) => ({ ...column, kind: column.kind === 'number' ? 'number' : column.kind }))
    : columns;
}

const rank = (row: ReviewRow): number => (row.impossible !== null || row.analyte === null ? 0 : row.doubtful ? 1 : 2);

/**
 * Doubtful rows of all samples first, then sample by sample in the order of the page. A row keeps the place it once
 * had while it is being mended: the list must not jump under the hands. New rows come last in their sample.
 */
export function stableOrder(
  rows: readonly ReviewRow[],
  sampleIds: readonly string[],
  before: readonly string[],
): readonly string[] {
  const shown = rows.filter((row) => row.state !== 'removed');
  const byId = new Map(shown.map((row) => [row.id, row]));
  const kept = before.filter((id) => byId.has(id));
  const known = new Set(kept);
  const fresh = shown.filter((row) => !known.has(row.id));
  const place = (row: ReviewRow) => sampleIds.indexOf(row.reportSampleId);
  if (kept.length === 0) {
    return fresh.sort((a, b) => rank(a) - rank(b) || place(a) - place(b) || a.ordinal - b.ordinal).map((row) => row.id);
  }
  const order = [...kept];
  for (const row of fresh.sort((a, b) => a.ordinal - b.ordinal)) {
    const last = order.findLastIndex((id) => byId.get(id)?.reportSampleId === row.reportSampleId);
    order.splice(last < 0 ? order.length : last + 1, 0, row.id);
  }
  return order;
}

export function marksOf(rows: readonly ReviewRow[], order: readonly string[], review: Review): readonly PageMark[] {
  const names = new Map(review.samples.map((sample) => [sample.id, sampleLabel(sample)]));
  const several = review.samples.length > 1;
  const byId = new Map(rows.map((row) => [row.id, row]));
  return order.flatMap((id, at) => {
    const row = byId.get(id);
    if (!row) return [];
    const what = row.analyte !== null && isAnalyteKey(row.analyte) ? analyte(row.analyte).label : row.label;
    const sample = names.get(row.reportSampleId);
    return [
      {
        rowId: row.id,
        label: several && sample ? `${what}, ${sample}` : what,
        rowNumber: at + 1,
        page: row.page,
        box: row.box,
        cell: row.cell ? { sheet: Number(row.cell.sheet ?? 1) || 1, row: row.cell.row, column: row.cell.column } : null,
      },
    ];
  });
}
