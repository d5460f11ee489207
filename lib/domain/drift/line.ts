/**
 * A weighted straight line with steps: y = a + b t + sum of c_j for t at or after t_j, weights 1 / known variance.
 *
 * Standard errors are widened by the Birge factor max(1, X2 / (n - p)) when the points scatter more than their variances
 * say. Units: t in years, y on the working scale. Needs at least as many points as parameters and two different days on
 * one side of the steps; otherwise a refusal. Checked against R's lm(weights) in fixtures/tables.
 */
export type LinePoint = { readonly t: number; readonly y: number; readonly variance: number };

export type Line = {
  readonly slope: number;
  readonly slopeSe: number;
  readonly steps: readonly number[];
  /** Level at t = 0 after the last step, with its variance and covariance with the slope. */
  readonly level: number;
  readonly levelVariance: number;
  readonly covariance: number;
  readonly factor: number;
  readonly parameters: number;
  readonly tests: number;
  /** All times are counted from here. */
  readonly origin: number;
};

type Matrix = readonly (readonly number[])[];

const at = (matrix: Matrix, row: number, column: number): number => matrix[row]?.[column] ?? 0;

/** Gauss-Jordan with row exchange; null when a column cannot be told from the others. */
function inverse(matrix: Matrix): Matrix | null {
  const size = matrix.length;
  const work = matrix.map((row, index) => [
    ...row,
    ...Array.from({ length: size }, (_, column) => (column === index ? 1 : 0)),
  ]);
  for (let column = 0; column < size; column += 1) {
    let pivot = column;
    for (let row = column + 1; row < size; row += 1) {
      if (Math.abs(at(work, row, column)) > Math.abs(at(work, pivot, column))) pivot = row;
    }
    const pivotRow = work[pivot];
    const current = work[column];
    if (!pivotRow || !current || Math.abs(pivotRow[column] ?? 0) < 1e-10) return null;
    [work[column], work[pivot]] = [pivotRow, current];
    const lead = pivotRow[column] ?? 1;
    const scaled = pivotRow.map((value) => value / lead);
    for (let row = 0; row < size; row += 1) {
      const times = at(work, row, column);
      work[row] =
        row === column ? scaled : (work[row] ?? []).map((value, index) => value - times * (scaled[index] ?? 0));
    }
  }
  return work.map((row) => row.slice(size));
}

export function weightedLine(
  points: readonly LinePoint[],
  stepsAt: readonly number[] = [],
): { ok: true; line: Line } | { ok: false; reason: 'too-few-tests' | 'not-separable' } {
  const parameters = 2 + stepsAt.length;
  if (points.length < parameters) return { ok: false, reason: 'too-few-tests' };
  const weights = points.map((point) => 1 / point.variance);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const origin = points.reduce((sum, point, index) => sum + ((weights[index] ?? 0) * point.t) / total, 0);
  const rows = points.map((point) => [1, point.t - origin, ...stepsAt.map((step) => (point.t >= step ? 1 : 0))]);
  const weighted = (left: (index: number) => number, right: (index: number) => number): number =>
    points.reduce((sum, _, index) => sum + (weights[index] ?? 0) * left(index) * right(index), 0);
  const cell = (index: number, column: number): number => at(rows, index, column);
  const columns = Array.from({ length: parameters }, (_, index) => index);
  const normal = columns.map((r) =>
    columns.map((c) =>
      weighted(
        (i) => cell(i, r),
        (i) => cell(i, c),
      ),
    ),
  );
  const covariance = inverse(normal);
  if (covariance === null) return { ok: false, reason: 'not-separable' };
  const right = columns.map((r) =>
    weighted(
      (i) => cell(i, r),
      (i) => points[i]?.y ?? 0,
    ),
  );
  const beta = columns.map((r) => columns.reduce((sum, c) => sum + at(covariance, r, c) * (right[c] ?? 0), 0));
  const fitted = (index: number): number => columns.reduce((sum, c) => sum + cell(index, c) * (beta[c] ?? 0), 0);
  const squares = weighted(
    (i) => (points[i]?.y ?? 0) - fitted(i),
    (i) => (points[i]?.y ?? 0) - fitted(i),
  );
  const left = points.length - parameters;
  const factor = left > 0 ? Math.max(1, squares / left) : 1;
  const levels = columns.filter((column) => column !== 1);
  const sumOver = (pick: (column: number) => number): number => levels.reduce((sum, column) => sum + pick(column), 0);
  return {
    ok: true,
    line: {
      slope: beta[1] ?? 0,
      slopeSe: Math.sqrt(factor * at(covariance, 1, 1)),
      steps: beta.slice(2),
      level: sumOver((column) => beta[column] ?? 0),
      levelVariance: factor * sumOver((r) => sumOver((c) => at(covariance, r, c))),
      covariance: factor * sumOver((column) => at(covariance, column, 1)),
      factor,
      parameters,
      tests: points.length,
      origin,
    },
  };
}

/**
 * When the line reaches `edge`: the best time, and every time at which it lies within q standard errors of the edge
 * (Fieller 1954, inverse prediction). When the slope is not settled there is no interval.
 * Worked example: pH 6.6, 6.5, 6.46, 6.43, 6.34, 6.3 in years 0-5 (variance 0.0049) reach 6.0 at 10.13, 7.90 to 15.19.
 */
export function crossing(
  line: Line,
  edge: number,
  q: number,
): { readonly t: number; readonly interval: { readonly from: number; readonly until: number } | null } {
  const gap = line.level - edge;
  const t = line.origin - gap / line.slope;
  const a = line.slope ** 2 - (q * line.slopeSe) ** 2;
  const b = 2 * (line.slope * gap - q ** 2 * line.covariance);
  const c = gap ** 2 - q ** 2 * line.levelVariance;
  if (a <= 0) return { t, interval: null };
  const root = Math.sqrt(b ** 2 - 4 * a * c);
  return { t, interval: { from: line.origin + (-b - root) / (2 * a), until: line.origin + (-b + root) / (2 * a) } };
}

/** Two independent estimates joined by precision. */
export function joinByPrecision(
  prior: { readonly mean: number; readonly sd: number },
  own: { readonly mean: number; readonly sd: number },
): { readonly mean: number; readonly sd: number } {
  const [priorWeight, ownWeight] = [prior.sd ** -2, own.sd ** -2];
  const total = priorWeight + ownWeight;
  return { mean: (priorWeight * prior.mean + ownWeight * own.mean) / total, sd: 1 / Math.sqrt(total) };
}
