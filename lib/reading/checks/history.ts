import {
  type AnalyteKey,
  analyte,
  type MethodKey,
  methodLabel,
  type Qualifier,
  type UnitKey,
  unitOf,
} from '@/lib/domain/analytes';
import { asDay, dayInWords } from '@/lib/domain/days';
import { remark } from '../candidate';
import type { Remark } from '../types';

/** A number as far as another year's can be held against it. */
export type HistoryValue = {
  readonly analyte: AnalyteKey;
  readonly printed: string;
  readonly value: number | null;
  readonly qualifier: Qualifier;
  readonly unit: UnitKey | null;
  readonly method: MethodKey | null;
  readonly form: string | null;
};

/** The confirmed numbers of one sample of the plot. */
export type EarlierTest = {
  readonly on: string;
  readonly sampleName: string | null;
  readonly values: readonly HistoryValue[];
};

export type HistoryInput<Row extends HistoryValue> = {
  readonly on: string | null;
  readonly sampleName: string | null;
  readonly plotName: string;
  readonly rows: readonly Row[];
  readonly tests: readonly EarlierTest[];
};

/** Doubts about rows, and those about the sample as a whole. */
export type HistoryDoubts<Row> = {
  readonly rows: ReadonlyMap<Row, readonly Remark[]>;
  readonly sample: readonly Remark[];
};

/** What these checks say; a second look takes the old answers away first. */
export const HISTORY_CODES: ReadonlySet<string> = new Set([
  'factor-two',
  'unit-changed',
  'method-changed',
  'sample-renamed',
]);

/** Twice or half, as wide as two laboratories' rounding and some change of the soil make it. */
const TWICE: readonly [number, number] = [1.85, 2.15];
/** A single number counts only when it is twice or half to the last printed figure, and its figures are fine enough to say so. */
const FINEST_NEEDED = 0.05;
const FEWEST_TOGETHER = 2;

const WEIGHTS: ReadonlySet<UnitKey> = new Set<UnitKey>(['mg/kg', 'mg/dm3', 'mg/L', 'lb/acre', 'kg/ha']);

const agrees = <T>(a: T | null, b: T | null) => a === null || b === null || a === b;
const unitName = (unit: UnitKey) => unitOf(unit)?.label ?? unit;

/** Nearest earlier test first; where there is none, the nearest later one: old years come in any order. */
export function byNearness(tests: readonly EarlierTest[], on: string | null): EarlierTest[] {
  const newestFirst = [...tests].sort((a, b) => b.on.localeCompare(a.on));
  if (on === null) return newestFirst;
  return [...newestFirst.filter((test) => test.on <= on), ...newestFirst.filter((test) => test.on > on).reverse()];
}

/** The nearest test that has the analyte, with all its numbers of it. */
function lastOf(row: HistoryValue, tests: readonly EarlierTest[]): { on: string; values: HistoryValue[] } | null {
  for (const test of tests) {
    const values = test.values.filter((one) => one.analyte === row.analyte && agrees(one.form, row.form));
    if (values.length > 0) return { on: test.on, values };
  }
  return null;
}

const halfStep = (printed: string) => 0.5 * 10 ** -(/\.(\d+)/.exec(printed)?.[1]?.length ?? 0);

/** Twice the smaller one to the last figure that is printed. */
function exactlyTwice(a: HistoryValue, b: HistoryValue): boolean {
  const [small, large] = (a.value ?? 0) < (b.value ?? 0) ? [a, b] : [b, a];
  const slack = halfStep(large.printed) + 2 * halfStep(small.printed);
  const twice = 2 * (small.value ?? 0);
  return twice > 0 && slack <= FINEST_NEEDED * twice && Math.abs((large.value ?? 0) - twice) <= slack;
}

type Pair<Row> = { readonly row: Row; readonly before: HistoryValue; readonly on: string; readonly ratio: number };

/** Numbers of weight that stand in one unit, or in none, then and now. */
function pairsOf<Row extends HistoryValue>(rows: readonly Row[], tests: readonly EarlierTest[]): Pair<Row>[] {
  return rows.flatMap((row) => {
    const last = lastOf(row, tests);
    const before = last?.values.find((one) => agrees(one.unit, row.unit) && agrees(one.method, row.method));
    if (last === null || before === undefined) return [];
    const unit = row.unit ?? before.unit;
    if (unit === null || !WEIGHTS.has(unit) || row.qualifier !== '=' || before.qualifier !== '=') return [];
    if (row.value === null || before.value === null || row.value <= 0 || before.value <= 0) return [];
    return [{ row, before, on: last.on, ratio: row.value / before.value }];
  });
}

const doubled = (ratio: number) => ratio >= TWICE[0] && ratio <= TWICE[1];

function jumps<Row extends HistoryValue>(pairs: readonly Pair<Row>[]): { pair: Pair<Row>; together: number }[] {
  for (const side of [(ratio: number) => ratio, (ratio: number) => 1 / ratio]) {
    const together = pairs.filter((pair) => doubled(side(pair.ratio)));
    if (together.length >= FEWEST_TOGETHER && together.length >= pairs.length / 2)
      return together.map((pair) => ({ pair, together: together.length }));
  }
  return pairs
    .filter((pair) => (doubled(pair.ratio) || doubled(1 / pair.ratio)) && exactlyTwice(pair.row, pair.before))
    .map((pair) => ({ pair, together: 1 }));
}

function jumpSentence<Row extends HistoryValue>(pair: Pair<Row>, together: number, of: number): string {
  const { row, before, on, ratio } = pair;
  const times = ratio > 1 ? 'twice' : 'half';
  const also = together > 1 ? `, like ${together} of ${of} numbers of this sample` : '';
  const why =
    ratio > 1
      ? 'Is this page in lb/acre, which is twice the ppm?'
      : 'Was the page before in lb/acre, which is twice the ppm?';
  return `${analyte(row.analyte).label} is ${times} what it was on ${dayInWords(asDay(on))}: ${before.printed} then, ${row.printed} now${also}. ${why}`;
}

function otherUnit(row: HistoryValue, last: { on: string; values: HistoryValue[] }): Remark | null {
  const before = last.values.flatMap((one) => (one.unit === null ? [] : [one.unit]));
  const [first] = before;
  if (row.unit === null || first === undefined || before.includes(row.unit)) return null;
  const then = last.values.find((one) => one.unit === first)?.printed ?? '';
  const text = `On ${dayInWords(asDay(last.on))} this plot's ${analyte(row.analyte).label.toLowerCase()} was ${then} ${unitName(first)}; this page gives ${row.printed} ${unitName(row.unit)}. The two do not stand on one line.`;
  return remark('unit-changed', text);
}

function otherMethod(row: HistoryValue, last: { on: string; values: HistoryValue[] }): Remark | null {
  const before = last.values.flatMap((one) => (one.method === null ? [] : [one.method]));
  const [first] = before;
  if (row.method === null || first === undefined || before.includes(row.method)) return null;
  const text = `On ${dayInWords(asDay(last.on))} this plot's ${analyte(row.analyte).label.toLowerCase()} was measured by ${methodLabel(first)}; this page says ${methodLabel(row.method)}. The two numbers cannot be compared.`;
  return remark('method-changed', text);
}

const plain = (name: string) =>
  name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();

/** One plot whose sample goes by a new name: the grower renamed it, or two bags were swapped. */
function renamed(input: HistoryInput<HistoryValue>, tests: readonly EarlierTest[]): Remark | null {
  const named = tests.flatMap((test) => (test.sampleName === null ? [] : [{ on: test.on, name: test.sampleName }]));
  const [last] = named;
  if (input.sampleName === null || plain(input.sampleName) === '' || last === undefined) return null;
  const now = plain(input.sampleName);
  if (now === plain(input.plotName) || named.some((one) => plain(one.name) === now)) return null;
  const text = `"${input.sampleName}" is put to ${input.plotName}, whose sample of ${dayInWords(asDay(last.on))} was called "${last.name}". Is it the same ground?`;
  return remark('sample-renamed', text);
}

/**
 * Holds the rows of one sample against the confirmed tests of the same plot. Purpose: one laboratory has been seen to send
 * one layout in lb/acre and the next time in ppm, to call a plot's sample by a new name, and to change unit or extractant.
 * Method: number against the nearest earlier one of the same analyte (the nearest later where there is none); twice or
 * half is 1.85 to 2.15 when most numbers of the sample jump together, or exact to the printed figures for one alone.
 * Raises questions only; no number, unit or name is changed. Errors: none. Worked example: 80 and 300 mg/kg then, 161 and
 * 598 mg/kg now: both are asked about.
 */
export function checkHistory<Row extends HistoryValue>(input: HistoryInput<Row>): HistoryDoubts<Row> {
  const tests = byNearness(input.tests, input.on);
  const found = new Map<Row, Remark[]>();
  const raise = (row: Row, doubt: Remark | null) => {
    if (doubt !== null) found.set(row, [...(found.get(row) ?? []), doubt]);
  };
  const pairs = pairsOf(input.rows, tests);
  for (const { pair, together } of jumps(pairs)) {
    raise(pair.row, remark('factor-two', jumpSentence(pair, together, pairs.length)));
  }
  for (const row of input.rows) {
    const last = lastOf(row, tests);
    if (last === null) continue;
    raise(row, otherUnit(row, last));
    raise(row, otherMethod(row, last));
  }
  const name = renamed(input, tests);
  return { rows: found, sample: name === null ? [] : [name] };
}
