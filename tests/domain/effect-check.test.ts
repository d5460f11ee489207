import { describe, expect, it } from 'vitest';
import { asDay } from '@/lib/domain/days';
import { type ControlPlot, checkEffect, type EffectInput, type TestPoint } from '@/lib/domain/effects';
import { questionablePairs } from '@/lib/domain/effects/learn';
import { asApplicationId, asLaboratoryId, asPlotId } from '@/lib/domain/ids';
import { effectInput, intent, NO_LEARNING, testPoint } from '../support/test-points';

const was = (value: number, more: Partial<TestPoint> = {}) => testPoint('a', '2025-04-10', value, more);
const now = (value: number, more: Partial<TestPoint> = {}) => testPoint('a', '2026-04-14', value, more);

/** Eleven more plots so that twelve readings have the mean 6.9 and the sd 0.30 when the treated one reads 7.5. */
const round = (day: string): TestPoint[] => {
  const others = [6.5, 6.55, 6.6, 6.7, 6.8, 6.85, 6.9, 7.0, 7.05, 7.15, 7.2];
  return others.map((value, index) => testPoint(`p${index}`, day, value));
};

const control = (name: string, from: number, to: number, more: Partial<ControlPlot> = {}): ControlPlot => ({
  plotId: asPlotId(name),
  name,
  tests: [testPoint(name, '2025-04-10', from), testPoint(name, '2026-04-14', to)],
  events: [],
  ...more,
});

const verdictOf = (input: EffectInput) => {
  const outcome = checkEffect(input);
  if (!outcome.ok) throw new Error(`${outcome.reason}: ${outcome.sentence}`);
  return outcome;
};

const refusalOf = (input: EffectInput) => {
  const outcome = checkEffect(input);
  if (outcome.ok) throw new Error(`A verdict: ${outcome.verdict}`);
  return outcome;
};

describe('a plot without untreated plots', () => {
  it('says what the plan meant by the day of the test and how far the change got', () => {
    const outcome = verdictOf(effectInput({ tests: [was(7.5), now(7.0)] }));
    // 15 April to 14 April holds 15 + 184 + 14 = 213 warm days, 7.1 warm months: 0.75 + 1.1/6 of 0.15 = 0.7775.
    expect(outcome.reactedShare).toBeCloseTo(0.7775, 10);
    expect(outcome.intended).toBeCloseTo(-0.8 * 0.7775, 10);
    expect(outcome.reading.D).toBeCloseTo(-0.5, 10);
    expect(outcome.reading.rho).toBe(1);
    expect(outcome.verdict).toBe('right way, size not settled');
    expect(outcome.sentences[0]).toBe(
      'pH fell by 0.50; 0.62 was due by then (0.80 in full). It moved the right way; how far is not settled. Anywhere from 0.17 to 0.83 fits these samples.',
    );
    expect(outcome.sentences.join(' ')).toContain('fewer than three plots');
    expect(outcome.sentences.join(' ')).not.toContain('because of the');
  });

  it('corrects an extreme before value towards the mean of the day', () => {
    const outcome = verdictOf(effectInput({ tests: [was(7.5), now(7.0)], siteTests: round('2025-04-10') }));
    expect(outcome.reading.rho).toBeGreaterThan(0.8);
    expect(outcome.reading.correctedBefore).toBeLessThan(7.5);
    expect(outcome.reading.correction).toBeCloseTo(7.5 - outcome.reading.correctedBefore, 12);
    expect(outcome.reading.D).toBeCloseTo(7.0 - outcome.reading.correctedBefore, 12);
  });

  it('widens the interval for another season and for another laboratory, and says so', () => {
    const plain = verdictOf(effectInput({ tests: [was(7.5), now(7.0)] }));
    const fall = verdictOf(effectInput({ tests: [was(7.5), testPoint('a', '2025-10-20', 7.0)] }));
    const moved = verdictOf(effectInput({ tests: [was(7.5), now(7.0, { laboratoryId: asLaboratoryId('other') })] }));
    // Half-widths of the table of defaults, 15 cores: 0.33, 0.47, 0.55.
    expect(plain.reading.q * plain.reading.s).toBeCloseTo(0.33, 2);
    expect(fall.reading.q * fall.reading.s).toBeCloseTo(0.47, 2);
    expect(moved.reading.q * moved.reading.s).toBeCloseTo(0.55, 2);
    expect(fall.sentences.join(' ')).toContain('another season, so the interval is wider');
    expect(fall.sentences.join(' ')).toContain('10 April 2026');
    expect(moved.sentences.join(' ')).toContain('two laboratories, so the interval is wider');
  });

  it('prefers the after-test of the same season and calls another choice a second look', () => {
    const fall = testPoint('a', '2025-10-20', 7.3);
    const tests = [was(7.5), fall, now(7.0)];
    expect(verdictOf(effectInput({ tests })).after.day).toBe('2026-04-14');
    expect(verdictOf(effectInput({ tests })).secondLook).toBe(false);
    const second = verdictOf(effectInput({ tests, afterTestId: fall.resultId }));
    expect(second.after.day).toBe('2025-10-20');
    expect(second.secondLook).toBe(true);
    expect(second.sentences.join(' ')).toContain('second look');
  });

  it('lets what was really spread scale the intention, and names both', () => {
    const half = intent(-1.6, '2025-04-15', { spreadAmount: 5 });
    const outcome = verdictOf(effectInput({ tests: [was(7.5), now(7.0)], intents: [half] }));
    expect(outcome.planned).toBe(-1.6);
    expect(outcome.intended).toBeCloseTo(-0.8 * 0.7775, 10);
    expect(outcome.sentences.join(' ')).toContain('0.62 was due by then (1.60 in full)');
  });

  it('says what would settle it', () => {
    const outcome = verdictOf(
      effectInput({
        tests: [was(7.5, { cores: 5 }), now(7.3, { cores: 5 })],
        intents: [intent(-0.6, '2025-04-15')],
      }),
    );
    expect(outcome.verdict).toBe('cannot tell yet');
    expect(outcome.settle.length).toBeGreaterThan(0);
    expect(outcome.sentences[1]).toMatch(/^Next time .* would settle it\.$/);
  });
});

describe('with untreated plots', () => {
  const plots = [control('b', 6.9, 6.85), control('c', 7.0, 6.98), control('d', 6.8, 6.82)];
  const siteTests = plots.flatMap((plot) => plot.tests);

  it('compares with them and shows the reading without them beside it', () => {
    const outcome = verdictOf(effectInput({ tests: [was(7.5), now(6.85)], controls: plots, siteTests }));
    expect(outcome.reading.withControls).toBe(true);
    expect(outcome.withoutControls?.withControls).toBe(false);
    expect(outcome.reading.nu).toBe(10);
    expect(outcome.reading.components.map((part) => part.key)).toContain('controls');
    expect(outcome.reading.components.map((part) => part.key)).not.toContain('occasion');
    expect(outcome.sentences[0]).toContain('against the untreated plots');
    expect(outcome.sentences.join(' ')).toContain('untreated plots b, c and d');
  });

  it('reports a plot that could not serve, and why', () => {
    const limed = control('e', 6.9, 7.4, {
      events: [{ day: asDay('2025-06-01'), kind: 'other-application', label: 'Limestone', affects: ['soil_ph_water'] }],
    });
    const away = control('f', 6.9, 6.9);
    const elsewhere = {
      ...away,
      tests: away.tests.map((test) => ({ ...test, laboratoryId: asLaboratoryId('other') })),
    };
    const late: ControlPlot = { ...away, plotId: asPlotId('g'), name: 'g', tests: away.tests.slice(0, 1) };
    const outcome = verdictOf(
      effectInput({ tests: [was(7.5), now(6.85)], controls: [...plots, limed, elsewhere, late], siteTests }),
    );
    const why = Object.fromEntries(outcome.controls.map((use) => [use.name, use.why ?? 'used']));
    expect(why).toEqual({
      b: 'used',
      c: 'used',
      d: 'used',
      e: 'something-happened',
      f: 'other-laboratory',
      g: 'not-sampled-the-same-days',
    });
    expect(outcome.sentences).toContain(
      'Not usable as untreated plots: g (not sampled on the same days); f (sent to another laboratory); e (treated or disturbed in between).',
    );
  });

  it('needs no season or laboratory term when the controls went the same way', () => {
    const other = asLaboratoryId('other');
    const moved = plots.map((plot) => ({
      ...plot,
      tests: plot.tests.map((test, index) =>
        index === 1 ? { ...test, laboratoryId: other, day: asDay('2025-10-20') } : test,
      ),
    }));
    const tests = [was(7.5), testPoint('a', '2025-10-20', 6.85, { laboratoryId: other })];
    const outcome = verdictOf(effectInput({ tests, controls: moved, siteTests }));
    const still = verdictOf(effectInput({ tests: [was(7.5), now(6.85)], controls: plots, siteTests }));
    expect(outcome.reading.s).toBeCloseTo(still.reading.s, 10);
    expect(outcome.withoutControls?.s ?? 0).toBeGreaterThan(outcome.reading.s);
  });
});

describe('refusals', () => {
  const tests = [was(7.5), now(7.0)];
  const cases: readonly [string, EffectInput, string, string][] = [
    [
      'pH in another solution',
      effectInput({ tests: [was(7.5), now(7.0, { method: '1:2_water' })] }),
      'ph-medium',
      'not comparable',
    ],
    [
      'another depth',
      effectInput({ tests: [was(7.5), now(7.0, { depthCm: { from: 0, to: 20.32 } })] }),
      'depth',
      'not comparable',
    ],
    [
      'method missing',
      effectInput({ tests: [was(7.5), now(7.0, { method: null })] }),
      'method-unknown',
      'not comparable',
    ],
    [
      'not confirmed',
      effectInput({ tests: [was(7.5), now(7.0, { confirmed: false })] }),
      'unconfirmed',
      'not comparable',
    ],
    ['not possible', effectInput({ tests: [was(7.5), now(70)] }), 'out-of-range', 'not comparable'],
    [
      'small plan',
      effectInput({ tests, intents: [intent(-0.19, '2025-04-15')] }),
      'plan-too-small',
      'planned change too small to check',
    ],
    [
      'tested too soon',
      effectInput({ tests: [was(7.5), testPoint('a', '2025-06-20', 7.0)] }),
      'too-early',
      'too early',
    ],
    [
      'no test yet',
      effectInput({ today: asDay('2025-08-01'), tests: [was(7.5)] }),
      'no-after-test',
      'waiting for the after-test',
    ],
    ['no earlier test', effectInput({ tests: [now(7.0)] }), 'no-before-test', 'no verdict'],
    ['after two years', effectInput({ today: asDay('2028-01-01'), tests: [was(7.5)] }), 'too-late', 'not comparable'],
    [
      'lime in between',
      effectInput({
        tests,
        events: [
          {
            day: asDay('2025-09-01'),
            kind: 'other-application',
            applicationId: asApplicationId('x'),
            label: 'Limestone',
            affects: ['soil_ph_water'],
          },
        ],
      }),
      'overlap',
      'not comparable',
    ],
    [
      'new soil brought in',
      effectInput({
        tests,
        events: [{ day: asDay('2025-09-01'), kind: 'imported-soil', label: 'Two loads of topsoil' }],
      }),
      'too-late',
      'not comparable',
    ],
    [
      'salts: no figure',
      effectInput({ analyte: 'ec', tests: [was(1, { analyte: 'ec' }), now(2, { analyte: 'ec' })] }),
      'no-noise-figure',
      'no verdict',
    ],
  ];

  it.each(cases)('%s', (_, input, reason, answer) => {
    const outcome = refusalOf(input);
    expect([outcome.reason, outcome.answer]).toEqual([reason, answer]);
    expect(outcome.sentence).toMatch(/^[A-Z].*\.$/);
  });

  it('gives the day from which a test can judge', () => {
    // 15 warm days left in April after the 15th, then May and June: the 90th warm day is 14 July.
    expect(refusalOf(effectInput({ today: asDay('2025-06-01'), tests: [was(7.5)] })).from).toBe('2025-07-14');
  });

  it('allows a missing method when laboratory and test name are the same', () => {
    const same = { method: null, testName: 'pH' };
    expect(checkEffect(effectInput({ tests: [was(7.5, same), now(7.0, same)] })).ok).toBe(true);
  });

  it('judges two products together when asked to', () => {
    const aid = asApplicationId('second');
    const events = [
      {
        day: asDay('2025-05-20'),
        kind: 'other-application' as const,
        applicationId: aid,
        label: 'Sulfur, again',
        affects: ['soil_ph_water' as const],
      },
    ];
    const second = intent(-0.4, '2025-05-20', { applicationId: aid, material: 'Sulfur, again' });
    expect(refusalOf(effectInput({ tests, events })).reason).toBe('overlap');
    const outcome = verdictOf(effectInput({ tests, events, intents: [intent(-0.4, '2025-04-15'), second] }));
    expect(outcome.combined).toBe(true);
    expect(outcome.sentences.join(' ')).toContain('Judged together');
  });
});

describe('concentrations', () => {
  const k = { analyte: 'potassium' as const };
  const salt = (change: number) =>
    intent(change, '2025-04-15', { reaction: 'soluble-salt', material: 'Potassium sulfate' });

  it('judges on logs and shows mg/kg', () => {
    const outcome = verdictOf(effectInput({ ...k, tests: [was(118, k), now(160, k)], intents: [salt(45)] }));
    expect(outcome.reading.scale).toBe('log');
    expect(outcome.reading.D).toBeCloseTo(Math.log(160 / 118), 10);
    expect(outcome.reading.change).toBeCloseTo(42, 10);
    expect(outcome.unit).toBe('mg/kg');
    // Ratio of the table of defaults for K, 15 cores, same season: x 0.71 to x 1.40.
    expect(Math.exp(outcome.reading.q * outcome.reading.s)).toBeCloseTo(1.4, 2);
  });

  it('refuses a plan below a fifth of what was there', () => {
    expect(refusalOf(effectInput({ ...k, tests: [was(118, k), now(160, k)], intents: [salt(20)] })).reason).toBe(
      'plan-too-small',
    );
  });

  it('refuses spring against fall for sulfate, unless untreated plots were sampled with both', () => {
    const s = { analyte: 'sulfur' as const };
    const tests = [was(10, s), testPoint('a', '2025-10-20', 25, s)];
    expect(refusalOf(effectInput({ ...s, tests, intents: [salt(12)] })).reason).toBe('season');
    const plot: ControlPlot = {
      plotId: asPlotId('b'),
      name: 'b',
      tests: [testPoint('b', '2025-04-10', 9, s), testPoint('b', '2025-10-20', 11, s)],
      events: [],
    };
    const outcome = verdictOf(effectInput({ ...s, tests, intents: [salt(12)], controls: [plot] }));
    expect(outcome.reading.withControls).toBe(true);
    expect(outcome.withoutControls).toBeUndefined();
  });

  it('takes a value below the limit as anything up to it, and never calls that "as intended"', () => {
    const b = { analyte: 'boron' as const };
    const tests = [was(0.2, { ...b, qualifier: 'below' }), now(0.9, { ...b, reportingLimit: 0.2 })];
    const outcome = verdictOf(effectInput({ ...b, tests, intents: [salt(0.6)] }));
    expect(outcome.reading.scale).toBe('low-values');
    expect(outcome.reading.change).toBeCloseTo(0.8, 10);
    expect(outcome.verdict).not.toBe('as intended');
    const none = [was(0.2, { ...b, qualifier: 'below' }), now(0.2, { ...b, qualifier: 'below' })];
    expect(refusalOf(effectInput({ ...b, tests: none, intents: [salt(0.6)] })).reason).toBe('both-below-limit');
    const zero = [was(0, b), now(0.9, b)];
    expect(refusalOf(effectInput({ ...b, tests: zero, intents: [salt(0.6)] })).reason).toBe('unknown-limit');
  });

  it('refuses another extractant', () => {
    const p = { analyte: 'phosphorus' as const };
    const tests = [was(40, p), now(80, { ...p, method: 'Olsen' })];
    const outcome = refusalOf(effectInput({ ...p, tests, intents: [salt(40)] }));
    expect(outcome.reason).toBe('extractant');
    expect([outcome.before?.value, outcome.after?.value]).toEqual([40, 80]);
  });
});

describe('what the site teaches', () => {
  it('asks about a duplicate pair more than 3 root-2 sds apart, and keeps it', () => {
    // Laboratory sd 0.06: 3 x 1.414 x 0.06 = 0.2546.
    const pair = (gap: number) => ({ first: was(6.8), second: was(6.8 + gap) });
    const taught = { ...NO_LEARNING, labDuplicates: [pair(0.25), pair(0.26)] };
    expect(questionablePairs('soil_ph_water', taught)).toEqual([taught.labDuplicates[1]]);
    expect(questionablePairs('ec', taught)).toEqual([]);
  });

  it('takes pH without a printed unit as pH', () => {
    const bare = { unit: '', basis: 'index' as const };
    const outcome = verdictOf(effectInput({ tests: [was(7.5, bare), now(7.0)] }));
    expect(outcome.sentences[0]).toMatch(/^pH fell by 0\.50;/);
  });

  it('narrows or widens with its field duplicates, by the update of the R vectors', () => {
    const pairs = (gap: number) =>
      Array.from({ length: 4 }, (_, index) => ({
        first: testPoint(`p${index}`, '2025-04-10', 6.8),
        second: testPoint(`p${index}`, '2025-04-10', 6.8 + gap),
      }));
    const s = (gap: number) =>
      verdictOf(effectInput({ tests: [was(7.5), now(7.0)], noise: { ...NO_LEARNING, fieldDuplicates: pairs(gap) } }))
        .reading.s;
    const plain = verdictOf(effectInput({ tests: [was(7.5), now(7.0)] })).reading.s;
    expect(s(0.02)).toBeLessThan(plain);
    expect(s(0.5)).toBeGreaterThan(plain);
    // v = (8 v0 + 4 x 0.5^2 / 2) / 12 with v0 = 0.25^2/15 + 0.06^2 + 0.06^2; s^2 = 2 v + 2 x 0.08^2.
    const v0 = 0.25 ** 2 / 15 + 2 * 0.06 ** 2;
    expect(s(0.5) ** 2).toBeCloseTo((2 * (8 * v0 + 0.5)) / 12 + 2 * 0.08 ** 2, 12);
  });
});
