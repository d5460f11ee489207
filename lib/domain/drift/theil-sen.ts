/**
 * Theil-Sen slope with its exact interval, and Kendall's exact test.
 *
 * Sources: Mann 1945, Sen 1968, Gilbert, Statistical Methods for Environmental Pollution Monitoring, 1987. The interval
 * inverts the exact permutation distribution of Kendall's S, so its coverage is a known number of at least 90 %; with three
 * tests there is none. Never the normal approximation below ten tests. Checked against R (cor.test) in fixtures/tables.
 */
export type DatedValue = { readonly t: number; readonly y: number };

const eachPair = (points: readonly DatedValue[]): readonly (readonly [DatedValue, DatedValue])[] =>
  points.flatMap((first, index) => points.slice(index + 1).map((second) => [first, second] as const));

export const kendallS = (points: readonly DatedValue[]): number =>
  eachPair(points.toSorted((a, b) => a.t - b.t)).reduce(
    (sum, [first, second]) => sum + Math.sign(second.y - first.y),
    0,
  );

/** Number of orderings of n by their count of inversions. */
function inversionCounts(n: number): readonly number[] {
  let counts: readonly number[] = [1];
  for (let size = 2; size <= n; size += 1) {
    const next = new Array<number>(counts.length + size - 1).fill(0);
    counts.forEach((count, index) => {
      for (let shift = 0; shift < size; shift += 1) next[index + shift] = (next[index + shift] ?? 0) + count;
    });
    counts = next;
  }
  return counts;
}

/** S and its probability for every value it can take, largest first. */
function distributionOfS(n: number): readonly { readonly S: number; readonly p: number }[] {
  const counts = inversionCounts(n);
  const total = counts.reduce((sum, count) => sum + count, 0);
  const pairs = (n * (n - 1)) / 2;
  return counts.map((count, index) => ({ S: pairs - 2 * index, p: count / total }));
}

const upperTail = (n: number, S: number): number =>
  distributionOfS(n).reduce((sum, row) => sum + (row.S >= S ? row.p : 0), 0);

/** Exact two-sided p without ties. */
export const kendallP = (S: number, n: number): number =>
  distributionOfS(n).reduce((sum, row) => sum + (Math.abs(row.S) >= Math.abs(S) ? row.p : 0), 0);

const MOST_FOR_ALL_ORDERINGS = 8;

function* orderings<T>(items: readonly T[]): Generator<readonly T[]> {
  if (items.length <= 1) {
    yield items;
    return;
  }
  for (const [index, item] of items.entries()) {
    for (const rest of orderings([...items.slice(0, index), ...items.slice(index + 1)])) yield [item, ...rest];
  }
}

/** Exact two-sided p over all orderings of tied values; up to eight tests. */
export function kendallPWithTies(
  values: readonly number[],
): { ok: true; p: number } | { ok: false; reason: 'too-many-tests' } {
  if (values.length > MOST_FOR_ALL_ORDERINGS) return { ok: false, reason: 'too-many-tests' };
  const score = (row: readonly number[]): number => Math.abs(kendallS(row.map((y, t) => ({ t, y }))));
  const seen = score(values);
  let [atLeast, all] = [0, 0];
  for (const row of orderings(values)) {
    all += 1;
    if (score(row) >= seen) atLeast += 1;
  }
  return { ok: true, p: atLeast / all };
}

export type SenSlope = {
  readonly slope: number;
  readonly interval: { readonly lo: number; readonly hi: number; readonly coverage: number } | null;
};

const median = (sorted: readonly number[]): number => {
  const middle = Math.floor(sorted.length / 2);
  const upper = sorted[middle] ?? 0;
  return sorted.length % 2 === 1 ? upper : (upper + (sorted[middle - 1] ?? 0)) / 2;
};

/** Needs at least two tests on different days. */
export function theilSen(points: readonly DatedValue[], level = 0.9): SenSlope {
  const slopes = eachPair(points)
    .filter(([first, second]) => first.t !== second.t)
    .map(([first, second]) => (second.y - first.y) / (second.t - first.t))
    .sort((a, b) => a - b);
  const n = points.length;
  const pairs = slopes.length;
  const slope = median(slopes);
  const reachable = distributionOfS(n).filter((row) => upperTail(n, row.S) <= (1 - level) / 2 + 1e-12);
  const critical = reachable.at(-1)?.S;
  if (critical === undefined || pairs !== (n * (n - 1)) / 2) return { slope, interval: null };
  const rank = (pairs - critical + 2) / 2;
  const [lo, hi] = [slopes[rank - 1], slopes[pairs - rank]];
  if (lo === undefined || hi === undefined) return { slope, interval: null };
  return { slope, interval: { lo, hi, coverage: 1 - 2 * upperTail(n, critical) } };
}
