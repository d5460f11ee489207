import { type Candidate, type Identity, remark, type SamplePart } from '../candidate';
import { readLabel, unitOnly } from '../labels/label';
import { type CellLine, numberBox, type PageCell } from './cells';
import { type Column, columnsOf, headerScore, spansOf } from './columns';
import { fieldsInside, fieldWithValue, isCode } from './identity';
import { JUST_RESULT, NOT_A_SAMPLE, type NotTaken, roleOf } from './roles';
import { storedBox } from './words';

export type Table = {
  readonly header: readonly CellLine[];
  readonly rows: readonly CellLine[];
  readonly columns: readonly Column[];
  readonly borrowed: boolean;
};

export type AdviceCell = { readonly sampleKey: Identity; readonly column: Column; readonly cell: PageCell };
export type TableRow = SamplePart & { readonly line: CellLine; readonly advice: readonly AdviceCell[] };

const HEADER_LINES = 9;

function samePage(a: CellLine, b: CellLine): boolean {
  return a.line.page === b.line.page;
}

function labelsIn(line: CellLine): number {
  return line.cells.filter((cell) => cell.meaning.kind !== 'value' && readLabel(cell.phrase.text) !== null).length;
}

function headerAbove(lines: readonly CellLine[], at: number, taken: ReadonlySet<CellLine>): CellLine[] {
  const header: CellLine[] = [];
  let under = lines[at];
  for (let index = at - 1; index >= 0 && header.length < HEADER_LINES; index--) {
    const line = lines[index];
    if (line === undefined || under === undefined || taken.has(line) || !samePage(line, under) || line.values >= 2)
      break;
    if (line.values === 1 && labelsIn(line) > 0) break;
    if (line.cells.some((cell) => namesASample(cell))) break;
    const gap = under.line.y0 - line.line.y1;
    if (gap > (header.length === 0 ? 4 : 2.2) * line.line.size) break;
    header.unshift(line);
    under = line;
  }
  return header;
}

/** Labels of a line that have their number right behind them: a list, not a row of a table. */
function labelledPairs(line: CellLine): number {
  return line.cells.filter(
    (cell, index) =>
      cell.meaning.kind === 'text' &&
      line.cells[index + 1]?.meaning.kind === 'value' &&
      readLabel(cell.phrase.text) !== null,
  ).length;
}

function namesASample(cell: PageCell): boolean {
  return (
    fieldWithValue(cell.phrase.text) !== null || fieldsInside(cell.phrase.words.map((word) => word.text)).length > 0
  );
}

/** "Nutrient | lb/acre | ppm | Rating": the head of another table. */
function isRoleLine(line: CellLine): boolean {
  if (line.values > 0 || line.cells.length < 2) return false;
  const roles = line.cells.map((cell, index) => roleOf(cell.phrase.text, index === 0));
  const known = roles.filter((role, index) => role !== null || unitOnly(line.cells[index]?.phrase.text ?? '') !== null);
  return (
    known.length >= 2 &&
    known.length >= 0.6 * line.cells.length &&
    roles.some((role) => role === 'analyte' || role === 'result')
  );
}

/** A row that begins with an analyte, when the table's rows do not: a list stands under the table. */
function beginsList(line: CellLine, first: CellLine): boolean {
  const [cell] = line.cells;
  const [top] = first.cells;
  if (cell === undefined || top === undefined || line.values === 0) return false;
  const label = cell.meaning.kind === 'value' ? null : readLabel(cell.phrase.text);
  return label !== null && label.strength >= 0.97 && top.meaning.kind === 'value';
}

/** Rows under a header: until a new header, a wide gap, or lines that fit no column. */
function rowsFrom(lines: readonly CellLine[], at: number): CellLine[] {
  const rows: CellLine[] = [];
  let last: CellLine | undefined;
  for (const line of lines.slice(at)) {
    if (last !== undefined) {
      if (!samePage(line, last)) break;
      if (line.line.y0 - last.line.y1 > 5 * last.line.size) break;
      const headings = labelsIn(line);
      if (headings >= 3 && line.values <= 1 && !isRatingRow(line)) break;
      if (labelledPairs(line) >= 2 || isRoleLine(line) || (rows[0] !== undefined && beginsList(line, rows[0]))) break;
    }
    rows.push(line);
    last = line;
  }
  return rows;
}

function isRow(line: CellLine, columns: readonly Column[]): boolean {
  const hits = line.cells.filter(
    (cell) => cell.meaning.kind === 'value' && columnAt(columns, cell)?.label != null,
  ).length;
  const named = line.cells.some((cell) => columnAt(columns, cell)?.field != null);
  return hits >= 2 || (hits === 1 && named);
}

function columnAt(columns: readonly Column[], cell: PageCell): Column | undefined {
  let best: Column | undefined;
  let most = 0;
  for (const column of columns) {
    const over = Math.min(column.x1, cell.phrase.x1) - Math.max(column.x0, cell.phrase.x0);
    if (over > most) [best, most] = [column, over];
  }
  return best;
}

function trustworthy(columns: readonly Column[]): boolean {
  const named = columns.filter((column) => column.label !== null).length;
  const free = columns.filter((column) => column.field === null).length;
  return named >= 3 || (named === 2 && free <= 3);
}

const NEVER_ADVISED = new Set([
  'soil_ph_water',
  'soil_ph_salt',
  'buffer_ph',
  'organic_matter',
  'cec',
  'base_saturation',
  'ec',
  'sat_ca',
  'sat_mg',
  'sat_k',
  'clay',
]);

function isOxide(column: Column): boolean {
  return column.label?.form === 'P2O5' || column.label?.form === 'K2O';
}

function isLime(column: Column): boolean {
  return column.label?.analyte === 'lime_requirement' && !/requirement|index|\blr\b/i.test(column.heading);
}

const ADVISED = /\b(suggest|recommend|to apply|advice|advised)/i;

/**
 * Columns of what to spread: "Crop | N | P2O5 | K2O | Lime" with nothing that only a soil has, or P2O5 and K2O to
 * apply beside the P and K that were found.
 */
function withAdvice(columns: readonly Column[]): Column[] {
  const oxides = columns.filter(isOxide);
  const heading = (pattern: RegExp) => columns.some((column) => pattern.test(column.heading));
  const soil = columns.some((column) => column.label !== null && NEVER_ADVISED.has(column.label.analyte));
  const frame = heading(/^(N|nitrogen)\b/i) || heading(/\blime/i) || heading(/\bcrop/i);
  const all = oxides.length > 0 && !soil && frame;
  const found = columns.some(
    (column) => column.label?.form === 'element' && /^(phosphorus|potassium)$/.test(column.label.analyte),
  );
  const [head] = columns;
  const titled = head !== undefined && head.label === null && head.field === null && ADVISED.test(head.heading);
  const some = oxides.length > 0 && soil && found && (oxides.length >= 2 || frame);
  return columns.map((column) => {
    const nitrogen = column.label === null && column.field === null && /^(N|nitrogen)\b/i.test(column.heading);
    const advised = all
      ? column.label !== null || nitrogen
      : some
        ? isOxide(column) || isLime(column) || nitrogen
        : isLime(column) && oxides.length > 0;
    return advised || isLime(column) ? { ...column, role: 'recommendation' as const } : column;
  });
}

/** Stage 5a. Tables with analytes across the top. A table at the top of a page without a header borrows the last one. */
export function tablesOf(lines: readonly CellLine[]): Table[] {
  const tables: Table[] = [];
  const taken = new Set<CellLine>();
  for (const [at, line] of lines.entries()) {
    if (taken.has(line) || line.values < 2) continue;
    const block = rowsFrom(lines, at);
    const data = block.filter((row, index) => row.values >= 2 && (index === 0 || labelsIn(row) < 2));
    const above = headerAbove(lines, at, taken);
    const under = unitsUnder(block);
    let best: { header: CellLine[]; columns: Column[]; score: number } | null = null;
    for (let count = 1; count <= above.length; count++) {
      const header = [...above.slice(above.length - count), ...under];
      const columns = columnsOf(header, data);
      const score = headerScore(columns);
      if (trustworthy(columns) && score >= (best?.score ?? 0.01)) best = { header, columns, score };
    }
    const borrowed = best === null ? borrow(tables[tables.length - 1], data, line, lines, at) : null;
    const plain = best?.columns ?? borrowed;
    if (plain === null || plain === undefined) continue;
    const columns = withAdvice(plain);
    const rows = block.filter((row) => isRow(row, columns) || isRatingRow(row) || isTail(row, columns));
    for (const used of [...(best?.header ?? []), ...rows]) taken.add(used);
    tables.push({ header: best?.header ?? [], rows, columns, borrowed: best === null });
  }
  return tables;
}

/** A line of units or methods set under the numbers instead of over them. */
function unitsUnder(block: readonly CellLine[]): CellLine[] {
  const line = block[1];
  if (line === undefined || line.values > 0 || line.cells.length < 2) return [];
  const units = line.cells.filter((cell) => unitOnly(cell.phrase.text) !== null).length;
  return units >= 2 && units >= 0.5 * line.cells.length ? [line] : [];
}

function borrow(
  last: Table | undefined,
  data: readonly CellLine[],
  line: CellLine,
  lines: readonly CellLine[],
  at: number,
): Column[] | null {
  const previous = last?.rows[0];
  if (last === undefined || previous === undefined || samePage(previous, line)) return null;
  if (line.line.page.number !== previous.line.page.number + 1) return null;
  const before = lines.slice(0, at).filter((other) => samePage(other, line) && other.values >= 2);
  if (before.length > 0) return null;
  const spans = spansOf(data);
  const matched = spans.filter((span) =>
    last.columns.some((column) => Math.min(column.x1, span.x1) - Math.max(column.x0, span.x0) > 0),
  );
  if (spans.length < 3 || matched.length < 0.85 * spans.length) return null;
  return [...last.columns];
}

function isRatingRow(line: CellLine): boolean {
  if (line.values > 0) return false;
  const [first, ...rest] = line.cells;
  const named = first !== undefined && rest.length > 0 && roleOf(first.phrase.text, false) === 'rating';
  if (named)
    return rest.every(
      (cell) => cell.phrase.text.length <= 16 && (cell.phrase.text.length < 3 || readLabel(cell.phrase.text) === null),
    );
  const ratings = line.cells.filter((cell) => cell.meaning.kind === 'rating').length;
  return ratings > 0 && ratings >= 0.6 * line.cells.length && line.values === 0;
}

/** The rest of a sample name that went on to the next line. */
function isTail(line: CellLine, columns: readonly Column[]): boolean {
  return (
    line.values === 0 &&
    line.cells.length <= 2 &&
    line.cells.every((cell) => columnAt(columns, cell)?.field === 'sampleId')
  );
}

function ratingFor(row: CellLine, cell: PageCell, columns: readonly Column[]): string | null {
  const index = row.cells.indexOf(cell);
  const next = row.cells[index + 1];
  if (next?.meaning.kind !== 'rating') return null;
  const between = columns.some(
    (column) => column.label !== null && column.x0 > cell.phrase.x1 && column.x1 < next.phrase.x0,
  );
  return between ? null : next.meaning.rating;
}

/** "lb/A" or "ppm" at the head of a row is the unit of its numbers. */
function rowUnit(row: CellLine, table: Table): ReturnType<typeof unitOnly> {
  const [first] = row.cells;
  if (first === undefined || first.meaning.kind === 'value' || columnAt(table.columns, first)?.label != null)
    return null;
  return unitOnly(first.phrase.text);
}

function candidateOf(
  row: CellLine,
  cell: PageCell,
  column: Column,
  table: Table,
  under: string | null,
): Candidate | null {
  if (cell.meaning.kind !== 'value' || column.label === null) return null;
  const unitOfRow = rowUnit(row, table);
  const shared = unitOfRow?.unit === '%' ? readLabel(`${column.label.text} %`) : null;
  const label = shared?.analyte.startsWith('sat_') && column.label.unit === null ? shared : column.label;
  const value = cell.meaning;
  return {
    label: { ...label, text: column.heading },
    value,
    rating: value.rating ?? ratingFor(row, cell, table.columns) ?? under,
    unit: value.unit ?? unitOfRow?.unit ?? label.unit,
    unitPrinted: value.unitPrinted ?? unitOfRow?.printed ?? label.unitPrinted,
    method: label.method,
    methodPrinted: label.methodPrinted,
    page: row.line.page.number,
    box: storedBox(row.line.page, numberBox(cell.phrase, value.span)),
    cell: null,
    position: column.position * (table.borrowed ? 0.95 : 1),
    doubts: table.borrowed
      ? [remark('header-on-page-before', 'The headings of this column stand on the page before.')]
      : [],
  };
}

function rowIdentity(row: CellLine, table: Table): Identity {
  const identity: Identity = {};
  for (const cell of row.cells) {
    const column = columnAt(table.columns, cell);
    if (column === undefined) continue;
    const first = table.columns.find((other) => other.label === null && other.role !== 'recommendation');
    const field =
      column.field ??
      (column === first && cell.meaning.kind === 'text' && !table.columns.some((other) => other.field === 'sampleId')
        ? 'sampleId'
        : null);
    if (field !== null && !JUST_RESULT.test(cell.phrase.text) && unitOnly(cell.phrase.text) === null)
      identity[field] = identity[field] === undefined ? cell.phrase.text : `${identity[field]} ${cell.phrase.text}`;
  }
  return identity;
}

/** A column whose cells say what each row is: "Found", "Desired", "Mar 2025". */
function rowKinds(table: Table): ReadonlyMap<CellLine, string> {
  for (const column of table.columns) {
    if (column.label !== null) continue;
    const said = table.rows.flatMap((row) => {
      const cell = row.cells.find((one) => columnAt(table.columns, one) === column);
      return cell === undefined ? [] : [{ row, text: cell.phrase.text }];
    });
    const roles = said.filter(({ text }) => JUST_RESULT.test(text) || roleOf(text, false) !== null);
    const results = roles.filter(({ text }) => JUST_RESULT.test(text) || roleOf(text, false) === 'result');
    if (results.length >= 1 && roles.length > results.length && roles.length >= 0.5 * said.length)
      return new Map(said.map(({ row, text }) => [row, text]));
  }
  return new Map();
}

/** Stage 6a. One part per row of a table; rating rows and name tails go to the row above them. */
export function rowsOfTable(table: Table, notTaken: NotTaken[] = []): TableRow[] {
  const rows: TableRow[] = [];
  const kinds = rowKinds(table);
  for (const [index, row] of table.rows.entries()) {
    const last = rows[rows.length - 1];
    if (isRatingRow(row)) continue;
    const kind = kinds.get(row);
    if (kind !== undefined && !JUST_RESULT.test(kind) && roleOf(kind, false) !== 'result' && row.values > 0) {
      notTaken.push(
        ...row.cells
          .filter((cell) => cell.meaning.kind === 'value')
          .map((cell) => ({ cell, role: roleOf(kind, false) ?? ('previous' as const), why: `its row says "${kind}"` })),
      );
      continue;
    }
    if (last !== undefined && isTail(row, table.columns) && row.line.y0 - last.line.line.y1 < 1.2 * row.line.size) {
      const tail = row.cells.map((cell) => cell.phrase.text).join(' ');
      const before = last.identity.sampleId;
      const code = before !== undefined && last.identity.labNumber === undefined && isCode(tail);
      rows[rows.length - 1] = {
        ...last,
        identity: code
          ? { ...last.identity, labNumber: tail }
          : { ...last.identity, sampleId: before === undefined ? tail : `${before} ${tail}` },
      };
      continue;
    }
    const identity = rowIdentity(row, table);
    const [first] = row.cells;
    const lead = first === undefined || columnAt(table.columns, first)?.label != null ? '' : first.phrase.text;
    const name = identity.sampleId ?? identity.labNumber ?? lead;
    if (NOT_A_SAMPLE.test(name)) {
      notTaken.push(
        ...row.cells
          .filter((cell) => cell.meaning.kind === 'value')
          .map((cell) => ({
            cell,
            role: roleOf(name, false) ?? ('several' as const),
            why: `its row is headed "${name}"`,
          })),
      );
      continue;
    }
    const [before, next] = [table.rows[index - 1], table.rows[index + 1]];
    // Two rows of one sample in two units share the ratings between them.
    const shared = before !== undefined && isRatingRow(before) && rowUnit(row, table) !== null ? before : null;
    const ratings = next !== undefined && isRatingRow(next) ? next : shared;
    const candidates: Candidate[] = [];
    const advice: AdviceCell[] = [];
    for (const cell of row.cells) {
      const column = columnAt(table.columns, cell);
      if (column === undefined || cell.meaning.kind !== 'value') continue;
      if (column.role === 'recommendation') advice.push({ sampleKey: identity, column, cell });
      if (column.label === null || column.role !== null) {
        if (column.role !== null && column.role !== 'rating')
          notTaken.push({ cell, role: column.role, why: `stands under "${column.heading}"` });
        continue;
      }
      const under = ratings?.cells.find((other) => columnAt(table.columns, other) === column);
      const candidate = candidateOf(
        row,
        cell,
        column,
        table,
        under?.meaning.kind === 'rating'
          ? under.meaning.rating
          : under?.meaning.kind === 'text'
            ? under.phrase.text
            : null,
      );
      if (candidate !== null) candidates.push(candidate);
    }
    rows.push({ identity, candidates, line: row, advice });
  }
  return rows.filter((row) => row.candidates.length > 0);
}
