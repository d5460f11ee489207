import { describe, expect, it } from 'vitest';
import { asDay } from '@/lib/domain/days';
import {
  type ControlPlot,
  checkEffect,
  type EffectInput,
  type SiteNoise,
  type TestPoint,
  VERDICTS,
} from '@/lib/domain/effects';
import { asLaboratoryId, asPlotId } from '@/lib/domain/ids';
import { hasR, rCall, runR } from '../support/effect-check';
import { effectInput, intent, NO_LEARNING, testPoint } from '../support/test-points';

/** Same inputs, two programs: lib/domain/effects and fixtures/tables/effect-check.R run by R. Skipped where R is missing. */
const CASES = 240;

/** A fixed sequence (Park and Miller 1988), so that a failure repeats. */
function sequence(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 16_807) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}

function inputFrom(random: () => number): EffectInput {
  const log = random() < 0.4;
  const key = log ? ('potassium' as const) : ('soil_ph_water' as const);
  const between = (low: number, high: number): number => low + random() * (high - low);
  const near = (value: number): number => (log ? value * Math.exp(between(-0.25, 0.25)) : value + between(-0.25, 0.25));
  const level = log ? 130 : 6.9;
  const effect = log ? between(-40, 120) : between(-1.3, 0.5);
  const plan = log ? (random() < 0.8 ? between(40, 110) : -between(50, 80)) : -between(0.3, 1.2);
  const otherLab = random() < 0.2;
  const lab = asLaboratoryId(otherLab ? 'laboratory-2' : 'laboratory-1');
  const pick = <T>(items: readonly T[]): T => items[Math.floor(random() * items.length)] ?? (items[0] as T);
  const design = (): Partial<TestPoint> => ({
    analyte: key,
    cores: pick([5, 8, 12, 15, 20]),
    labDuplicates: pick([1, 1, 2]),
    composites: pick([1, 1, 2]),
    printedStep: pick([null, log ? 1 : 0.1]),
  });
  const firstDay = '2025-04-10';
  const lastDay = pick(['2026-04-14', '2026-03-20', '2025-10-20']);
  const start = near(level) + (log ? 0 : 0.4);
  const tests = [
    testPoint('a', firstDay, start, design()),
    testPoint('a', lastDay, start + effect, { ...design(), laboratoryId: lab }),
  ];
  if (random() < 0.4) tests.push(testPoint('a', '2024-04-20', near(start), design()));
  if (random() < 0.3) tests.push(testPoint('a', '2024-10-25', near(start), design()));
  const controls: ControlPlot[] = Array.from({ length: pick([0, 0, 1, 2, 3]) }, (_, index) => {
    const name = `control-${index}`;
    const value = near(level);
    return {
      plotId: asPlotId(name),
      name,
      events: [],
      tests: [
        testPoint(name, firstDay, value, design()),
        testPoint(name, lastDay, near(value), { ...design(), laboratoryId: lab }),
      ],
    };
  });
  const others = Array.from({ length: pick([0, 1, 4, 9]) }, (_, index) =>
    testPoint(`plot-${index}`, firstDay, near(level), design()),
  );
  const pair = (gap: number) => ({
    first: testPoint('x', firstDay, level, design()),
    second: testPoint('x', firstDay, level * (1 + gap), design()),
  });
  const step = (from: string, to: string) => ({
    pairs: Array.from({ length: 3 }, (_, index) => ({
      before: testPoint(`u${index}`, from, near(level), design()),
      after: testPoint(`u${index}`, to, near(level), design()),
    })),
  });
  const noise: SiteNoise = {
    labDuplicates: random() < 0.4 ? [pair(0.01), pair(0.015)] : [],
    fieldDuplicates: random() < 0.4 ? [pair(0.02), pair(-0.03), pair(0.01)] : [],
    untreatedSteps: random() < 0.4 ? [step('2023-04-12', '2024-04-15'), step('2023-04-12', '2023-10-15')] : [],
  };
  return effectInput({
    analyte: key,
    today: asDay('2026-12-01'),
    tests,
    controls,
    siteTests: [...tests, ...controls.flatMap((plot) => plot.tests), ...others],
    noise: random() < 0.2 ? NO_LEARNING : noise,
    intents: [intent(plan, '2025-04-15', { reaction: log ? 'soluble-salt' : 'sulfur', spreadAmount: between(7, 11) })],
  });
}

describe.skipIf(!hasR())('the same inputs in R', () => {
  it(`gives the same verdict, estimate, error and degrees of freedom in ${CASES} made-up cases`, () => {
    const random = sequence(20_261_201);
    const pairs = [];
    while (pairs.length < CASES) {
      const input = inputFrom(random);
      const outcome = checkEffect(input);
      if (outcome.ok) pairs.push({ outcome, call: rCall(input, outcome) });
    }
    const answers = runR(pairs.map(({ call }) => call));
    const seen = new Set<string>();
    let compared = 0;
    for (const [index, { outcome }] of pairs.entries()) {
      const r = answers[index];
      const { reading } = outcome;
      seen.add(reading.verdict);
      if (reading.withControls) compared += 1;
      expect(r?.verdict, `case ${index}`).toBe(reading.verdict);
      for (const key of ['D', 's', 'nu', 'lo', 'hi', 'rho'] as const) {
        expect(Math.abs((r?.[key] ?? Number.NaN) - reading[key]), `case ${index}, ${key}`).toBeLessThan(1e-7);
      }
    }
    // Guards against a generator that tests one corner only.
    expect(compared).toBeGreaterThan(CASES / 4);
    expect([...seen].toSorted()).toEqual([...VERDICTS].toSorted());
  }, 60_000);
});
