import { type AnalyteKey, analyte, type MethodKey, type UnitKey } from '@/lib/domain/analytes';
import { remark } from '../candidate';
import { plausibleDoubt } from '../checks/plausible';
import { methodIn, unitIn, unitOnly } from '../labels/label';
import { readDate } from '../stages/dates';
import type { Value } from '../stages/values';
import { readTableCell } from '../table/cell';
import { dateText } from '../table/fields';
import { isNoSample } from '../table/names';
import { labelOf, spoken } from '../table/spoken';
import type { Depth, Reading, ReadResult, ReadSample } from '../types';
import type { AppliedMapping, ColumnMeaning, OwnColumn, OwnMapping, OwnRows, RowProblem } from './types';

/** The mark of every row of such a reading: no laboratory's page stands behind it. */
export const TYPED_BY_GROWER = remark(
  'typed-by-grower',
  'Taken from your own spreadsheet: typed by the grower, with no laboratory page behind it.',
);

type Draft = { -readonly [Key in keyof ReadSample]: ReadSample[Key] } & { results: ReadResult[]; row: number };
type Desk = { readonly rows: OwnRows['rows']; readonly mapping: OwnMapping; readonly problems: RowProblem[] };
type Known = {
  readonly analyte: AnalyteKey;
  readonly label: string;
  readonly unit: UnitKey | null;
  readonly form: string | null;
  readonly method: MethodKey | null;
};

function columnOf(mapping: OwnMapping, kind: ColumnMeaning['kind']): OwnColumn | undefined {
  return mapping.columns.find((column) => column.meaning.kind === kind);
}

function cellAt(desk: Desk, row: number, column: OwnColumn | undefined): string {
  return column === undefined ? '' : (desk.rows[row]?.[column.column - 1] ?? '').trim();
}

function complain(
  desk: Desk,
  row: number,
  column: OwnColumn | undefined,
  text: string,
  code: RowProblem['code'],
  sentence: string,
  leftOut: boolean,
) {
  desk.problems.push({ row: row + 1, column: column?.column ?? null, text, code, sentence, leftOut });
}

function dayOf(desk: Desk, row: number): { iso: string | null; printed: string | null } {
  const column = columnOf(desk.mapping, 'date-sampled');
  const text = cellAt(desk, row, column);
  if (text === '') {
    if (column !== undefined)
      complain(
        desk,
        row,
        column,
        text,
        'date-missing',
        'This row has no day of sampling. Write it into the sheet if you know it.',
        false,
      );
    return { iso: null, printed: null };
  }
  const read = readDate(dateText(text), desk.mapping.dateOrder);
  if (read.ok) return { iso: read.iso, printed: text };
  const said = {
    unreadable: `"${text}" could not be read as a day. Write it like 2024-04-10.`,
    impossible: `"${text}" is not a possible day. Put it right in the sheet.`,
    ambiguous: `"${text}" can be day first or month first; choose how this sheet writes its dates.`,
  } as const;
  complain(desk, row, column, text, `date-${read.reason}`, said[read.reason], false);
  return { iso: null, printed: text };
}

function unitOf(column: OwnColumn | undefined, text: string): 'in' | 'cm' | null {
  if (/(\d|\b)cm\b/i.test(text)) return 'cm';
  if (/(\d|\b)in(ch(es)?)?\b|["”″]/i.test(text)) return 'in';
  const meaning = column?.meaning;
  return meaning !== undefined && 'unit' in meaning && (meaning.unit === 'in' || meaning.unit === 'cm')
    ? meaning.unit
    : null;
}

function depthOf(desk: Desk, row: number): Depth | null {
  const whole = columnOf(desk.mapping, 'depth');
  const [top, bottom] = [columnOf(desk.mapping, 'depth-top'), columnOf(desk.mapping, 'depth-bottom')];
  const text = cellAt(desk, row, whole);
  const [from, to] = [cellAt(desk, row, top), cellAt(desk, row, bottom)];
  const said = text !== '' ? text : to === '' ? '' : `${from === '' ? '0' : from}-${to}`;
  const numbers =
    said
      .replace(/,(\d)/g, '.$1')
      .match(/\d+(\.\d+)?/g)
      ?.map(Number) ?? [];
  if (numbers.length === 0) return null;
  const column = text !== '' ? whole : (bottom ?? top);
  const unit = unitOf(column, said);
  if (unit === null) {
    complain(
      desk,
      row,
      column,
      said,
      'depth-unit-missing',
      `The depth "${said}" has no unit; choose inches or centimetres for its column.`,
      false,
    );
    return null;
  }
  const [a = 0, b] = numbers;
  return b === undefined ? { top: 0, bottom: a, unit } : { top: a, bottom: b, unit };
}

function draftOf(desk: Desk, row: number): Draft {
  const { iso, printed } = dayOf(desk, row);
  const text = (kind: ColumnMeaning['kind']) => cellAt(desk, row, columnOf(desk.mapping, kind)) || null;
  return {
    sampleId: text('sample-name'),
    labNumber: text('lab-number'),
    fieldName: text('field-name'),
    depth: depthOf(desk, row),
    dateSampled: iso,
    dateSampledPrinted: printed,
    dateReported: null,
    dateReportedPrinted: null,
    results: [],
    row,
  };
}

function resultOf(desk: Desk, row: number, column: OwnColumn, known: Known, value: Value): ReadResult {
  const implied = analyte(known.analyte).unit;
  const unit = value.unit ?? known.unit ?? (implied === 'pH' || implied === 'ratio' ? implied : null);
  const result: ReadResult = {
    analyte: known.analyte,
    label: known.label,
    printed: value.printed,
    value: value.value,
    qualifier: value.qualifier,
    unit,
    unitPrinted: value.unitPrinted ?? known.unit,
    form: known.form,
    method: known.method,
    methodPrinted: null,
    rating: value.rating,
    primary: true,
    page: null,
    box: null,
    cell: { sheet: desk.mapping.sheet, row: row + 1, column: column.column },
    confidence: 1,
    doubts: [TYPED_BY_GROWER],
  };
  const doubts = [
    ...(unit === null ? [remark('unit-missing', 'The sheet gives no unit for this number.')] : []),
    ...[plausibleDoubt(result)].filter((doubt) => doubt !== null),
    ...(value.doubtful === null ? [] : [remark('number-format', value.doubtful)]),
  ];
  return { ...result, doubts: [...result.doubts, ...doubts] };
}

/** A number, or why there is none: an empty cell is nothing to complain of, other words are. */
function valueAt(desk: Desk, row: number, column: OwnColumn): Value | null {
  const text = cellAt(desk, row, column);
  if (text === '') return null;
  const meaning = readTableCell(text, { decimalComma: desk.mapping.decimalComma });
  if (meaning.kind === 'value') return meaning;
  if (meaning.kind !== 'none')
    complain(desk, row, column, text, 'not-a-number', `"${text}" is not a number and was left out.`, true);
  return null;
}

function sampleRow(desk: Desk, row: number): Draft {
  const draft = draftOf(desk, row);
  for (const column of desk.mapping.columns) {
    const { meaning } = column;
    if (meaning.kind !== 'result') continue;
    const value = valueAt(desk, row, column);
    if (value !== null) draft.results.push(resultOf(desk, row, column, { ...meaning, label: column.heading }, value));
  }
  return draft;
}

function numberRow(desk: Desk, row: number): Draft {
  const draft = draftOf(desk, row);
  const [nameColumn, valueColumn] = [columnOf(desk.mapping, 'analyte'), columnOf(desk.mapping, 'value')];
  if (nameColumn === undefined || valueColumn === undefined) return draft;
  const name = cellAt(desk, row, nameColumn);
  const label = labelOf(name);
  if (label === null) {
    const said =
      name === ''
        ? 'This row does not say what was measured and was left out.'
        : `"${name}" is not a soil test that Loamline knows; the row was left out.`;
    complain(desk, row, nameColumn, name, 'analyte-unknown', said, true);
    return draft;
  }
  const value = valueAt(desk, row, valueColumn);
  if (value === null) return draft;
  const [unitColumn, methodColumn] = [columnOf(desk.mapping, 'unit'), columnOf(desk.mapping, 'method')];
  const [unitText, methodText] = [cellAt(desk, row, unitColumn), cellAt(desk, row, methodColumn)];
  const unit = unitText === '' ? null : (unitOnly(spoken(unitText)) ?? unitIn(spoken(unitText)));
  if (unitText !== '' && unit === null)
    complain(
      desk,
      row,
      unitColumn,
      unitText,
      'unit-unknown',
      `"${unitText}" is not a unit that Loamline knows; the number was taken without one.`,
      false,
    );
  const method = methodText === '' ? null : methodIn(label.analyte, spoken(methodText));
  if (methodText !== '' && method === null)
    complain(
      desk,
      row,
      methodColumn,
      methodText,
      'method-unknown',
      `"${methodText}" is not a method that Loamline knows for this; the number was taken without one.`,
      false,
    );
  const known = { ...label, label: name, unit: unit?.unit ?? label.unit, method: method?.method ?? label.method };
  draft.results.push(resultOf(desk, row, valueColumn, known, value));
  return draft;
}

const bagOf = (sample: ReadSample) =>
  JSON.stringify([
    sample.sampleId?.toLowerCase(),
    sample.labNumber,
    sample.fieldName,
    sample.dateSampled,
    sample.dateSampledPrinted,
    sample.depth,
  ]);

/** Rows of one sample and day come together; the same number twice is said and taken once. */
function gathered(desk: Desk, drafts: readonly Draft[]): ReadSample[] {
  const bags = new Map<string, Draft>();
  for (const draft of drafts) {
    if (draft.results.length === 0) continue;
    const key = desk.mapping.layout === 'number-per-row' ? bagOf(draft) : `${draft.row}`;
    const bag = bags.get(key);
    if (bag === undefined) {
      bags.set(key, draft);
      continue;
    }
    for (const result of draft.results) {
      const twice = bag.results.some(
        (other) =>
          other.analyte === result.analyte &&
          other.unit === result.unit &&
          other.method === result.method &&
          other.printed === result.printed,
      );
      if (!twice) bag.results.push(result);
      else
        complain(
          desk,
          draft.row,
          undefined,
          result.printed,
          'row-twice',
          `${result.label} ${result.printed} of this sample stands twice in the sheet; it was taken once.`,
          true,
        );
    }
  }
  return [...bags.values()].map(({ row: _row, ...sample }) => sample);
}

/**
 * The reading that a mapping makes of a grower's own sheet. Every number keeps its cell and is marked as typed by the
 * grower; what could not be taken is a problem of its row, with a sentence. Nothing is guessed: a unit or method that
 * neither the mapping nor the row gives is null.
 */
export function applyMapping(input: { fileName: string; sheet: OwnRows; mapping: OwnMapping }): AppliedMapping {
  const { mapping, sheet } = input;
  const desk: Desk = { rows: sheet.rows, mapping, problems: [] };
  const drafts: Draft[] = [];
  let rows = 0;
  for (let row = mapping.headingRow; row < sheet.rows.length; row++) {
    if ((sheet.rows[row] ?? []).every((cell) => cell.trim() === '')) continue;
    const name = cellAt(desk, row, columnOf(mapping, 'sample-name'));
    if (name !== '' && isNoSample(name, {})) continue;
    rows += 1;
    const draft = mapping.layout === 'sample-per-row' ? sampleRow(desk, row) : numberRow(desk, row);
    if (draft.results.length > 0 && draft.sampleId === null && draft.labNumber === null)
      complain(
        desk,
        row,
        columnOf(mapping, 'sample-name'),
        '',
        'name-missing',
        'This row has no name of a plot or sample; all such rows are put to one plot.',
        false,
      );
    drafts.push(draft);
  }
  const samples = gathered(desk, drafts);
  const laboratory = columnOf(mapping, 'laboratory');
  const names =
    laboratory === undefined
      ? []
      : [...new Set(drafts.map((draft) => cellAt(desk, draft.row, laboratory)).filter((name) => name !== ''))];
  const reading: Reading = {
    file: input.fileName,
    kind: 'soil',
    error: null,
    pages: 0,
    warnings: [],
    lab: { name: names.length === 1 ? (names[0] ?? null) : null },
    samples,
    recommendations: [],
  };
  const results = samples.reduce((sum, sample) => sum + sample.results.length, 0);
  const leftOut = desk.problems.filter((problem) => problem.leftOut).length;
  return { reading, problems: desk.problems, counts: { rows, samples: samples.length, results, leftOut } };
}
