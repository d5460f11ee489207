import { methodIn, unitOnly } from '../labels/label';
import { fieldWithValue } from '../stages/identity';
import type { Facts } from './facts';
import { fieldOf } from './fields';
import { roleIn } from './headingRole';
import { ANALYTE_HEAD } from './listColumns';
import { spoken } from './spoken';

/** A table with samples down and analytes across: its heading rows, and the rows under them up to the next table. */
export type Block = {
  readonly captionRows: readonly number[];
  readonly base: number;
  readonly underRows: readonly number[];
  readonly from: number;
  readonly to: number;
};

const MOST_CAPTIONS = 4;
/** "0-6", "6 to 24 in": in a heading it is the depth of its column. */
export const DEPTH = /^\d{1,3}\s*(?:-|–|to)\s*\d{1,3}\s*(?:in(?:ches)?|cm|"|”)?$/i;

function isHead(facts: Facts, row: number): boolean {
  const one = facts.rows[row];
  if (one === undefined || one.labels.length === 0) return false;
  // "Test, Result, Unit" are the headings of a list, whatever else stands beside them.
  const cells = facts.grid[row] ?? [];
  const list = cells.some((cell) => ANALYTE_HEAD.test(spoken(cell))) && cells.some((cell) => roleIn(cell) === 'result');
  if (list && one.analytes < 2) return false;
  if (one.values > 0 && !(one.analytes >= 4 && one.values <= 1)) return false;
  return (
    one.analytes >= 2 || (one.labels.length >= 1 && one.fields >= 1 && one.filled <= one.labels.length + one.fields + 3)
  );
}

/** Headings without a number under them before the next heading are a list of names or a note. */
function hasNumbers(facts: Facts, row: number, end: number): boolean {
  const labels = facts.rows[row]?.labels ?? [];
  const last = Math.min(end, row + 12);
  for (let at = row + 1; at < last; at++)
    if (labels.some((column) => facts.meaning(at, column).kind === 'value')) return true;
  return false;
}

/** "Client: Mill Farm" or "Reported,2024-10-12": words about the file, not about columns. */
export function isMetadata(facts: Facts, row: number): boolean {
  const one = facts.rows[row];
  const cells = facts.grid[row] ?? [];
  if (one === undefined || one.filled === 0) return false;
  if (cells.some((cell) => fieldWithValue(cell) !== null || /^[^:]{2,40}:\s*\S/.test(cell))) return true;
  if (one.values + one.dates > 0) return true;
  const first = cells.findIndex((cell) => cell !== '');
  return (
    one.filled <= 2 &&
    first === 0 &&
    (one.filled === 1 || /:$/.test(cells[0] ?? '') || fieldOf(cells[0] ?? '') === 'other')
  );
}

function captionsOver(facts: Facts, base: number): number[] {
  const rows: number[] = [];
  for (let row = base - 1; row >= 0 && rows.length < MOST_CAPTIONS; row--) {
    const one = facts.rows[row];
    if (one === undefined || one.filled === 0 || isMetadata(facts, row)) break;
    if ((facts.grid[row] ?? []).some((cell) => cell.length > 60)) break;
    rows.unshift(row);
  }
  return rows;
}

/** Rows under the headings that say more of them: units, methods, kinds of column, a second line of words. */
function saysMore(facts: Facts, base: number, row: number): boolean {
  const one = facts.rows[row];
  const labels = facts.rows[base]?.labels ?? [];
  if (one === undefined || one.filled === 0 || one.values > 0 || one.dates > 0) return false;
  const cells = labels.map((column) => ({ text: facts.at(row, column), label: facts.label(base, column) }));
  const filled = cells.filter((cell) => cell.text !== '');
  if (filled.length === 0) return false;
  const telling = filled.filter(
    ({ text, label }) =>
      unitOnly(spoken(text)) !== null ||
      (label !== null && methodIn(label.analyte, spoken(text)) !== null) ||
      roleIn(text) !== null ||
      /^(units?|su|none|std|index|ratio|s\.?u\.?)$/i.test(text),
  );
  if (telling.length >= 0.5 * filled.length) return true;
  // Depths of the columns, with the units on the next line.
  if (filled.filter(({ text }) => DEPTH.test(text)).length >= 0.5 * filled.length && filled.length > 1) return true;
  const words = filled.filter(
    ({ text, label }) => /[A-Za-z]{2}/.test(text) && label !== null && facts.meaning(row, 0).kind !== 'date',
  );
  const named = /^(units?|methods?|extract|analysis|test|procedure)/i.test(facts.at(row, 0));
  const kinds = filled.every(
    ({ text }) =>
      facts.meaning(
        row,
        cells.findIndex((cell) => cell.text === text),
      ).kind !== 'none',
  );
  return (
    kinds &&
    words.length === filled.length &&
    filled.length >= 0.6 * labels.length &&
    (named || facts.at(row, 0) === '')
  );
}

/** The tables of a sheet that have samples down and analytes across. */
export function blocksOf(facts: Facts): Block[] {
  const heads = facts.rows.flatMap((_, row) => (isHead(facts, row) ? [row] : []));
  const bases: number[] = [];
  for (const [index, row] of heads.entries()) {
    const next = heads[index + 1] ?? facts.grid.length;
    const before = bases[bases.length - 1];
    const close = before !== undefined && row - before <= 2 && !hasNumbers(facts, before, row);
    if (close) {
      // Two heading lines of one table: the one that names more is the base, the other a caption or a second line.
      if ((facts.rows[row]?.analytes ?? 0) >= (facts.rows[before]?.analytes ?? 0)) bases[bases.length - 1] = row;
      continue;
    }
    if (hasNumbers(facts, row, next) || next - row <= 2) bases.push(row);
  }
  const kept = bases.filter((row, index) => hasNumbers(facts, row, bases[index + 1] ?? facts.grid.length));
  return kept.map((base, index): Block => {
    const underRows: number[] = [];
    let from = base + 1;
    while (saysMore(facts, base, from) || (facts.rows[from]?.filled === 0 && saysMore(facts, base, from + 1))) {
      if ((facts.rows[from]?.filled ?? 0) > 0) underRows.push(from);
      from += 1;
    }
    const next = kept[index + 1];
    const to = next === undefined ? facts.grid.length : next - captionsOver(facts, next).length;
    return { captionRows: captionsOver(facts, base), base, underRows, from, to };
  });
}
