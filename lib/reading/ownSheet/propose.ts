import { remark } from '../candidate';
import { type Label, unitOnly } from '../labels/label';
import { ANY_DATE, dateOrder } from '../stages/dates';
import { numberStyle } from '../stages/values';
import { type Block, blocksOf } from '../table/blocks';
import { type Column, columnsOf } from '../table/columns';
import { type Facts, factsOf } from '../table/facts';
import { fieldOf } from '../table/fields';
import { spoken } from '../table/spoken';
import type { Remark } from '../types';
import type { ColumnMeaning, OwnColumn, OwnMapping, OwnRows, ProposedMapping } from './types';

const EXAMPLES = 3;
const SKIP: ColumnMeaning = { kind: 'skip' };

function examplesOf(facts: Facts, from: number, at: number): string[] {
  const found: string[] = [];
  for (let row = from; row < facts.grid.length && found.length < EXAMPLES; row++) {
    const cell = facts.at(row, at);
    if (cell !== '') found.push(cell);
  }
  return found;
}

function depthUnit(text: string): 'in' | 'cm' | null {
  if (/\bcm\b/i.test(text)) return 'cm';
  return /\bin(ch(es)?)?\b|["”″]/i.test(text) ? 'in' : null;
}

function identityMeaning(heading: string, examples: readonly string[]): ColumnMeaning | null {
  const words = spoken(heading);
  if (/^(lab(oratory)?( name)?|tested (by|at)|analy[sz]ed by)$/i.test(words)) return { kind: 'laboratory' };
  // In a sheet of one's own a bare "Date" or "Year" is the day the samples were taken; the preview shows it.
  if (/^(date|day|when)$/i.test(words)) return { kind: 'date-sampled' };
  const unit = depthUnit(`${heading} ${examples.join(' ')}`);
  switch (fieldOf(heading)) {
    case 'sampleId':
      return { kind: 'sample-name' };
    case 'fieldName':
      return { kind: 'field-name' };
    case 'labNumber':
      return { kind: 'lab-number' };
    case 'dateSampled':
      return { kind: 'date-sampled' };
    case 'depth':
      return { kind: 'depth', unit };
    case 'depthTop':
      return { kind: 'depth-top', unit };
    case 'depthBottom':
      return { kind: 'depth-bottom', unit };
    default:
      return null;
  }
}

function resultOf(label: Label): ColumnMeaning {
  return { kind: 'result', analyte: label.analyte, unit: label.unit, form: label.form, method: label.method };
}

/** One kind of name, day and number is enough; further columns of that kind are left to the person. */
function onlyOnce(columns: readonly OwnColumn[]): OwnColumn[] {
  const seen = new Set<string>();
  return columns.map((column) => {
    const { kind } = column.meaning;
    if (kind === 'skip' || kind === 'result') return column;
    if (seen.has(kind)) return { ...column, meaning: SKIP };
    seen.add(kind);
    return column;
  });
}

/** A sheet without a column of names takes its field column, or else its first column of words. */
function withName(columns: readonly OwnColumn[]): OwnColumn[] {
  if (columns.some((column) => column.meaning.kind === 'sample-name')) return [...columns];
  const other = columns.find((column) => column.meaning.kind === 'field-name' || column.meaning.kind === 'lab-number');
  const words = columns.find(
    (column) =>
      column.meaning.kind === 'skip' && column.examples.some((cell) => /\p{L}/u.test(cell) && !ANY_DATE.test(cell)),
  );
  const name = other?.meaning.kind === 'field-name' ? other : (words ?? other);
  return columns.map((column) => (column === name ? { ...column, meaning: { kind: 'sample-name' } } : column));
}

function acrossMapping(facts: Facts, block: Block): { columns: OwnColumn[]; results: number } {
  const meant: readonly Column[] = columnsOf(facts, block);
  const columns = meant.flatMap((column): OwnColumn[] => {
    const examples = examplesOf(facts, block.from, column.at);
    if (column.whole === '' && examples.length === 0) return [];
    const heading = column.whole || column.text;
    const identity = identityMeaning(column.text, examples);
    const meaning = identity ?? (column.role === 'result' && column.label !== null ? resultOf(column.label) : SKIP);
    return [{ column: column.at + 1, heading, examples, meaning }];
  });
  return {
    columns: withName(onlyOnce(columns)),
    results: columns.filter((one) => one.meaning.kind === 'result').length,
  };
}

const ANALYTE = /^(analyte|test|parameter|element|nutrient|property|measure(ment)?|what|item|determination)( name)?$/i;
const VALUE = /^(results?|value|reading|amount|concentration|level|number|test (result|value))$/i;

function numberMapping(facts: Facts): { columns: OwnColumn[]; headingRow: number; results: number } | null {
  for (let row = 0; row < Math.min(facts.grid.length, 30); row++) {
    const heads = (facts.grid[row] ?? []).map((cell) => spoken(cell));
    const analyteAt = heads.findIndex((head) => ANALYTE.test(head));
    const valueAt = heads.findIndex((head) => VALUE.test(head));
    if (analyteAt < 0 || valueAt < 0) continue;
    const columns = heads.flatMap((head, at): OwnColumn[] => {
      const examples = examplesOf(facts, row + 1, at);
      if (head === '' && examples.length === 0) return [];
      const units = examples.length > 0 && examples.every((cell) => unitOnly(spoken(cell)) !== null);
      const meaning: ColumnMeaning =
        at === analyteAt
          ? { kind: 'analyte' }
          : at === valueAt
            ? { kind: 'value' }
            : /^(units?|uom)$/i.test(head) || units
              ? { kind: 'unit' }
              : /^(method|extractant|extraction)$/i.test(head)
                ? { kind: 'method' }
                : (identityMeaning(facts.at(row, at), examples) ?? SKIP);
      return [{ column: at + 1, heading: facts.at(row, at), examples, meaning }];
    });
    let results = 0;
    for (let at = row + 1; at < facts.grid.length; at++) if (facts.label(at, analyteAt) !== null) results += 1;
    if (results > 0) return { columns: withName(onlyOnce(columns)), headingRow: row + 1, results };
  }
  return null;
}

function doubtsOf(mapping: OwnMapping): Remark[] {
  const kinds = mapping.columns.map((column) => column.meaning.kind);
  const doubts: Remark[] = [];
  if (!kinds.includes('sample-name'))
    doubts.push(remark('no-name-column', 'No column seems to hold the names of your plots or samples; choose it.'));
  if (!kinds.includes('date-sampled'))
    doubts.push(
      remark(
        'no-date-column',
        'No column seems to hold the day of sampling; choose it; a sample without a day is left out.',
      ),
    );
  const bare = mapping.columns.filter(
    (column) =>
      column.meaning.kind === 'result' &&
      column.meaning.unit === null &&
      !/_ph|buffer_ph|ratio|index|sar/.test(column.meaning.analyte),
  );
  if (bare.length > 0)
    doubts.push(
      remark(
        'unit-missing',
        `No unit is given for: ${bare.map((column) => column.heading).join(', ')}. Choose it if you know it.`,
      ),
    );
  return doubts;
}

/**
 * What the columns of a grower's own sheet seem to hold. The sheet and layout with the most numbers that can be named is
 * proposed; nothing is taken until a person has agreed. Reasons for no answer: no rows, or no column of results.
 */
export function proposeMapping(sheets: readonly OwnRows[]): ProposedMapping {
  const filled = sheets.filter((sheet) => sheet.rows.some((row) => row.some((cell) => cell !== '')));
  if (filled.length === 0) return { ok: false, reason: 'no-rows' };
  let best: { mapping: OwnMapping; weight: number } | null = null;
  for (const sheet of filled) {
    const cells = sheet.rows.flat();
    const style = numberStyle(cells);
    const facts = factsOf({ number: sheet.number, name: sheet.name, grid: sheet.rows, merges: [] }, style);
    const rest = {
      sheet: sheet.number,
      dateOrder: dateOrder(cells.filter((cell) => cell.length < 40 && ANY_DATE.test(cell))),
      decimalComma: style.decimalComma,
    };
    const [block] = blocksOf(facts);
    if (block !== undefined) {
      const { columns, results } = acrossMapping(facts, block);
      const weight = results * (block.to - block.from);
      if (results > 0 && weight > (best?.weight ?? 0))
        best = { weight, mapping: { ...rest, layout: 'sample-per-row', headingRow: block.from, columns } };
    }
    const long = numberMapping(facts);
    if (long !== null && long.results > (best?.weight ?? 0))
      best = {
        weight: long.results,
        mapping: { ...rest, layout: 'number-per-row', headingRow: long.headingRow, columns: long.columns },
      };
  }
  return best === null
    ? { ok: false, reason: 'no-results' }
    : { ok: true, mapping: best.mapping, doubts: doubtsOf(best.mapping) };
}
