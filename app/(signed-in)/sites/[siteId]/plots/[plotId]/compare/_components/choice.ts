import { asDay, civil, daysBetween } from '@/lib/domain/days';
import { type Hemisphere, isSameSeason, seasonOf } from '@/lib/domain/sampling';
import type { Result } from '@/lib/schemas/results';

/** Which two tests stand side by side. The choice lives in the address: ?analyte=…&a=…&b=… */

export type ComparableTest = {
  readonly id: string;
  readonly plotId: string;
  readonly plotName: string;
  readonly takenOn: string;
  readonly printed: string;
  readonly laboratory: string | null;
};

export type Choice = { readonly analyte: string; readonly a: string; readonly b: string };
export type Preset = { readonly label: string; readonly a: string; readonly b: string };

type Row = Pick<
  Result,
  | 'id'
  | 'plotId'
  | 'takenOn'
  | 'printed'
  | 'laboratory'
  | 'composite'
  | 'analysis'
  | 'method'
  | 'form'
  | 'unitBasis'
  | 'analyte'
>;

/** Bags and analyses of one plot and day count as one test, known by the id of its first value. Newest first. */
export function testsOf(results: readonly Row[], plotNames: ReadonlyMap<string, string>): ComparableTest[] {
  const inOrder = [...results].sort(
    (x, y) => y.takenOn.localeCompare(x.takenOn) || x.composite - y.composite || x.analysis - y.analysis,
  );
  const firsts = new Map<string, Row>();
  for (const row of inOrder) {
    const key = [row.plotId, row.takenOn, row.analyte, row.method, row.form, row.unitBasis].join('|');
    if (!firsts.has(key)) firsts.set(key, row);
  }
  return [...firsts.values()].map((row) => ({
    id: row.id,
    plotId: row.plotId,
    plotName: plotNames.get(row.plotId) ?? 'an archived plot',
    takenOn: row.takenOn,
    printed: row.printed,
    laboratory: row.laboratory?.name ?? null,
  }));
}

/** "Spring 2026"; December belongs to the winter or summer of the year that follows. */
export function seasonWords(day: string, hemisphere: Hemisphere): string {
  const { year, month } = civil(asDay(day));
  const season = seasonOf(asDay(day), hemisphere);
  return `${season.charAt(0).toUpperCase()}${season.slice(1)} ${month === 12 ? year + 1 : year}`;
}

const MOST_NEIGHBOURS = 3;
const HALF_A_YEAR = 180;

export function presetsFor(tests: readonly ComparableTest[], plotId: string, hemisphere: Hemisphere): Preset[] {
  const mine = tests.filter((test) => test.plotId === plotId);
  const newest = mine[0];
  if (newest === undefined) return [];
  const presets: Preset[] = [];
  const offer = (label: string, a: ComparableTest | undefined, b: ComparableTest) => {
    if (a === undefined || presets.some((one) => one.a === a.id && one.b === b.id)) return;
    presets.push({ label, a: a.id, b: b.id });
  };
  const earlier = mine.filter((test) => test.takenOn < newest.takenOn);
  const gap = (test: ComparableTest) => daysBetween(asDay(test.takenOn), asDay(newest.takenOn));
  const same = (test: ComparableTest) => isSameSeason(asDay(test.takenOn), asDay(newest.takenOn));
  const named = (test: ComparableTest) => seasonWords(test.takenOn, hemisphere);
  const withEarlier = (test: ComparableTest) => `${named(newest)} with ${named(test).toLowerCase()}`;
  const lastSeason = earlier.find((test) => !same(test));
  if (lastSeason) offer(withEarlier(lastSeason), lastSeason, newest);
  const lastYear = earlier.find((test) => same(test) && gap(test) > HALF_A_YEAR);
  if (lastYear) offer(withEarlier(lastYear), lastYear, newest);
  offer('The newest with the one before', earlier[0], newest);
  const neighbours = tests.filter((test) => test.plotId !== plotId && test.takenOn === newest.takenOn);
  for (const neighbour of neighbours.slice(0, MOST_NEIGHBOURS)) {
    offer(`Same day, ${neighbour.plotName}`, newest, neighbour);
  }
  return presets;
}

/** The newest test of this plot against the one before; failing that against a neighbour; failing that nothing. */
export function defaultPair(tests: readonly ComparableTest[], plotId: string): Omit<Choice, 'analyte'> | null {
  const [newest, before] = tests.filter((test) => test.plotId === plotId);
  if (newest === undefined) return null;
  if (before !== undefined) return { a: before.id, b: newest.id };
  const others = tests.filter((test) => test.plotId !== plotId);
  const other = others.find((test) => test.takenOn === newest.takenOn) ?? others[0];
  return other === undefined ? null : { a: newest.id, b: other.id };
}

export type Asked = { readonly analyte: string | null; readonly a: string | null; readonly b: string | null };

const one = (value: string | string[] | undefined): string | null => (typeof value === 'string' ? value : null);

export const askedOf = (search: Record<string, string | string[] | undefined>): Asked => ({
  analyte: one(search.analyte),
  a: one(search.a),
  b: one(search.b),
});

/** What the address asks for where it names tests that exist; `replaced` says that it named others. */
export function pairFor(
  asked: Asked,
  tests: readonly ComparableTest[],
  plotId: string,
): { pair: Omit<Choice, 'analyte'> | null; replaced: boolean } {
  const usual = defaultPair(tests, plotId);
  const known = (id: string | null) => (tests.some((test) => test.id === id) ? id : null);
  const a = known(asked.a);
  const b = known(asked.b);
  const replaced = (asked.a !== null && a === null) || (asked.b !== null && b === null);
  if (a === null && b === null) return { pair: usual, replaced };
  const other = (taken: string) =>
    [usual?.a, usual?.b, ...tests.map((test) => test.id)].find((id) => id !== undefined && id !== taken) ?? null;
  const pair = { a: a ?? (b === null ? null : other(b)), b: b ?? (a === null ? null : other(a)) };
  return pair.a === null || pair.b === null ? { pair: usual, replaced } : { pair: { a: pair.a, b: pair.b }, replaced };
}

export function compareQuery(choice: { analyte: string; a?: string; b?: string }): string {
  const query = new URLSearchParams({ analyte: choice.analyte });
  if (choice.a !== undefined) query.set('a', choice.a);
  if (choice.b !== undefined) query.set('b', choice.b);
  return `?${query}`;
}
