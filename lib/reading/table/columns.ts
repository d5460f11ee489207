import { type AnalyteKey, analyte, type UnitKey, unitOf } from '@/lib/domain/analytes';
import type { IdentityField } from '../candidate';
import { type Label, methodIn, unitIn, unitOnly } from '../labels/label';
import { ratingIn } from '../stages/values';
import { type Block, DEPTH } from './blocks';
import type { Facts } from './facts';
import { fieldOf, isBareDate } from './fields';
import { type ColumnRole, isWholeName, roleIn, withoutRole, yearIn } from './headingRole';
import { labelOf, spoken } from './spoken';
import { joined } from './stacked';

export type Column = {
  readonly at: number;
  /** The heading's own words. */
  readonly text: string;
  /** All its lines with the captions over it. */
  readonly whole: string;
  readonly label: Label | null;
  readonly field: IdentityField | null;
  readonly role: ColumnRole | null;
  readonly year: number | null;
  /** The depth that a heading line gives to this column alone. */
  readonly depth: string | null;
};

const ADVICE_UNITS: ReadonlySet<UnitKey> = new Set<UnitKey>([
  'lb/1000ft2',
  'lb/100ft2',
  'oz/1000ft2',
  'oz/100ft2',
  'oz/yd2',
  'g/m2',
  'ton/acre',
  't/ha',
  'cwt/acre',
]);
const AREA: ReadonlySet<UnitKey> = new Set<UnitKey>(['lb/acre', 'kg/ha']);

/** A unit over a group of columns is that of a column only when such a number can have it. */
function fits(key: AnalyteKey, unit: UnitKey): boolean {
  const usual = analyte(key).unit;
  if (usual === unit) return true;
  const [a, b] = [unitOf(usual)?.basis, unitOf(unit)?.basis];
  if (a === 'index') return b === 'index';
  if (a === 'share') return b === 'share' || unit === 'g/kg';
  if (a === 'charge') return b === 'charge';
  if (a === 'none') return b === 'none';
  return b !== 'none' && b !== 'index' && b !== undefined;
}

/** A caption over several columns stands in the first of them; it reaches to the next caption of its row. */
function captionAt(facts: Facts, row: number, column: number, base: number): string {
  const own = facts.at(row, column);
  if (own !== '') return own;
  const merge = facts.sheet.merges.find(
    (one) => row >= one.top && row <= one.bottom && column >= one.left && column <= one.right,
  );
  if (merge !== undefined) return facts.at(merge.top, merge.left);
  const merged = facts.sheet.merges.some((one) => one.top <= row && one.bottom >= row);
  const [mine, under] = [facts.rows[row]?.filled ?? 0, facts.rows[base]?.filled ?? 0];
  if (merged || mine >= under || mine === 0) return '';
  for (let left = column - 1; left >= 0; left--) {
    const cell = facts.at(row, left);
    if (cell !== '') return fieldOf(cell) === null ? cell : '';
  }
  return '';
}

function settledLabel(label: Label, around: readonly string[], under: readonly string[]): Label {
  let one = label;
  for (const text of [...under, ...around].map((part) => spoken(part))) {
    const unit = under.includes(text) ? (unitOnly(text) ?? unitIn(text)) : unitIn(text);
    if (one.unit === null && unit !== null && unit.unit !== 'index' && fits(one.analyte, unit.unit))
      one = { ...one, unit: unit.unit, unitPrinted: unit.printed };
    const method = one.method === null ? methodIn(one.analyte, text) : null;
    if (method !== null) one = { ...one, method: method.method, methodPrinted: method.printed };
  }
  return one;
}

/** "P" under "Base saturation (%)" is another analyte; the unit decides too. */
function nameWith(texts: readonly string[], captions: readonly string[]): Label | null {
  for (const text of texts) {
    if (text === '') continue;
    const saturation = captions.filter((caption) => /saturation|base sat|% of cec|% cec/i.test(spoken(caption)));
    const plain = labelOf(text, saturation);
    if (plain === null) continue;
    const share = captions.some((caption) => /^%$|^(%|percent)\b/i.test(spoken(caption).trim()));
    const asShare =
      share && plain.unit === null && /^(potassium|calcium|magnesium|sodium|exchangeable_acidity)$/.test(plain.analyte);
    const settled = asShare ? (labelOf(`${spoken(text)} %`) ?? plain) : plain;
    return { ...settled, text };
  }
  return null;
}

function shares(
  facts: Facts,
  block: Block,
  column: number,
): { ratings: number; signs: number; units: number; numbers: number; small: number; filled: number } {
  const counts = { ratings: 0, signs: 0, units: 0, numbers: 0, small: 0, filled: 0 };
  const last = Math.min(block.to, block.from + 400);
  for (let row = block.from; row < last; row++) {
    const text = facts.at(row, column);
    if (text === '') continue;
    counts.filled += 1;
    if (/^([<>]|<=|>=|=|nd|u|j|b|lt|gt)$/i.test(text)) counts.signs += 1;
    else if (ratingIn(text) !== null) counts.ratings += 1;
    if (/^[0-9][+-]?$/.test(text)) counts.small += 1;
    if (unitOnly(spoken(text)) !== null) counts.units += 1;
    if (facts.meaning(row, column).kind === 'value') counts.numbers += 1;
  }
  return counts;
}

/** A heading over two columns stands over the first: the blank one beside it is its own when a unit or kind stands under it. */
function headToTheLeft(facts: Facts, block: Block, at: number): string {
  if (block.underRows.every((row) => facts.at(row, at) === '')) return '';
  for (let left = at - 1; left >= 0; left--) {
    const cell = facts.at(block.base, left);
    if (cell !== '') return fieldOf(cell) === null ? cell : '';
  }
  return '';
}

function headingOf(facts: Facts, block: Block, at: number): Column {
  const own = facts.at(block.base, at);
  const spread = own === '' ? headToTheLeft(facts, block, at) : '';
  const captions = [...block.captionRows.map((row) => captionAt(facts, row, at, block.base)), spread];
  const under = block.underRows.map((row) => facts.at(row, at));
  const lines = [...captions, own, ...under].filter((text) => text !== '');
  const whole = [...new Set(lines)].join(' ');
  const stacked = joined([...block.captionRows.map((row) => facts.at(row, at)), own, ...under]);
  const field = fieldOf(own) ?? (own === '' || labelOf(own) === null ? fieldOf(stacked) : null);
  const content = shares(facts, block, at);
  const bare = withoutRole(own);
  let role = isWholeName(own) && !/\b(rec\w*|needed)\b/i.test(own) ? null : roleIn(own);
  if (role === 'date' || role === null || role === 'result') {
    const over = [...captions, ...under].map((text) => (isWholeName(text) || DEPTH.test(text) ? null : roleIn(text)));
    const strong = over.find(
      (one) => one !== null && one !== 'date' && one !== 'result' && one !== 'method' && one !== 'unit',
    );
    role = strong ?? role;
  }
  // "Index" under the analyte's name is how the laboratory rates the number beside it.
  if (role === null && [own, ...under].some((text) => /^index$/i.test(text))) role = 'rating';
  if (role === 'qualifier' && content.numbers > 0.4 * content.filled) role = null;
  const around = [...captions].reverse();
  const label =
    field !== null
      ? null
      : nameWith(
          [
            own,
            bare,
            stacked,
            ...(own === '' || roleIn(own) !== null || bare === '' ? around : []),
            ...around.map((caption) => `${caption} ${own}`),
          ],
          [...around, ...under],
        );
  if (label === null && field === null && NITROGEN.test(bare) && isAreaText(whole)) role = 'recommendation';
  const settled = label === null ? null : { ...settledLabel(label, around, under), text: own === '' ? whole : own };
  return {
    at,
    text: own === '' ? whole : own,
    whole,
    label: settled,
    field,
    role,
    year: yearIn(own) ?? yearIn(captions.join(' ')),
    depth: lines.find((line) => DEPTH.test(line)) ?? null,
  };
}

/** Nitrogen by area is advice: no soil test of that bare name is reported so. */
const NITROGEN = /^(n|nitrogen)( \(n\))?( (lb|kg).*)?$/i;

function isAreaText(text: string): boolean {
  const unit = unitIn(spoken(text))?.unit;
  return unit !== undefined && (AREA.has(unit) || ADVICE_UNITS.has(unit));
}

function isAdvice(column: Column, all: readonly Column[]): boolean {
  const { label } = column;
  if (label === null) return false;
  if (column.role === 'recommendation') return true;
  if (label.unit === null) return false;
  if (label.analyte === 'lime_requirement' || label.analyte === 'gypsum_requirement')
    return !/\b(req|requirement|lr|gr)\b/i.test(column.text) && (ADVICE_UNITS.has(label.unit) || AREA.has(label.unit));
  if (ADVICE_UNITS.has(label.unit) && label.analyte !== 'enr') return true;
  if (!AREA.has(label.unit)) return false;
  const oxide = label.form === 'P2O5' || label.form === 'K2O' || /^n\b/i.test(column.text);
  return (
    oxide &&
    all.some((other) => other !== column && other.label?.analyte === label.analyte && other.label.unit !== label.unit)
  );
}

/** Of one analyte in several years the newest is the result. */
function newestYear(columns: readonly Column[]): Column[] {
  const newest = new Map<string, Set<number>>();
  const key = (column: Column) => `${column.label?.analyte}|${column.label?.unit ?? ''}`;
  for (const column of columns) {
    if (column.label === null || column.year === null || column.role !== 'result') continue;
    newest.set(key(column), (newest.get(key(column)) ?? new Set<number>()).add(column.year));
  }
  return columns.map((column) => {
    const years = [...(newest.get(key(column)) ?? [])];
    const old = years.length > 1 && column.year !== null && column.year < Math.max(...years);
    return old && column.role === 'result' ? { ...column, role: 'previous' as const } : column;
  });
}

/** A bare "Date" beside each sample is the day of sampling when no other column is; the reading says so. */
function withDate(columns: Column[]): Column[] {
  if (columns.some((column) => column.field === 'dateSampled')) return columns;
  return columns.map((column) => (isBareDate(column.text) ? { ...column, field: 'dateSampled', role: null } : column));
}

/** Stage "columns": what each column of a table holds, from all its heading lines and from what stands in it. */
export function columnsOf(facts: Facts, block: Block): Column[] {
  const plain = Array.from({ length: facts.width }, (_, at) => headingOf(facts, block, at));
  const kinds = plain.map((column): Column => {
    if (column.field !== null) return { ...column, role: null };
    const content = shares(facts, block, column.at);
    if (column.label !== null) {
      if (isAdvice(column, plain)) return { ...column, role: 'recommendation' };
      const numeric = content.numbers > content.ratings && content.numbers > 0.4 * content.filled;
      const another = plain.some(
        (one) => one !== column && one.label?.analyte === column.label?.analyte && one.role !== 'rating',
      );
      // "P level" is a rating beside "P (ppm)", and the result where it stands alone.
      const classed = column.label.method === 'index' && content.small >= 0.8 * content.filled;
      const weighed = plain.some(
        (one) =>
          one.label?.analyte === column.label?.analyte &&
          one.label !== null &&
          one.label.unit !== null &&
          one.label.method !== 'index',
      );
      // "P index 2" beside "P 22 mg/L" is how the laboratory rates that number.
      if (classed && weighed) return { ...column, role: 'rating' };
      const role = column.role === 'rating' && numeric && !another ? 'result' : (column.role ?? 'result');
      if (role === 'result' || role === 'date') {
        const ratingsOnly = content.ratings > 0 && content.numbers === 0 && content.ratings >= 0.6 * content.filled;
        const signsOnly = content.signs > 0 && content.numbers === 0 && content.signs >= 0.6 * content.filled;
        return { ...column, role: ratingsOnly ? 'rating' : signsOnly ? 'qualifier' : 'result' };
      }
      return { ...column, role };
    }
    if (content.filled > 0 && content.signs >= 0.7 * content.filled) return { ...column, role: 'qualifier' };
    if (content.filled > 0 && content.ratings >= 0.6 * content.filled) return { ...column, role: 'rating' };
    if (content.filled > 0 && content.units >= 0.8 * content.filled) return { ...column, role: 'unit' };
    return column;
  });
  return withDate(newestYear(kinds));
}

/** The column of that role that goes with a result column: the one that names its analyte, else the nameless one beside it. */
export function companion(columns: readonly Column[], of: Column, role: ColumnRole): Column | null {
  const named = columns.filter((one) => one.role === role && one.label?.analyte === of.label?.analyte);
  if (named.length > 0)
    return named.find((one) => one.label?.unit === of.label?.unit && one.at > of.at) ?? named[0] ?? null;
  for (let at = of.at + 1; at < columns.length; at++) {
    const next = columns[at];
    if (next === undefined || next.role === 'result' || next.field !== null) break;
    if (next.role === role && next.label === null) return next;
  }
  if (role !== 'qualifier') return null;
  const before = columns[of.at - 1];
  const claimed = columns[of.at - 2]?.role === 'result';
  return before?.role === role && before.label === null && !claimed ? before : null;
}
