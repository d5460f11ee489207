import { type Label, methodIn, readLabel, unitIn, unitOnly } from '../labels/label';
import type { CellLine, PageCell } from './cells';
import { fieldOf, fieldWithValue } from './identity';
import { roleOf } from './roles';
import { isRatingHere, labelText, rowRoleOf, type Segment, wrappedLabel } from './rowLabels';

const NUMBERLIKE = new Set(['value', 'none', 'range']);

function hasNumberAfter(line: CellLine, index: number): boolean {
  return line.cells
    .slice(index + 1)
    .some((cell) => cell.meaning.kind === 'value' || cell.meaning.kind === 'none' || cell.meaning.kind === 'range');
}

/** "Test | 2022 | 2024 | 2026": years beside a word that is no name by itself are the heading of the rows under them. */
function headsYears(line: CellLine, cell: PageCell): boolean {
  const numbers = line.cells.filter((one) => one.meaning.kind === 'value');
  const text = labelText(cell.phrase.text);
  return (
    numbers.every((one) => /^(19|20)\d\d$/.test(one.phrase.text)) &&
    (numbers.length >= 2 || (numbers.length === 1 && roleOf(text, true) === 'analyte')) &&
    readLabel(text) === null
  );
}

type Start = { index: number; label: Label; cell: PageCell; wrapped: readonly CellLine[]; x1: number; tail: string };

/** Labels of one line. A second label begins only after a number of the first. */
function startsOf(lines: readonly CellLine[], at: number, notLabel: (cell: PageCell) => boolean): Start[] {
  const line = lines[at];
  if (line === undefined) return [];
  const starts: Start[] = [];
  for (const [index, cell] of line.cells.entries()) {
    if (NUMBERLIKE.has(cell.meaning.kind) || cell.meaning.kind === 'date' || isRatingHere(line, index)) continue;
    const leftOnly = starts.length === 0 && line.cells.slice(0, index).some((one) => one.meaning.kind === 'value');
    if ((!hasNumberAfter(line, index) && !leftOnly) || notLabel(cell)) continue;
    if (fieldOf(cell.phrase.text) !== null && cell.phrase.text.trim().endsWith(':')) continue;
    const last = starts[starts.length - 1];
    const filled =
      last !== undefined && line.cells.slice(last.index + 1, index).some((one) => NUMBERLIKE.has(one.meaning.kind));
    const next = line.cells.slice(index + 1).find((one) => NUMBERLIKE.has(one.meaning.kind));
    const end = next?.phrase.x0 ?? cell.phrase.x1;
    const valued = line.cells
      .slice(index + 1)
      .some((one) => one.meaning.kind === 'value' || one.meaning.kind === 'none');
    if (last !== undefined && filled && !valued) continue;
    if (headsYears(line, cell)) continue;
    const found = wrappedLabel(lines, at, cell, end);
    if (found === null || (fieldOf(cell.phrase.text) !== null && found.lines.length === 0)) continue;
    if (last !== undefined && !filled) {
      const joined = readLabel(`${labelText(last.cell.phrase.text)} ${labelText(cell.phrase.text)}`);
      if (joined !== null && joined.analyte === last.label.analyte) continue;
      const share = readLabel(labelText(cell.phrase.text), [last.cell.phrase.text]);
      if (found.label.analyte === last.label.analyte) continue;
      starts[starts.length - 1] = {
        index,
        label: joined ?? share ?? found.label,
        cell,
        wrapped: found.lines,
        x1: found.x1,
        tail: found.tail,
      };
      continue;
    }
    starts.push({ index, label: found.label, cell, wrapped: found.lines, x1: found.x1, tail: found.tail });
  }
  return starts;
}

type Group = { readonly label: Label; readonly line: CellLine; readonly cell: PageCell };

/** An analyte alone on its line, over rows that say "ppm", "Mehlich-3" or "Value found". */
function groupOn(line: CellLine): Group | null {
  const [first, ...rest] = line.cells;
  if (
    first === undefined ||
    rest.some((cell) => NUMBERLIKE.has(cell.meaning.kind)) ||
    NUMBERLIKE.has(first.meaning.kind)
  )
    return null;
  const label = readLabel(labelText(first.phrase.text));
  return label === null || label.strength < 0.96 ? null : { label, line, cell: first };
}

/** A row under a group heading: its own words give the role, the unit or the method. */
function rowOfGroup(line: CellLine, group: Group | null): Segment | null {
  const first = line.cells[0];
  if (group === null || first === undefined || first.meaning.kind !== 'text') return null;
  if (!line.cells.slice(1).some((cell) => NUMBERLIKE.has(cell.meaning.kind))) return null;
  if (first.phrase.x0 < group.cell.phrase.x0 - 1 || fieldWithValue(first.phrase.text) !== null) return null;
  const text = labelText(first.phrase.text);
  const rowRole = rowRoleOf(text);
  const tells = rowRole !== null || unitOnly(text) !== null || methodIn(group.label.analyte, text) !== null;
  const label = readLabel(`${group.label.text} ${text}`, []) ?? group.label;
  if (!tells && readLabel(`${group.label.text} ${text}`) === null) return null;
  const unit = unitIn(text);
  return {
    line,
    label: {
      ...(label.analyte === group.label.analyte ? label : group.label),
      text: `${group.label.text} ${text}`,
      unit: label.unit ?? group.label.unit ?? unit?.unit ?? null,
      unitPrinted: label.unitPrinted ?? group.label.unitPrinted ?? unit?.printed ?? null,
    },
    x0: group.cell.phrase.x0,
    x1: first.phrase.x1,
    cells: line.cells.slice(1),
    wrapped: [],
    rowRole: rowRole === 'result' ? null : rowRole,
    tail: '',
  };
}

/** Label set over and under a line that holds only its numbers. */
function labelAround(lines: readonly CellLine[], at: number): Segment | null {
  const [above, line, under] = [lines[at - 1], lines[at], lines[at + 1]];
  const [first, over, below] = [line?.cells[0], above?.cells[0], under?.cells[0]];
  if (line === undefined || first?.meaning.kind !== 'value' || above === undefined || under === undefined) return null;
  if (over === undefined || below === undefined || above.values !== 0 || under.values !== 0) return null;
  if (
    Math.abs(over.phrase.x0 - below.phrase.x0) > over.phrase.size ||
    over.phrase.x1 > first.phrase.x0 + over.phrase.size
  )
    return null;
  if (
    first.phrase.y0 - over.phrase.y1 > 0.3 * first.phrase.size ||
    below.phrase.y0 - first.phrase.y1 > 0.3 * first.phrase.size
  )
    return null;
  const label = readLabel(labelText(`${over.phrase.text} ${below.phrase.text}`));
  if (label === null) return null;
  return {
    line,
    label: { ...label, strength: Math.min(label.strength, 0.96) },
    x0: over.phrase.x0,
    x1: Math.max(over.phrase.x1, below.phrase.x1),
    cells: line.cells,
    wrapped: [above, under],
    rowRole: null,
    tail: '',
  };
}

/** Names down the middle, the numbers of one sample to the left and of another to the right. */
function toTheLeft(line: CellLine, starts: readonly Start[]): Segment[] | null {
  const [start] = starts;
  if (start === undefined || starts.length !== 1) return null;
  const left = line.cells.slice(0, start.index);
  const right = line.cells.slice(start.index + 1);
  const first = left.find((cell) => NUMBERLIKE.has(cell.meaning.kind));
  if (first === undefined || left.some((cell) => cell.meaning.kind === 'text' || cell.meaning.kind === 'date'))
    return null;
  if (left.filter((cell) => cell.meaning.kind === 'value').length > 1) return null;
  const ordered = [first, ...left.filter((cell) => cell !== first)];
  const base = { line, label: start.label, x1: start.x1, wrapped: start.wrapped, rowRole: null, tail: start.tail };
  const other = right.find((cell) => NUMBERLIKE.has(cell.meaning.kind));
  return [
    { ...base, x0: first.phrase.x0, x1: first.phrase.x0, cells: ordered },
    ...(other === undefined ? [] : [{ ...base, x0: other.phrase.x0, x1: other.phrase.x0, cells: right }]),
  ];
}

/**
 * Rows of lists: each label with the cells that follow it up to the next label. Lines in `taken` are left out; a cell
 * of which `notLabel` is true begins no row.
 */
export function segmentsOf(
  lines: readonly CellLine[],
  taken: ReadonlySet<CellLine>,
  notLabel: (cell: PageCell) => boolean,
): Segment[] {
  const segments: Segment[] = [];
  let group: Group | null = null;
  for (const [at, line] of lines.entries()) {
    if (taken.has(line)) continue;
    if (
      group !== null &&
      (group.line.line.page !== line.line.page || line.line.y0 - group.line.line.y1 > 9 * line.line.size)
    )
      group = null;
    if (!line.cells.some((cell) => NUMBERLIKE.has(cell.meaning.kind))) {
      group = groupOn(line) ?? group;
      continue;
    }
    const starts = startsOf(lines, at, notLabel);
    if (starts.length === 0) {
      const one = labelAround(lines, at) ?? rowOfGroup(line, group);
      if (one !== null) segments.push(one);
      continue;
    }
    const middle = toTheLeft(line, starts);
    if (middle !== null) segments.push(...middle);
    else
      for (const [order, start] of starts.entries()) {
        const end = starts[order + 1]?.index ?? line.cells.length;
        segments.push({
          line,
          label: start.label,
          x0: start.cell.phrase.x0,
          x1: start.x1,
          cells: line.cells.slice(start.index + 1, end),
          wrapped: start.wrapped,
          rowRole: null,
          tail: start.tail,
        });
      }
    const first = starts[0];
    if (group !== null && first !== undefined && first.cell.phrase.x0 <= group.cell.phrase.x0 + 1) group = null;
  }
  return segments;
}
