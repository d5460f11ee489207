import type { OwnReadings } from './change';
import { comparable, sameLaboratory } from './comparable';
import type { SiteError, StandardisedSquares } from './learn';
import { ownReadings } from './reading';
import { disturbances } from './select';
import type { BeforeUsed, ControlPlot, ControlUse, EffectInput, TestPoint } from './types';

/**
 * Which untreated plots can stand beside the treated one: sampled on the same days, sent to the same laboratory as the
 * treated plot was that day, read the same way, above the limit, and nothing done to them in between.
 */
export type UsedControl = {
  readonly plot: ControlPlot;
  readonly befores: readonly BeforeUsed[];
  readonly after: TestPoint;
};

export type ControlChoice = {
  readonly used: readonly UsedControl[];
  /** The treated plot's before-tests of the days that the controls were sampled on too, weights summing to 1. */
  readonly befores: readonly BeforeUsed[];
  readonly uses: readonly ControlUse[];
};

type Match =
  | { readonly ok: true; readonly test: TestPoint }
  | { readonly ok: false; readonly why: NonNullable<ControlUse['why']> };

function match(plot: ControlPlot, like: TestPoint): Match {
  const sameDay = plot.tests.filter((test) => test.analyte === like.analyte && test.day === like.day && test.confirmed);
  let why: NonNullable<ControlUse['why']> = 'not-sampled-the-same-days';
  for (const test of sameDay) {
    if (test.qualifier !== 'exact') why = 'below-limit';
    else if (!sameLaboratory(test, like)) why = 'other-laboratory';
    else if (!comparable(test, like).ok) why = 'not-comparable';
    else return { ok: true, test };
  }
  return { ok: false, why };
}

function fitsDay(plot: ControlPlot, row: BeforeUsed, after: TestPoint, input: EffectInput): Match {
  const before = match(plot, row.test);
  if (!before.ok) return before;
  const calm = disturbances(plot.events, input.analyte, [], row.test.day, after.day).length === 0;
  return calm ? before : { ok: false, why: 'something-happened' };
}

export function chooseControls(input: EffectInput, befores: readonly BeforeUsed[], after: TestPoint): ControlChoice {
  const rows = input.controls
    .filter((plot) => plot.plotId !== input.plotId)
    .map((plot) => {
      const own = match(plot, after);
      const fits = befores.map((row) => fitsDay(plot, row, after, input));
      return { plot, after: own, fits };
    });
  const heavyFirst = befores.map((row, index) => ({ row, index })).toSorted((a, b) => b.row.weight - a.row.weight);
  const pivot = heavyFirst.find(({ index }) => rows.some((row) => row.after.ok && row.fits[index]?.ok === true));
  const takes = (row: (typeof rows)[number]): boolean =>
    pivot !== undefined && row.after.ok && row.fits[pivot.index]?.ok === true;
  const taken = rows.filter(takes);
  const kept = befores.filter((_, index) => taken.length > 0 && taken.every((row) => row.fits[index]?.ok === true));
  const total = kept.reduce((sum, row) => sum + row.weight, 0);
  const shared = kept.map((row) => ({ ...row, weight: row.weight / total }));
  const used: UsedControl[] = [];
  for (const row of taken) {
    if (!row.after.ok) continue;
    const own = shared.flatMap((before) => {
      const found = match(row.plot, before.test);
      return found.ok ? [{ ...before, test: found.test }] : [];
    });
    used.push({ plot: row.plot, befores: own, after: row.after.test });
  }
  const uses = rows.map(({ plot, after: own, fits }): ControlUse => {
    if (used.some((control) => control.plot.plotId === plot.plotId))
      return { plotId: plot.plotId, name: plot.name, used: true };
    const fit = fits[pivot?.index ?? heavyFirst[0]?.index ?? 0];
    const why = !own.ok ? own.why : fit !== undefined && !fit.ok ? fit.why : 'not-sampled-the-same-days';
    return { plotId: plot.plotId, name: plot.name, used: false, why };
  });
  return { used, befores: shared, uses };
}

/** What the controls' own scatter says about v, in squares over the prior; nothing from a single control. */
export function scatterOf(error: SiteError, used: readonly UsedControl[]): StandardisedSquares {
  const changes = used.map(({ befores, after }) => {
    const own = ownReadings(error, befores, after);
    return { change: own.after - own.before, variance: (own.afterVariance + own.beforeVariance) / error.plot.factor };
  });
  const centre = changes.reduce((sum, row) => sum + row.change, 0) / Math.max(changes.length, 1);
  const variance = changes.reduce((sum, row) => sum + row.variance, 0) / Math.max(changes.length, 1);
  const squares = changes.reduce((sum, row) => sum + (row.change - centre) ** 2, 0);
  return { sum: changes.length > 1 ? squares / variance : 0, df: Math.max(changes.length - 1, 0) };
}

export const controlReadings = (error: SiteError, used: readonly UsedControl[]): readonly OwnReadings[] =>
  used.map(({ befores, after }) => ownReadings(error, befores, after));
