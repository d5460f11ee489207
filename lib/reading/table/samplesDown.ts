import type { Candidate, Identity, SamplePart } from '../candidate';
import { unitIn } from '../labels/label';
import { fieldWithValue } from '../stages/identity';
import type { ReadRecommendation } from '../types';
import { adviceInWords, adviceItem } from './advice';
import type { Block } from './blocks';
import { type Beside, candidateOf } from './candidates';
import { type Column, columnsOf, companion } from './columns';
import type { Facts } from './facts';
import { DATE_ASSUMED, dateText, depthText, isBareDate, joinDepth, nameRank } from './fields';
import { otherMaterial } from './material';
import { isNoSample, isSummary } from './names';
import { spoken } from './spoken';
import { type Ledger, type NotResult, note, type Shape } from './types';

type Plan = {
  readonly columns: readonly Column[];
  readonly results: readonly (Column & { beside: Besides })[];
  readonly named: Column | null;
  /** Columns of words before the numbers that may say what kind of row it is ("Found", "Desired"). */
  readonly kinds: readonly number[];
  /** The heading of the depth column, which may hold the unit of the depths in other headings. */
  readonly depthHeading: string;
};
type Besides = {
  readonly unit: number | null;
  readonly method: number | null;
  readonly rating: number | null;
  readonly qualifier: number | null;
};

const ROLE_NOTES: Readonly<Record<string, NotResult>> = {
  recommendation: 'recommendation',
  desired: 'desired',
  previous: 'previous',
  difference: 'difference',
  limit: 'limit',
};

function noteOf(column: Column): NotResult {
  if (column.field === 'depth' || column.field === 'depthTop' || column.field === 'depthBottom') return 'depth';
  if (column.field !== null) return 'identity';
  return ROLE_NOTES[column.role ?? ''] ?? (column.label === null ? 'column-without-analyte' : 'other-column');
}

function besidesOf(columns: readonly Column[], of: Column): Besides {
  return {
    unit: companion(columns, of, 'unit')?.at ?? null,
    method: companion(columns, of, 'method')?.at ?? null,
    rating: companion(columns, of, 'rating')?.at ?? null,
    qualifier: companion(columns, of, 'qualifier')?.at ?? null,
  };
}

function planOf(facts: Facts, block: Block): Plan {
  const columns = columnsOf(facts, block);
  const results = columns
    .filter((column) => column.role === 'result' && column.label !== null)
    .map((column) => ({ ...column, beside: besidesOf(columns, column) }));
  const first = results[0]?.at ?? 0;
  const known = columns.some((column) => column.field === 'sampleId');
  const named = known
    ? null
    : (columns.find((column) => {
        if (column.at >= first || column.field !== null || column.label !== null || column.role !== null) return false;
        const texts = Array.from({ length: Math.min(block.to - block.from, 200) }, (_, index) =>
          facts.at(block.from + index, column.at),
        );
        return (
          texts.filter((text) => text !== '').length >= 0.5 * texts.length && texts.some((text) => /\p{L}/u.test(text))
        );
      }) ?? null);
  const kinds = columns
    .filter(
      (one) =>
        one.at < first &&
        (one.field === null || one.field === 'other') &&
        one.label === null &&
        one.role === null &&
        one !== named,
    )
    .map((one) => one.at);
  const depthHeading = columns.find((one) => one.field === 'depth')?.whole ?? '';
  return { columns, results, named, kinds, depthHeading };
}

/** What the cells of a row say of the sample. Of several name columns the one called a name or identity wins. */
function identityOf(facts: Facts, plan: Plan, row: number): Identity {
  const identity: Identity = {};
  let depthHeading = '';
  let rank = 0;
  for (const column of plan.columns) {
    const cell = facts.at(row, column.at);
    const { field } = column;
    if (field === null || cell === '') continue;
    if (field === 'sampleId') {
      if (nameRank(column.text) <= rank) continue;
      rank = nameRank(column.text);
      identity.sampleId = cell;
    } else if (field === 'depth') identity.depth ??= depthText(cell, column.whole);
    else if (field === 'depthTop' || field === 'depthBottom') {
      identity[field] ??= cell;
      depthHeading += ` ${column.whole}`;
    } else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else identity[field] ??= cell;
  }
  if (plan.named !== null && facts.at(row, plan.named.at) !== '') identity.sampleId ??= facts.at(row, plan.named.at);
  return joinDepth(identity, depthHeading);
}

function besideAt(facts: Facts, row: number, besides: Besides): Beside {
  const at = (column: number | null) => (column === null ? '' : facts.at(row, column));
  return {
    unit: at(besides.unit),
    method: at(besides.method),
    rating: at(besides.rating),
    qualifier: at(besides.qualifier),
  };
}

function adviceAt(facts: Facts, plan: Plan, row: number, sampleId: string | null): ReadRecommendation[] {
  return plan.columns.flatMap((column) => {
    if (column.role !== 'recommendation') return [];
    const meaning = facts.meaning(row, column.at);
    if (meaning.kind === 'text')
      return adviceInWords(facts.at(row, column.at), sampleId, adviceItem(column.text)) ?? [];
    if (meaning.kind !== 'value' && meaning.kind !== 'range') return [];
    return [
      {
        sampleId,
        item: adviceItem(column.text),
        amount: meaning.kind === 'value' ? meaning.value : null,
        printed: facts.at(row, column.at),
        unit:
          (meaning.kind === 'value' ? meaning.unit : null) ??
          column.label?.unit ??
          unitIn(spoken(column.whole))?.unit ??
          null,
        page: null,
        box: null,
      },
    ];
  });
}

/** A line between the rows that speaks of the samples under it: "Field: Mill meadow". */
function sectionOf(facts: Facts, row: number): Identity | null {
  const one = facts.rows[row];
  if (one === undefined || one.filled === 0 || one.filled > 2 || one.values > 0) return null;
  const found = (facts.grid[row] ?? []).flatMap((cell) => fieldWithValue(cell) ?? []);
  const first = found[0];
  if (first === undefined) return null;
  const value = first.field === 'depth' ? depthText(first.value, '') : first.value;
  return { [first.field]: value };
}

function otherMaterialOf(facts: Facts, plan: Plan, row: number): string | null {
  const column = plan.columns.find((one) =>
    /^(sample |test )?(type|matrix|material|medium|category|kind)$/i.test(spoken(one.text)),
  );
  return column === undefined ? null : otherMaterial(facts.at(row, column.at));
}

/** Stage "samples down": one row a sample, one column an analyte. */
export function samplesDown(facts: Facts, block: Block, ledger: Ledger | null): Shape {
  const plan = planOf(facts, block);
  const parts: SamplePart[] = [];
  const recommendations: ReadRecommendation[] = [];
  const rows = new Set<number>([...block.captionRows, block.base, ...block.underRows]);
  const taken: (number | null)[][] = [];
  let section: Identity = {};
  let other: string | null = null;
  const bare = (row: number, why: NotResult) => {
    for (let at = 0; at < facts.width; at++) if (facts.meaning(row, at).kind === 'value') note(ledger, row, at, why);
  };
  const hasNames = plan.columns.some((column) => column.field === 'sampleId' || column.field === 'labNumber');
  for (let row = block.from; row < block.to; row++) {
    const said = sectionOf(facts, row);
    if (said !== null) section = { ...section, ...said };
    if ((facts.rows[row]?.filled ?? 0) === 0 || said !== null) continue;
    const numbers = plan.results.filter((column) => facts.meaning(row, column.at).kind === 'value');
    if (numbers.length === 0) {
      if (facts.rows[row]?.values === 0) continue;
    }
    const own = identityOf(facts, plan, row);
    const firstText = (facts.grid[row] ?? []).find((cell) => cell !== '') ?? '';
    rows.add(row);
    const kinds = plan.kinds.map((at) => facts.at(row, at)).filter((text) => text !== '');
    const names = [own.sampleId, firstText, facts.at(row, 0)].filter((name) => name !== undefined);
    if (names.some((name) => isNoSample(name, own)) || kinds.some((kind) => isNoSample(kind, {}))) {
      bare(row, 'summary-row');
      continue;
    }
    const yearOnly =
      /^(19|20)\d\d$/.test(own.sampleId ?? '') &&
      parts.some((part) => !/^(19|20)\d\d$/.test(part.identity.sampleId ?? '2000'));
    if (yearOnly) {
      bare(row, 'previous');
      continue;
    }
    const material = otherMaterialOf(facts, plan, row);
    if (material !== null) {
      other ??= material;
      bare(row, 'not-soil');
      continue;
    }
    const values = plan.results.map((column) => {
      const meaning = facts.meaning(row, column.at);
      return meaning.kind === 'value' ? meaning.value : null;
    });
    const nameless = own.sampleId === undefined && own.labNumber === undefined && own.fieldName === undefined;
    if (nameless && hasNames && isSummary(values, taken)) {
      bare(row, 'summary-row');
      continue;
    }
    taken.push(values);
    const before = parts[parts.length - 1]?.identity;
    const unnamed = own.sampleId === undefined && own.labNumber === undefined;
    const goesOn = unnamed && own.depth !== undefined && hasNames && before !== undefined;
    const identity = { ...section, ...(goesOn ? pick(before) : {}), ...own };
    const candidates = new Map<string | null, Candidate[]>();
    for (const column of plan.columns) {
      if (facts.meaning(row, column.at).kind === 'value' && column.role !== 'result')
        note(ledger, row, column.at, noteOf(column));
    }
    for (const column of plan.results) {
      const meaning = facts.meaning(row, column.at);
      if (meaning.kind !== 'value' || column.label === null) continue;
      note(ledger, row, column.at, 'taken');
      const same = candidates.get(column.depth) ?? [];
      candidates.set(column.depth, same);
      same.push(
        candidateOf(
          column.label,
          meaning,
          { sheet: facts.sheet.number, row, column: column.at },
          besideAt(facts, row, column.beside),
        ),
      );
    }
    recommendations.push(...adviceAt(facts, plan, row, identity.sampleId ?? null));
    // A row of names and days without numbers still tells of its sample.
    if (candidates.size === 0 && !nameless) parts.push({ identity, candidates: [] });
    for (const [depth, some] of candidates) {
      const own = depth === null ? {} : { depth: depthText(depth, plan.depthHeading) };
      parts.push({ identity: { ...identity, ...own }, candidates: some });
    }
  }
  const assumed = plan.columns.some((column) => column.field === 'dateSampled' && isBareDate(column.text));
  return { parts, recommendations, rows, remarks: assumed ? [DATE_ASSUMED] : [], other };
}

function pick(identity: Identity): Identity {
  const { sampleId, labNumber, fieldName } = identity;
  return {
    ...(sampleId === undefined ? {} : { sampleId }),
    ...(labNumber === undefined ? {} : { labNumber }),
    ...(fieldName === undefined ? {} : { fieldName }),
  };
}
