import type { Candidate, Identity, IdentityField, SamplePart } from '../candidate';
import { methodIn, unitOnly } from '../labels/label';
import { fieldWithValue } from '../stages/identity';
import { roleOf } from '../stages/roles';
import { ratingIn } from '../stages/values';
import type { ReadRecommendation } from '../types';
import { adviceInWords } from './advice';
import { candidateOf } from './candidates';
import type { Facts } from './facts';
import { DATE_ASSUMED, dateText, depthText, fieldOf, isBareDate, joinDepth, nameRank } from './fields';
import { type ColumnRole, roleIn, yearIn } from './headingRole';
import { otherMaterial } from './material';
import { isNoSample } from './names';
import { spoken } from './spoken';
import { type Ledger, type NotResult, note, type Shape } from './types';

const ANALYTE_HEAD =
  /^(analytes?|tests?|parameters?|elements?|determinations?|determinands?|test ?names?|analys[ei]s|nutrients?|propert(y|ies)|measurements?|components?|items?|description|characteristics?|constituents?|compounds?|variables?|soil test|measure|indicator)( ?(name|description|desc|long name|short name|code|tested|measured))?$/i;

type Kind = ColumnRole | 'analyte' | 'identity' | 'other' | 'number' | 'kind';
type ListColumn = {
  readonly at: number;
  readonly head: string;
  readonly kind: Kind;
  readonly year: number | null;
  /** The line over the heading, where it may name the sample. */
  readonly over: string;
};

/** Rows of this stage: those in which a name of an analyte has a number somewhere to its right. */
function labelColumn(facts: Facts, free: readonly number[]): { at: number; rows: number[] } | null {
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

/** What the lines of a transposed table say of the sample of one column: "Lab No" with that column's number. */
function identityOfColumn(facts: Facts, free: readonly number[], last: number, labelAt: number, at: number): Identity {
  const identity: Identity = {};
  let [top, bottom, rank] = ['', '', 0];
  let heading = '';
  for (const row of free) {
    if (row > last) break;
    const name = facts.at(row, labelAt) || facts.at(row, 0);
    const field = fieldOf(name);
    const cell = facts.at(row, at);
    if (field === null || cell === '') continue;
    if (field === 'sampleId') {
      if (nameRank(name) <= rank) continue;
      rank = nameRank(name);
      identity.sampleId = cell;
    } else if (field === 'depth')
      identity.depth ??= depthText(
        cell,
        `${name} ${facts.at(row, labelAt + 1) === cell ? '' : facts.at(row, labelAt + 1)}`,
      );
    else if (field === 'depthTop') [top, heading] = [cell, name];
    else if (field === 'depthBottom') [bottom, heading] = [cell, `${heading} ${name}`];
    else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else identity[field] ??= cell;
  }
  return top !== '' && bottom !== ''
    ? joinDepth({ ...identity, depthTop: top, depthBottom: bottom }, heading)
    : identity;
}

/** A bare "Date" beside each sample is the day of sampling when no other column is; the reading says so. */
function fieldIn(columns: readonly ListColumn[], head: string): IdentityField | null {
  if (!isBareDate(head)) return fieldOf(head);
  return columns.some((one) => fieldOf(one.head) === 'dateSampled') ? 'other' : 'dateSampled';
}

function rowIdentity(facts: Facts, columns: readonly ListColumn[], row: number): Identity {
  const identity: Identity = {};
  let rank = 0;
  let heading = '';
  for (const column of columns) {
    if (column.kind !== 'identity') continue;
    const cell = facts.at(row, column.at);
    const field = fieldIn(columns, column.head);
    if (cell === '' || field === null) continue;
    if (field === 'sampleId') {
      if (nameRank(column.head) <= rank) continue;
      rank = nameRank(column.head);
      identity.sampleId = cell;
    } else if (field === 'depth') identity.depth ??= depthText(cell, column.head);
    else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else {
      identity[field] ??= cell;
      if (field === 'depthTop' || field === 'depthBottom') heading += ` ${column.head}`;
    }
  }
  return joinDepth(identity, heading);
}

/** Lines of one sample after another: a "Sample: North bed" line starts the next one. */
function sectionAt(facts: Facts, free: readonly number[], labelAt: number, row: number, since: number): Identity {
  const identity: Identity = {};
  for (const at of free) {
    if (at >= row) break;
    if (at <= since) continue;
    for (const [column, cell] of (facts.grid[at] ?? []).entries()) {
      if (cell === '') continue;
      const whole = fieldWithValue(cell);
      const field = whole?.field ?? fieldOf(cell);
      const value = whole?.value ?? facts.at(at, column + 1);
      if (field === null || value === '' || fieldOf(value) !== null || column > labelAt + 2) continue;
      identity[field] = field === 'depth' ? depthText(value, cell) : /^date/.test(field) ? dateText(value) : value;
    }
  }
  return identity;
}

function columnsFor(facts: Facts, rows: readonly number[], first: number, labelAt: number): ListColumn[] {
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
function chosenColumns(
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
function nearest(
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

const ADVICE = /^(recommendation|recommended|advice|application|rec|fertili[sz]er)s?$/i;

/** Stage "analytes down": one row a number, or one row an analyte with one sample or several across. */
export function analytesDown(facts: Facts, free: readonly number[], ledger: Ledger): Shape | null {
  const found = labelColumn(facts, free);
  if (found === null) return null;
  const { at: labelAt, rows } = found;
  const [first = 0, last = 0] = [rows[0], rows[rows.length - 1]];
  const columns = columnsFor(facts, rows, first, labelAt);
  const hasRowNames = columns.some(
    (one) =>
      one.kind === 'identity' &&
      ['sampleId', 'labNumber', 'fieldName'].includes(fieldOf(one.head) ?? '') &&
      rows.filter((row) => facts.at(row, one.at) !== '').length >= 0.5 * rows.length,
  );
  const identities = new Map<number, Identity>();
  const identityAt = (at: number) => {
    const known = identities.get(at) ?? identityOfColumn(facts, free, last, labelAt, at);
    identities.set(at, known);
    return known;
  };
  const named = (at: number) => identityAt(at).sampleId !== undefined || identityAt(at).labNumber !== undefined;
  const { chosen, across } = chosenColumns(columns, hasRowNames, named);
  const results = chosen.map((one) => one.at);
  const parts = new Map<string, { identity: Identity; candidates: Candidate[] }>();
  const recommendations: ReadRecommendation[] = [];
  const kindColumn = columns.find((one) => one.kind === 'kind')?.at;
  let [since, section] = [-1, {} as Identity];
  const used = new Set<number>(rows);
  for (let row = Math.max(0, first - 3); row < first; row++)
    if (free.includes(row) && columns.some((one) => one.head !== '' && facts.at(row, one.at) === one.head))
      used.add(row);
  for (const row of rows) {
    const label = facts.label(row, labelAt);
    if (label === null) continue;
    const said = sectionAt(facts, free, labelAt, row, since);
    since = row;
    if (said.sampleId !== undefined || said.labNumber !== undefined) section = { ...pickShared(section), ...said };
    else section = { ...section, ...said };
    const kind = kindColumn === undefined ? '' : facts.at(row, kindColumn);
    const why: NotResult | null =
      otherMaterial(kind) !== null ? 'not-soil' : ADVICE.test(kind) ? 'recommendation' : null;
    const own = hasRowNames ? rowIdentity(facts, columns, row) : {};
    const noSample = hasRowNames && own.sampleId !== undefined && isNoSample(own.sampleId, own);
    for (const column of columns) {
      const meaning = facts.meaning(row, column.at);
      if (meaning.kind === 'text' && column.kind === 'recommendation') {
        const advice = adviceInWords(
          facts.at(row, column.at),
          own.sampleId ?? section.sampleId ?? null,
          facts.at(row, labelAt),
        );
        if (advice !== null) recommendations.push(advice);
      }
      if (meaning.kind !== 'value') continue;
      if (!results.includes(column.at)) {
        note(ledger, row, column.at, notResultOf(column));
        if (column.kind === 'recommendation')
          recommendations.push(
            adviceOf(
              facts,
              row,
              column.at,
              `${facts.at(row, labelAt)} ${column.head}`.trim(),
              own.sampleId ?? section.sampleId ?? null,
              meaning.value,
              meaning.unit ?? label.unit,
            ),
          );
        continue;
      }
      const unitAt = nearest(columns, 'unit', column.at, !across, results);
      const beside = {
        unit: unitAt === null ? '' : facts.at(row, unitAt),
        method: cellOf(facts, row, nearest(columns, 'method', column.at, !across, results)),
        rating: cellOf(facts, row, nearest(columns, 'rating', column.at, !across, results)),
        qualifier: cellOf(facts, row, nearest(columns, 'qualifier', column.at, !across, results)),
      };
      const headUnit = unitOnly(spoken(column.head)) === null ? '' : column.head;
      const candidate = candidateOf(
        { ...label, text: facts.at(row, labelAt) },
        meaning,
        { sheet: facts.sheet.number, row, column: column.at },
        { ...beside, unit: beside.unit === '' && label.unit === null ? headUnit : beside.unit },
      );
      const advice = isAdviceUnit(candidate.unit) || isAdviceRow(facts.at(row, labelAt));
      if (why !== null || noSample || advice) {
        note(ledger, row, column.at, why ?? (noSample ? 'summary-row' : 'recommendation'));
        if (why === 'recommendation' || (why === null && !noSample))
          recommendations.push(
            adviceOf(
              facts,
              row,
              column.at,
              facts.at(row, labelAt),
              own.sampleId ?? section.sampleId ?? null,
              meaning.value,
              candidate.unit,
            ),
          );
        continue;
      }
      note(ledger, row, column.at, 'taken');
      const identity = hasRowNames
        ? { ...pickShared(section), ...own }
        : across
          ? { ...sampleOver(column), ...identityAt(column.at) }
          : { ...section, ...identityWhenAlone(identityAt(column.at), section) };
      const key = JSON.stringify(across ? [column.at, identity] : identity);
      const part = parts.get(key) ?? { identity, candidates: [] };
      part.candidates.push(candidate);
      parts.set(key, part);
    }
  }
  const list: SamplePart[] = [...parts.values()];
  const assumed = columns.some(
    (one) => one.kind === 'identity' && isBareDate(one.head) && fieldIn(columns, one.head) === 'dateSampled',
  );
  return list.length === 0
    ? null
    : { parts: list, recommendations, rows: used, remarks: assumed ? [DATE_ASSUMED] : [] };
}

/** The name of a sample over its column, or over the words "Result" and "Rating" that stand under it. */
function sampleOver(column: ListColumn): Identity {
  const name = column.kind === 'number' ? column.head : column.over;
  const says = name !== '' && unitOnly(spoken(name)) === null && roleIn(name) === null && roleOf(name, false) === null;
  return says && !ANALYTE_HEAD.test(spoken(name)) ? { sampleId: name } : {};
}

function cellOf(facts: Facts, row: number, at: number | null): string {
  return at === null ? '' : facts.at(row, at);
}

/** In a list of one sample the lines over it have been heard already; what its own column says counts first. */
function identityWhenAlone(own: Identity, section: Identity): Identity {
  return section.sampleId === undefined && section.labNumber === undefined ? own : {};
}

function pickShared(identity: Identity): Identity {
  const { sampleId: _sample, labNumber: _number, ...rest } = identity;
  return rest;
}

/** "Lime recommendation" names an analyte of the registry and is advice all the same. */
function isAdviceRow(name: string): boolean {
  return (
    /\b(recommend\w*|rec|to apply|apply|needed|application)\b/i.test(name) &&
    !/\brecommended (level|range)\b/i.test(name)
  );
}

function isAdviceUnit(unit: string | null): boolean {
  return (
    unit !== null && ['lb/1000ft2', 'lb/100ft2', 'oz/1000ft2', 'oz/100ft2', 'oz/yd2', 'g/m2', 'cwt/acre'].includes(unit)
  );
}

function notResultOf(column: ListColumn): NotResult {
  const notes: Partial<Record<Kind, NotResult>> = {
    identity: 'identity',
    desired: 'desired',
    previous: 'previous',
    recommendation: 'recommendation',
    limit: 'limit',
    difference: 'difference',
    date: 'date',
  };
  return notes[column.kind] ?? (column.year === null ? 'other-column' : 'previous');
}

function adviceOf(
  facts: Facts,
  row: number,
  at: number,
  item: string,
  sampleId: string | null,
  amount: number | null,
  unit: string | null,
): ReadRecommendation {
  return { sampleId, item, amount, printed: facts.at(row, at), unit, page: null, box: null };
}
