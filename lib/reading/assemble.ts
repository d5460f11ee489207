import type { UnitKey } from '@/lib/domain/analytes';
import { type Identity, remark, type SamplePart } from './candidate';
import { basisDoubts } from './checks/basis';
import { checkDocument } from './checks/document';
import { plausibleDoubt } from './checks/plausible';
import { checkSample } from './checks/sample';
import { ceiling, settle } from './settle';
import { dateOrder, readDate } from './stages/dates';
import type { Statements } from './stages/sections';
import type { Depth, ReadResult, ReadSample, Remark } from './types';

/** Of one analyte in several units the one that comes first here is the primary. */
const NEAREST: readonly (UnitKey | null)[] = [
  'mg/kg',
  'mg/dm3',
  'mg/L',
  'lb/acre',
  'kg/ha',
  'meq/100g',
  'mmolc/kg',
  'meq/100cm3',
  '%',
];

/** Of samples of one name only so many, the last ones, are looked through: a file of 20,000 nameless rows has its time. */
const MOST_ALIKE = 100;

type Group = { identity: Identity; results: ReadResult[] };

function same(a: string | undefined, b: string | undefined): boolean {
  return a !== undefined && b !== undefined && a.toLowerCase() === b.toLowerCase();
}

function contradicts(a: readonly ReadResult[], b: readonly ReadResult[]): boolean {
  return b.some((result) =>
    a.some(
      (other) =>
        other.analyte === result.analyte &&
        other.unit === result.unit &&
        other.method === result.method &&
        other.value !== result.value,
    ),
  );
}

function belongs(group: Group, identity: Identity, results: readonly ReadResult[]): boolean {
  const [depth, other] = [group.identity.depth, identity.depth];
  if (depth !== undefined && other !== undefined && depth !== other) return false;
  if (same(group.identity.labNumber, identity.labNumber))
    return (
      same(group.identity.sampleId, identity.sampleId) ||
      group.identity.sampleId === undefined ||
      identity.sampleId === undefined
    );
  if (group.identity.labNumber !== undefined && identity.labNumber !== undefined) return false;
  const named = same(group.identity.sampleId, identity.sampleId);
  const both =
    group.identity.sampleId === undefined &&
    identity.sampleId === undefined &&
    same(group.identity.fieldName, identity.fieldName);
  const none = [group.identity, identity].every(
    (one) => one.sampleId === undefined && one.labNumber === undefined && one.fieldName === undefined,
  );
  return (named || both || none) && !contradicts(group.results, results);
}

/** Names under which a part can find the sample it belongs to; a part without any name goes by the empty one. */
function namesOf(identity: Identity): string[] {
  const names = [identity.labNumber, identity.sampleId, identity.fieldName].flatMap((name) =>
    name === undefined ? [] : [name.toLowerCase()],
  );
  return names.length === 0 ? [''] : names;
}

function addTo(home: Group, results: readonly ReadResult[]) {
  for (const result of results) {
    const twice = home.results.some(
      (other) =>
        other.analyte === result.analyte &&
        other.unit === result.unit &&
        other.method === result.method &&
        other.form === result.form &&
        other.value === result.value &&
        other.qualifier === result.qualifier,
    );
    if (!twice) home.results.push(result);
  }
}

function merge(parts: readonly { identity: Identity; results: readonly ReadResult[] }[]): Group[] {
  const groups: Group[] = [];
  const byName = new Map<string, Group[]>();
  for (const part of parts) {
    if (part.results.length === 0) continue;
    const near = namesOf(part.identity).flatMap((name) => byName.get(name)?.slice(-MOST_ALIKE) ?? []);
    const home = near.find((group) => belongs(group, part.identity, part.results));
    const group = home ?? { identity: part.identity, results: [] };
    if (home === undefined) groups.push(group);
    group.identity = { ...part.identity, ...group.identity };
    if (home === undefined) group.results.push(...part.results);
    else addTo(home, part.results);
    for (const name of namesOf(group.identity)) {
      const list = byName.get(name);
      if (list === undefined) byName.set(name, [group]);
      else if (!list.slice(-MOST_ALIKE).includes(group)) list.push(group);
    }
  }
  return groups;
}

function markPrimary(results: readonly ReadResult[]): ReadResult[] {
  const rank = (result: ReadResult) => {
    const at = NEAREST.indexOf(result.unit);
    return at < 0 ? NEAREST.length : at;
  };
  const key = (result: ReadResult) => `${result.analyte}|${result.method}|${result.form}`;
  return results.map((result) => {
    const best = results.filter((other) => key(other) === key(result)).sort((a, b) => rank(a) - rank(b))[0];
    return { ...result, primary: best === result };
  });
}

/** "0-6 in", "0 to 15 cm", "6 inches"; null when the unit is not printed. */
export function readDepth(text: string | undefined, heading = ''): Depth | null {
  if (text === undefined) return null;
  const all = `${text} ${heading}`;
  const unit = /\bcm\b/i.test(all) ? 'cm' : /\bin(ch(es)?)?\b|["”″]/i.test(all) ? 'in' : null;
  const range = /(\d+(?:\.\d+)?)\s*["”″]?\s*(?:-|–|to)\s*(\d+(?:\.\d+)?)/.exec(text);
  if (unit === null) return null;
  if (range !== null) return { top: Number(range[1]), bottom: Number(range[2]), unit };
  const one = /(\d+(?:\.\d+)?)/.exec(text);
  return one === null ? null : { top: 0, bottom: Number(one[1]), unit };
}

function dateSentence(name: string, printed: string, reason: 'unreadable' | 'impossible' | 'ambiguous'): Remark {
  if (reason === 'ambiguous')
    return remark('date-ambiguous', `${name} "${printed}" can be read day first or month first; please enter it.`);
  if (reason === 'impossible')
    return remark('date-impossible', `${name} "${printed}" is not a possible day; please enter it.`);
  return remark('date-unreadable', `${name} "${printed}" could not be read as a day; please enter it.`);
}

function sampleOf(
  group: Group,
  results: readonly ReadResult[],
  order: ReturnType<typeof dateOrder>,
  warn: (warning: Remark) => void,
): ReadSample {
  const { identity } = group;
  const day = (name: string, printed: string | undefined) => {
    if (printed === undefined) return null;
    const read = readDate(printed, order);
    if (!read.ok) warn(dateSentence(name, printed, read.reason));
    return read.ok ? read.iso : null;
  };
  const depth =
    identity.depth ??
    (identity.depthTop !== undefined && identity.depthBottom !== undefined
      ? `${identity.depthTop}-${identity.depthBottom}`
      : undefined);
  return {
    sampleId: identity.sampleId ?? null,
    labNumber: identity.labNumber ?? null,
    fieldName: identity.fieldName ?? null,
    depth: readDepth(depth),
    dateSampled: day('The sampling day', identity.dateSampled),
    dateSampledPrinted: identity.dateSampled ?? null,
    dateReported: day('The report day', identity.dateReported),
    dateReportedPrinted: identity.dateReported ?? null,
    results,
  };
}

function doubtAll(groups: readonly Group[]): ReadResult[][] {
  const raised = new Map<ReadResult, Remark[]>();
  const raise = (result: ReadResult, doubt: Remark) => {
    const list = raised.get(result) ?? [];
    if (!list.some((other) => other.code === doubt.code)) list.push(doubt);
    raised.set(result, list);
  };
  for (const group of groups) {
    for (const result of group.results) {
      const doubt = plausibleDoubt(result);
      if (doubt !== null) raise(result, doubt);
    }
    checkSample(group.results, raise);
    for (const [result, doubts] of basisDoubts(
      group.identity.sampleId ?? group.identity.fieldName ?? null,
      group.results,
    ))
      for (const doubt of doubts) raise(result, doubt);
  }
  checkDocument(
    groups.map((group) => group.results),
    raise,
  );
  return groups.map((group) =>
    markPrimary(
      group.results.map((result) => {
        const doubts = [...result.doubts, ...(raised.get(result) ?? [])];
        return {
          ...result,
          doubts,
          confidence: Math.round(Math.min(0.99, result.confidence, ceiling(doubts)) * 100) / 100,
        };
      }),
    ),
  );
}

/**
 * Stages 7 and 8: parts of one sample put together, units and methods settled, the document's own checks made, dates
 * read. Nothing is dropped because it is doubtful; it is given with its doubt.
 */
export function assemble(input: {
  parts: readonly SamplePart[];
  statements: Statements;
  dateTexts: readonly string[];
}): { samples: ReadSample[]; warnings: Remark[] } {
  const warnings: Remark[] = [];
  const warn = (warning: Remark) => {
    if (!warnings.some((other) => other.code === warning.code && other.sentence === warning.sentence))
      warnings.push(warning);
  };
  const groups = merge(
    input.parts.map((part) => ({
      identity: part.identity,
      results: part.candidates.map((one) => settle(one, input.statements)),
    })),
  );
  const results = doubtAll(groups);
  const order = dateOrder(input.dateTexts);
  const american =
    groups.some((group) => group.results.some((result) => result.unit === 'lb/acre')) ||
    groups.some((group) => /in|"/.test(group.identity.depth ?? ''));
  const samples = groups.map((group, index) =>
    sampleOf(group, results[index] ?? [], order === 'unknown' && american ? 'month-first' : order, warn),
  );
  if (
    order === 'unknown' &&
    american &&
    samples.some((sample) =>
      /^\d{1,2}[/.-]\d{1,2}[/.-]/.test(sample.dateSampledPrinted ?? sample.dateReportedPrinted ?? ''),
    )
  ) {
    warn(
      remark(
        'date-order-assumed',
        'The dates were read month first because the report uses inches or pounds per acre.',
      ),
    );
  }
  const names = samples.map((sample) => sample.sampleId?.toLowerCase()).filter((name) => name !== undefined);
  if (new Set(names).size < names.length)
    warn(remark('same-name', 'Two samples of this file bear one name; tell them apart by their laboratory numbers.'));
  return { samples, warnings };
}
