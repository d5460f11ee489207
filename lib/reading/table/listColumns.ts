import { methodIn, unitOnly } from '../labels/label';
import { roleOf } from '../stages/roles';
import { ratingIn } from '../stages/values';
import type { Facts } from './facts';
import { fieldOf, isBareDate } from './fields';
import { type ColumnRole, roleIn, yearIn } from './headingRole';
import { isNoSample } from './names';
import { spoken } from './spoken';

export const ANALYTE_HEAD =
  /^(analytes?|tests?|parameters?|elements?|determinations?|determinands?|test ?names?|analys[ei]s|nutrients?|propert(y|ies)|measurements?|components?|items?|description|characteristics?|constituents?|compounds?|variables?|soil test|measure|indicator)( ?(name|description|desc|long name|short name|code|tested|measured))?$/i;

export type Kind = ColumnRole | 'analyte' | 'identity' | 'other' | 'number' | 'kind';
export type ListColumn = {
  readonly at: number;
  readonly head: string;
  readonly kind: Kind;
  readonly year: number | null;
  /** The line over the heading, where it may name the sample. */
  readonly over: string;
};

/** Rows of this stage: those in which a name of an analyte has a number somewhere to its right. */
export function labelColumn(facts: Facts, free: readonly number[]): { at: number; rows: number[] } | null {
  let best: { at: number; rows: number[]; analytes: number } | null = null;
  for (let column = 0; column < Math.min(facts.width, 40); column++) {
    const analytes = new Set<string>();
    const rows = free.filter((row) => {
      const label = facts.label(row, column);
      if (label === null) return false;
      for (let at = 0; at < Math.min(facts.width, 120); at++) {
        if (at !== column && facts.meaning(row, at).kind === 'value') {
          analytes.add(label.analyte);
          return true;
        }
      }
      return false;
    });
    if (rows.length > (best?.rows.length ?? 0) || (rows.length === best?.rows.length && analytes.size > best.analytes))
      best = { at: column, rows, analytes: analytes.size };
  }
  return best === null || best.rows.length < 2 || best.analytes < 2 ? null : best;
}

/** The heading over a column: the nearest filled cell above the rows, and the line over that when it is a caption. */
function headsOver(facts: Facts, first: number, at: number, labelAt: number): string[] {
  const heads: string[] = [];
  for (let row = first - 1; row >= Math.max(0, first - 6); row--) {
    const cell = facts.at(row, at);
    const one = facts.rows[row];
    if (one === undefined || one.filled === 0) {
      if (heads.length > 0) break;
      continue;
    }
    if (fieldOf(facts.at(row, labelAt)) !== null && !ANALYTE_HEAD.test(spoken(facts.at(row, labelAt)))) continue;
    if (cell !== '') heads.push(cell);
    if (heads.length === 2) break;
  }
  return heads;
}

function kindOf(facts: Facts, rows: readonly number[], at: number, heads: readonly string[], labelAt: number): Kind {
  const [head = ''] = heads;
  const cells = rows.map((row) => ({ row, text: facts.at(row, at) })).filter((cell) => cell.text !== '');
  const share = (test: (text: string, row: number) => boolean) =>
    cells.length === 0 ? 0 : cells.filter(({ text, row }) => test(text, row)).length / cells.length;
  const numbers = share((_text, row) => facts.meaning(row, at).kind === 'value');
  const units = share((text) => unitOnly(spoken(text)) !== null);
  const ratings = share((text) => ratingIn(text) !== null);
  const signs = share((text) => /^([<>]|<=|>=|=|nd|u|j|lt|gt)$/i.test(text));
  const methods = share((text, row) => {
    const label = facts.label(row, labelAt);
    return label !== null && methodIn(label.analyte, spoken(text)) !== null;
  });
  if (
    /^(sample |test |record |result )?(type|kind|matrix|material|medium|category|section|group)$/i.test(spoken(head)) &&
    numbers < 0.3
  )
    return 'kind';
  if (fieldOf(head) !== null || (isBareDate(head) && numbers < 0.3)) return 'identity';
  if (ANALYTE_HEAD.test(spoken(head)) && numbers < 0.3 && units < 0.6) return 'other';
  const role = roleIn(head) ?? (heads[1] === undefined || unitOnly(spoken(head)) === null ? null : roleIn(heads[1]));
  if (numbers > 0.3) {
    if (
      role !== null &&
      role !== 'rating' &&
      role !== 'unit' &&
      role !== 'method' &&
      role !== 'qualifier' &&
      role !== 'date'
    )
      return role;
    return unitOnly(spoken(head)) === null && roleOf(head, false) !== 'result' ? 'number' : 'result';
  }
  if (signs >= 0.6) return 'qualifier';
  if (units >= 0.6) return 'unit';
  if (role === 'rating' && ratings > 0) return 'rating';
  if (ratings >= 0.6) return 'rating';
  if (role === 'unit' || role === 'method') return role;
  if (methods >= 0.5) return 'method';
  return numbers > 0 ? (role === 'result' ? 'result' : role === null ? 'number' : role) : (role ?? 'other');
}

/** What each column of a list holds, from its heading and from what stands in it. */
export function columnsFor(facts: Facts, rows: readonly number[], first: number, labelAt: number): ListColumn[] {
  return Array.from({ length: facts.width }, (_, at): ListColumn => {
    const heads = headsOver(facts, first, at, labelAt);
    const head = heads[0] ?? '';
    if (at === labelAt) return { at, head, kind: 'analyte', year: null, over: '' };
    return {
      at,
      head,
      kind: kindOf(facts, rows, at, heads, labelAt),
      year: yearIn(head) ?? yearIn(heads[1] ?? ''),
      over: heads[1] ?? '',
    };
  });
}

/** The columns whose numbers are results, and whether each is a sample of its own. */
export function chosenColumns(
  columns: readonly ListColumn[],
  hasRowNames: boolean,
  named: (at: number) => boolean,
): { chosen: ListColumn[]; across: boolean } {
  const explicit = columns.filter((one) => one.kind === 'result');
  const numeric = columns.filter((one) => one.kind === 'number');
  const years = [...explicit, ...numeric].filter((one) => one.year !== null);
  const distinct = new Set(years.map((one) => one.year));
  if (distinct.size > 1) {
    const newest = Math.max(...years.map((one) => one.year ?? 0));
    return { chosen: years.filter((one) => one.year === newest).slice(0, 1), across: false };
  }
  if (explicit.length === 1 || (explicit.length > 0 && hasRowNames))
    return { chosen: explicit.slice(0, 1), across: false };
  if (explicit.length > 1) return { chosen: explicit, across: true };
  if (hasRowNames) return { chosen: numeric.slice(0, 1), across: false };
  const across = numeric.filter((one) => named(one.at) || (one.head !== '' && !isNoSample(one.head, {})));
  return across.length > 0 ? { chosen: across, across: true } : { chosen: numeric.slice(0, 1), across: false };
}

/** The nearest column of a kind that belongs to a number's column: the only one, or the next to its right. */
export function nearest(
  columns: readonly ListColumn[],
  kind: Kind,
  of: number,
  alone: boolean,
  results: readonly number[],
): number | null {
  const all = columns.filter((one) => one.kind === kind);
  if (alone || all.length === 1) {
    const only = all.find((one) => one.at > of) ?? all[0];
    if (only === undefined) return null;
    // One rating beside several samples belongs to the sample it stands beside.
    return alone || kind === 'unit' || kind === 'method' || only.at === of + 1 ? only.at : null;
  }
  const next = results.find((at) => at > of) ?? Number.POSITIVE_INFINITY;
  return (
    all.find((one) => one.at > of && one.at < next)?.at ??
    (kind === 'unit' || kind === 'method' ? (all[0]?.at ?? null) : null)
  );
}
