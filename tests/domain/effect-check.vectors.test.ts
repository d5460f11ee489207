import { describe, expect, it } from 'vitest';
import extra from '@/fixtures/tables/effect-check.extra-vectors.json';
import main from '@/fixtures/tables/effect-check.vectors.json';
import { crossing, joinByPrecision, weightedLine } from '@/lib/domain/drift/line';
import { kendallP, kendallPWithTies, kendallS, theilSen } from '@/lib/domain/drift/theil-sen';
import { censoredChange, changeAgainstControls, changeAlone, joinByWeights } from '@/lib/domain/effects/change';
import {
  duplicateSumOfSquares,
  logSdOfCv,
  readingVariance,
  satterthwaite,
  smallestChangeSeen,
  smallestRatioSeen,
  twoPartSd,
  updateVariance,
} from '@/lib/domain/effects/error-model';
import { agreement, planLogSd, planRange } from '@/lib/domain/effects/intended';
import { betweenPlotVariance, reliability, spuriousFall, trueBefore } from '@/lib/domain/effects/regression';
import { chanceToSee, coresNeeded, largestStandardError } from '@/lib/domain/effects/settle-math';
import {
  acidFromSulfur,
  baseFromLime,
  phChangeFromSulfur,
  ppmGain,
  soilLbPer1000SqFt,
} from '@/lib/domain/effects/soil-mass';
import { additiveZone, logZone, turnedInterval, verdictOf } from '@/lib/domain/effects/verdict';
import { normalQuantile, tQuantile, tUpperTail } from '@/lib/domain/quantiles';
import { circularGap } from '@/lib/domain/sampling';

/** Source of every expected number: R 4.2.2 (and metafor 3.8-1), see fixtures/tables/EFFECT-CHECK.md. */
type Inputs = {
  readonly n: (name: string) => number;
  readonly list: (name: string) => readonly number[];
  readonly has: (name: string) => boolean;
};
type Answer = string | number | null | readonly (number | null)[];
type Vector = {
  readonly id: string;
  readonly inputs: Record<string, unknown>;
  readonly expected: unknown;
  readonly tolerance: number;
};

const vectors: readonly Vector[] = [...main, ...extra];

function read(inputs: Record<string, unknown>): Inputs {
  const numbers = (name: string): readonly number[] => {
    const value = inputs[name];
    const row: readonly unknown[] = Array.isArray(value) ? value : [value];
    return row.map((item) => {
      if (typeof item !== 'number') throw new Error(`${name} is no number`);
      return item;
    });
  };
  return {
    n: (name) => numbers(name)[0] ?? Number.NaN,
    list: numbers,
    has: (name) => name in inputs,
  };
}

const mean = (row: readonly number[]): number => row.reduce((sum, value) => sum + value, 0) / row.length;
const slice = ({ n }: Inputs) => ({ densityGPerCm3: n('bd'), depthIn: n('depth_in') });
const verdict = ({ n }: Inputs): Answer =>
  verdictOf(turnedInterval(n('D'), n('s'), n('nu'), n('I')), additiveZone(n('I')));
const logVerdict = ({ n, has }: Inputs): Answer =>
  verdictOf(
    turnedInterval(Math.log(n('A') / n('B')) - (has('ctrl') ? n('ctrl') : 0), n('s'), n('nu'), n('I')),
    logZone(n('I'), n('B')),
  );
const points = ({ list, has }: Inputs) => {
  const v = has('v') ? list('v') : [];
  return list('t').map((t, index) => ({ t, y: list('y')[index] ?? Number.NaN, variance: v[index] ?? 1 }));
};
const line = (inputs: Inputs, steps: readonly number[] = []) => {
  const fit = weightedLine(points(inputs), steps);
  if (!fit.ok) throw new Error(fit.reason);
  return fit.line;
};
const sen = (inputs: Inputs): Answer => {
  const { slope, interval } = theilSen(points(inputs));
  return [slope, interval?.lo ?? null, interval?.hi ?? null, interval?.coverage ?? 1];
};
const cross = (inputs: Inputs, df: number): Answer => {
  const { t, interval } = crossing(line(inputs), inputs.n('edge'), tQuantile(0.9, df));
  return [t, interval?.from ?? null, interval?.until ?? null];
};
const rows = (after: readonly number[], before: readonly number[], v: number) =>
  after.map((value, index) => ({
    after: value,
    afterVariance: v,
    before: before[index] ?? Number.NaN,
    beforeVariance: v,
  }));
const against = ({ list }: Inputs, v: number, rho: number, plots = 7) =>
  changeAgainstControls(rows(list('AT'), list('BT'), v), rows(list('AC'), list('BC'), v), { rho, plots }, 4);
const noShared = { beforeWeightsSquared: 1, season: 0, laboratory: 0 };

const COMPUTED: Readonly<Record<string, (inputs: Inputs) => Answer>> = {
  'q-t-8': ({ n }) => tQuantile(n('p'), n('df')),
  'q-t-16': ({ n }) => tQuantile(n('p'), n('df')),
  'q-t-frac': ({ n }) => tQuantile(n('p'), n('df')),
  'q-t-small': ({ n }) => tQuantile(n('p'), n('df')),
  'q-norm': ({ n }) => normalQuantile(n('p')),
  'p-t': ({ n }) => tUpperTail(n('t'), n('df')),
  'var-composite-ph': ({ n }) =>
    readingVariance({
      core: n('core'),
      cores: n('cores'),
      rep: n('rep'),
      labDuplicates: n('labdups'),
      wobble: n('wobble'),
    }),
  'var-composite-round': ({ n }) =>
    readingVariance({
      core: n('core'),
      cores: n('cores'),
      rep: n('rep'),
      labDuplicates: n('labdups'),
      wobble: n('wobble'),
      printedStep: n('round'),
    }),
  'cv-log': ({ n }) => logSdOfCv(n('cv')),
  'dup-sd': ({ list }) =>
    Math.sqrt(duplicateSumOfSquares(list('a').map((a, i) => a - (list('b')[i] ?? 0))) / list('a').length),
  'var-update': ({ n }) => {
    const updated = updateVariance({ variance: n('s0') ** 2, df: n('nu0') }, n('ss'), n('df'));
    return [updated.variance, updated.df];
  },
  satterthwaite: ({ list }) => satterthwaite(list('v').map((variance, i) => ({ variance, df: list('df')[i] ?? 0 }))),
  'two-part-sd': ({ n }) => twoPartSd(n('x'), n('a'), n('c')),
  'rcv-additive': ({ n }) => smallestChangeSeen(n('s1'), n('s2'), n('p')),
  'rcv-one-sided': ({ n }) => smallestChangeSeen(n('s'), n('s'), 0.9),
  'rcv-log': ({ n }) => {
    const seen = smallestRatioSeen(n('cv'), 0.95);
    return [seen.fall, seen.rise];
  },
  'soil-mass': (inputs) => soilLbPer1000SqFt(slice(inputs)),
  'ppm-k': (inputs) => ppmGain(inputs.n('lb'), inputs.n('frac'), inputs.n('eff'), slice(inputs)),
  'acid-s': (inputs) => acidFromSulfur(inputs.n('lb'), slice(inputs)),
  'base-lime': (inputs) => baseFromLime(inputs.n('lb'), slice(inputs)),
  'dph-s': (inputs) => phChange(inputs, 0),
  'dph-s-lime': (inputs) => phChange(inputs, inputs.n('free')),
  'plan-range': ({ n, list }) => {
    const range = planRange(n('I'), list('sds'));
    return [range.low, range.high];
  },
  'plan-compat': ({ n }) => agreement(n('D'), n('s'), n('I'), n('sd_I')),
  'rtm-rho': ({ n }) => reliability(n('tau2'), n('v')),
  'rtm-back': ({ n }) => trueBefore(n('B'), n('m'), n('rho')),
  'rtm-trunc': ({ n }) => spuriousFall(n('m'), n('tau'), n('v'), n('cut')),
  'rtm-change': ({ n }) => {
    const rho = reliability(n('tau2'), n('v'));
    const change = changeAlone(
      { after: n('A'), afterVariance: n('v'), before: n('B'), beforeVariance: n('v') },
      { mean: n('m'), plots: n('n'), betweenPlots: n('tau2'), rho },
      { ...noShared, occasion: n('occ') ** 2 },
    );
    return [change.D, Math.sqrt(change.variance)];
  },
  'baseline-mix': ({ list }) => {
    const joined = joinByWeights(
      list('y'),
      list('v').map((v) => 1 / v),
    );
    return [joined.value, joined.variance];
  },
  'did-est': (inputs) => against(inputs, 1, 1).D,
  'did-se-known': ({ n }) => {
    const plots = (count: number) => rows(new Array<number>(count).fill(0), new Array<number>(count).fill(0), n('v'));
    return Math.sqrt(changeAgainstControls(plots(n('nT')), plots(n('nC')), { rho: 1, plots: 7 }, 4).variance);
  },
  'did-rho': (inputs) => against(inputs, 1, inputs.n('rho')).D,
  'log-ratio': ({ n }) => {
    const { lo, estimate, hi } = turnedInterval(Math.log(n('A') / n('B')), n('sg') * Math.SQRT2, n('df'), 1);
    return [estimate, lo, hi].map(Math.exp);
  },
  's-delta': ({ n }) => Math.hypot(twoPartSd(n('A'), 0, n('sg')), twoPartSd(n('B'), 0, n('sg'))),
  'cens-before': ({ n }) => {
    const at = censoredChange({ low: 0, high: n('lod') }, { low: n('after'), high: n('after') }, n('s'), n('q'));
    return [at.lo, at.estimate, at.hi];
  },
  'vd-asint': verdict,
  'vd-short': verdict,
  'vd-short-nil': verdict,
  'vd-beyond': verdict,
  'vd-none': verdict,
  'vd-other': verdict,
  'vd-size': verdict,
  'vd-cannot': verdict,
  'vd-raise': verdict,
  'vd-precise-low': verdict,
  'vd-interval': ({ n }) => {
    const at = turnedInterval(n('D'), n('s'), n('nu'), n('I'));
    return [at.lo / Math.abs(n('I')), at.hi / Math.abs(n('I'))];
  },
  'vd-log-k': logVerdict,
  'vd-log-p': logVerdict,
  'vd-log-ctrl': logVerdict,
  'shrink-1': ({ n }) => {
    const joined = joinByPrecision({ mean: n('r0'), sd: n('u0') }, { mean: n('b'), sd: n('se') });
    return [joined.mean, joined.sd];
  },
  'sen-5': sen,
  'sen-6': sen,
  'sen-3': sen,
  'mk-S': (inputs) => kendallS(points(inputs)),
  'mk-4': ({ n }) => kendallP(n('S'), n('n')),
  'mk-5': ({ n }) => kendallP(n('S'), n('n')),
  'mk-6-r': (inputs) => kendallP(kendallS(points(inputs)), points(inputs).length),
  'mk-10': ({ n }) => kendallP(n('S'), n('n')),
  'mk-ties': ({ list }) => {
    const exact = kendallPWithTies(list('y'));
    return exact.ok ? exact.p : Number.NaN;
  },
  wls: (inputs) => {
    const fit = line(inputs);
    return [fit.slope, fit.slopeSe, fit.factor];
  },
  'wls-lm': (inputs) => line(inputs).slope,
  'step-trend': (inputs) => {
    const fit = line(inputs, [2021]);
    return [fit.slope, fit.steps[0] ?? Number.NaN];
  },
  'drift-prior': ({ n }) => {
    const joined = joinByPrecision({ mean: n('b0'), sd: n('sb') }, { mean: n('b'), sd: n('se') });
    return [joined.mean, joined.sd];
  },
  cross: (inputs) => cross(inputs, 12),
  'cross-none': (inputs) => cross(inputs, 10),
  'day-gap': ({ n }) => circularGap(n('d1'), n('d2')),
  's-see': ({ n }) => largestStandardError(n('I'), 'see'),
  's-size': ({ n }) => largestStandardError(n('I'), 'size'),
  cores: ({ n }) => {
    const need = coresNeeded({ variance: n('v'), core: n('core'), rep: n('rep'), labDuplicates: 1, wobble: n('wob') });
    return need.ok ? need.cores : Number.NaN;
  },
  'pow-see': ({ n }) => chanceToSee(n('I'), n('s')),
  'x-tau2-hat': (inputs) => between(inputs),
  'x-tau2-floor': (inputs) => between(inputs),
  'x-nu-one': ({ n }) => satterthwaite([2 * n('v'), 2 * n('occ') ** 2].map((variance) => ({ variance, df: n('nu0') }))),
  'x-nu-season': ({ n }) =>
    satterthwaite([2 * n('v'), 2 * n('occ') ** 2, n('season') ** 2].map((variance) => ({ variance, df: n('nu0') }))),
  'x-ctrl': ({ n, list }) => {
    const changes = list('AC').map((after, i) => after - (list('BC')[i] ?? 0));
    const centre = mean(changes);
    const squares = changes.reduce((sum, change) => sum + (change - centre) ** 2 / 2, 0);
    const v = updateVariance({ variance: n('v0'), df: n('nu0') }, squares, changes.length - 1);
    const change = against({ n, list, has: () => true }, v.variance, reliability(n('tau2'), v.variance), n('N'));
    return [change.D, Math.sqrt(change.variance), v.df];
  },
  'x-occ-update': ({ n }) => {
    const squares = Math.max(n('md') ** 2 / 2 - n('v') / n('nc'), 0);
    const updated = updateVariance({ variance: n('occ') ** 2, df: n('nu0') }, squares, 1);
    return [updated.variance, updated.df];
  },
  'x-vd-fall': logVerdict,
  'x-vd-fall-inf': logVerdict,
  'x-vd-fall-beyond': logVerdict,
  'x-vd-zero': verdict,
  'x-vd-edge': ({ n }) =>
    verdictOf(
      { lo: n('lo'), estimate: n('est'), hi: n('hi') },
      { half: n('L'), nearLow: n('P1'), full: n('I'), nearHigh: n('P2'), oneAndAHalf: n('U') },
    ),
  'x-cens-verdict': ({ n }) =>
    verdictOf(
      censoredChange(
        { low: 0, high: n('lod') },
        { low: n('after'), high: n('after') },
        n('s'),
        tQuantile(0.95, n('nu')),
      ),
      additiveZone(n('I')),
      { censored: true },
    ),
  'x-compat': ({ n }) => agreement(n('D'), n('s'), n('I'), n('u') * n('I')),
  'x-baseline-w': ({ n, list }) => {
    const weights = list('v').map(
      (v, i) => 1 / (v + n('occ') ** 2 + (list('season')[i] ?? 0) ** 2 + (0.05 * (list('dt')[i] ?? 0)) ** 2),
    );
    const joined = joinByWeights(list('y'), weights);
    return [joined.value, joined.variance];
  },
};

function phChange(inputs: Inputs, free: number): number {
  return phChangeFromSulfur({
    lb: inputs.n('lb'),
    purity: inputs.n('purity'),
    reacted: inputs.n('reacted'),
    buffering: inputs.n('pHBC'),
    slice: slice(inputs),
    freeLimePercent: free,
  });
}

const between = ({ n }: Inputs): number =>
  betweenPlotVariance({ readingsVariance: n('S2'), readingVariance: n('v'), plots: n('N'), priorSpread: n('tau0') });

/** The same number by another road in R (analysis of variance, linear model): nothing here computes it that way. */
const R_ONLY = ['dup-sd-aov', 'did-se-pooled', 'did-ancova', 't-paired', 'tost-p', 'tost-p-data'];

/** Not computed yet: the share of a nutrient that is found again, the whole-site verdict, the scan of other analytes, and the site's own response per unit. */
const LATER = [
  'eff-p-tristate',
  'x-nu-site',
  'x-s-site',
  'bh',
  'holm',
  'dl-fit',
  'dl-ci',
  'hk-ci',
  'mhk-ci',
  'hk-homog',
  'tau-blend',
  'pool-own',
  'shrink-pred',
  'shared-season',
  'next-amount',
  'attenuation',
  'deming',
];

function expectSame(actual: Answer, expected: unknown, tolerance: number): void {
  if (typeof expected === 'number' && typeof actual === 'number') {
    expect(Math.abs(actual - expected)).toBeLessThanOrEqual(Math.max(tolerance, Number.EPSILON * 8));
    return;
  }
  if (Array.isArray(expected) && Array.isArray(actual)) {
    expect(actual).toHaveLength(expected.length);
    for (const [index, value] of expected.entries()) expectSame(actual[index] ?? null, value, tolerance);
    return;
  }
  expect(actual).toBe(expected);
}

const COUNTS = `${Object.keys(COMPUTED).length} computed here, ${R_ONLY.length} cross-checks in R only, ${LATER.length} not computed yet`;

describe('numbers computed by R', () => {
  it.each(vectors.filter(({ id }) => id in COMPUTED).map((vector) => [vector.id, vector] as const))(
    '%s',
    (id, vector) => {
      const answer = COMPUTED[id]?.(read(vector.inputs));
      expectSame(answer ?? null, vector.expected, vector.tolerance);
    },
  );

  it(`knows every vector: ${COUNTS}`, () => {
    const lists = [...Object.keys(COMPUTED), ...R_ONLY, ...LATER];
    expect(lists.toSorted()).toEqual([...new Set(vectors.map(({ id }) => id))].toSorted());
    expect(vectors).toHaveLength(107);
  });

  it('adds up the plan uncertainties to one half', () => {
    // The five log-sds .10 .04 .12 .40 .25 in quadrature (arithmetic).
    expect(planLogSd()).toBeCloseTo(Math.sqrt(0.01 + 0.0016 + 0.0144 + 0.16 + 0.0625), 12);
  });
});
