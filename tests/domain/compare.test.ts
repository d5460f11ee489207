import { describe, expect, it } from 'vitest';
import type { AnalyteKey } from '@/lib/domain/analytes';
import { type CompareOutcome, compareTests, type TestPoint } from '@/lib/domain/effects';
import { asLaboratoryId } from '@/lib/domain/ids';
import { NO_LEARNING, testPoint } from '../support/test-points';

const compare = (a: Parameters<typeof testPoint>, b: Parameters<typeof testPoint>): CompareOutcome =>
  compareTests({ a: testPoint(...a), b: testPoint(...b), noise: NO_LEARNING });

const answered = (outcome: CompareOutcome) => {
  if (!outcome.ok) throw new Error(outcome.reason);
  return outcome;
};

describe('two tests side by side', () => {
  it('has the half-widths of the table of defaults: 0.33, 0.47 in another season, 0.55 from another laboratory', () => {
    const half = (outcome: CompareOutcome): number => (answered(outcome).hi - answered(outcome).lo) / 2;
    const spring = compare(['a', '2025-04-10', 6.8], ['a', '2026-04-14', 6.9]);
    const fall = compare(['a', '2025-10-10', 6.8], ['a', '2026-04-14', 6.9]);
    const moved = compare(
      ['a', '2025-04-10', 6.8],
      ['a', '2026-04-14', 6.9, { laboratoryId: asLaboratoryId('other') }],
    );
    expect([spring, fall, moved].map((outcome) => Number(half(outcome).toFixed(2)))).toEqual([0.33, 0.47, 0.55]);
    expect(answered(fall).widenedBy).toEqual(['season']);
    expect(answered(moved).widenedBy).toEqual(['laboratory']);
    expect(answered(fall).sentence).toContain('another season');
    expect(answered(spring).moreThanNoise).toBe(false);
    expect(answered(spring).sentence).toBe(
      'pH is 0.10 higher on 14 April 2026 than on 10 April 2025 (between a fall of 0.23 and a rise of 0.43). That is within what two tests of the same soil differ by.',
    );
  });

  it('sees a difference that is more than noise', () => {
    const outcome = answered(compare(['a', '2025-04-10', 7.4], ['a', '2026-04-14', 6.8]));
    expect(outcome.moreThanNoise).toBe(true);
    expect(outcome.sentence).toContain('0.60 lower');
    expect(outcome.sentence).toContain('more than noise');
  });

  it('leaves out what two plots of one day share', () => {
    const sameDay = answered(compare(['a', '2026-04-14', 6.8], ['b', '2026-04-14', 6.9]));
    // Only both readings' own errors: 2 (0.25^2/15 + 2 x 0.06^2).
    expect(sameDay.s ** 2).toBeCloseTo(2 * (0.25 ** 2 / 15 + 2 * 0.06 ** 2), 12);
    expect(sameDay.nu).toBeCloseTo(8, 10);
    expect(sameDay.sentence).toMatch(/^The second plot reads/);
  });

  it('gives the ratio of concentrations: P, 15 cores, times 0.67 to 1.49', () => {
    const p = { analyte: 'phosphorus' as const };
    const outcome = answered(compare(['a', '2025-04-10', 40, p], ['a', '2026-04-14', 40, p]));
    expect(outcome.ratio?.estimate).toBe(1);
    expect(outcome.ratio?.lo).toBeCloseTo(0.67, 2);
    expect(outcome.ratio?.hi).toBeCloseTo(1.49, 2);
    expect(outcome.hi).toBeCloseTo(40 * ((outcome.ratio?.hi ?? 0) - 1), 10);
  });

  it('shows both values and why where they must not be compared', () => {
    const p = { analyte: 'phosphorus' as const };
    const cases: readonly [CompareOutcome, string][] = [
      [compare(['a', '2025-04-10', 40, p], ['a', '2026-04-14', 60, { ...p, method: 'Bray1' }]), 'extractant'],
      [compare(['a', '2025-04-10', 6.8], ['a', '2026-04-14', 6.2, { analyte: 'soil_ph_salt' }]), 'ph-medium'],
      [
        compare(['a', '2025-04-10', 40, p], ['a', '2026-04-14', 60, { ...p, basis: 'volume', unit: 'mg/L' }]),
        'unit-basis',
      ],
      [compare(['a', '2025-04-10', 40, p], ['a', '2026-04-14', 60, { ...p, form: 'P2O5' }]), 'unit-basis'],
      [compare(['a', '2025-04-10', 6.8], ['a', '2026-04-14', 6.9, { depthCm: { from: 0, to: 20 } }]), 'depth'],
      [
        compare(['a', '2025-04-10', 1, { analyte: 'ec' }], ['a', '2026-04-14', 2, { analyte: 'ec' }]),
        'no-noise-figure',
      ],
      [
        compare(['a', '2025-04-10', 10, { analyte: 'sulfur' }], ['a', '2025-10-14', 20, { analyte: 'sulfur' }]),
        'season',
      ],
      [
        compare(
          ['a', '2025-04-10', 3, { analyte: 'organic_matter', method: 'LOI' }],
          ['a', '2026-04-14', 4, { analyte: 'organic_matter', method: 'Walkley_Black' }],
        ),
        'om-method',
      ],
      [
        compare(
          ['a', '2025-04-10', 8, { analyte: 'cec', method: 'summation' }],
          ['a', '2026-04-14', 9, { analyte: 'cec', method: 'NH4OAc_pH7' }],
        ),
        'cec-method',
      ],
    ];
    for (const [outcome, reason] of cases) {
      if (outcome.ok) throw new Error(`${reason} was compared`);
      expect(outcome.reason).toBe(reason);
      expect([outcome.a.value, outcome.b.value].every(Number.isFinite)).toBe(true);
      expect(outcome.sentence).toMatch(/\.$/);
    }
  });

  it('lets depths differ by an inch but not by more, nor by more than a fifth', () => {
    const depth = (to: number) =>
      compare(['a', '2025-04-10', 6.8], ['a', '2026-04-14', 6.9, { depthCm: { from: 0, to } }]).ok;
    expect([depth(15.24 + 2.54), depth(15.24 + 2.6), depth(12.7), depth(12.6)]).toEqual([true, false, true, false]);
    const shallow = (to: number) =>
      compare(
        ['a', '2025-04-10', 6.8, { depthCm: { from: 0, to: 5 } }],
        ['a', '2026-04-14', 6.9, { depthCm: { from: 0, to } }],
      ).ok;
    expect([shallow(6.2), shallow(6.5)]).toEqual([true, false]);
  });

  it('keeps the default noise of every class: 90 % reach of a change of 15 cores, plain, other season, other laboratory', () => {
    // Worked out in R from the defaults (qt at the Satterthwaite degrees of freedom); pH in units, the rest as a ratio.
    const table: readonly (readonly [AnalyteKey, number, number | null, number])[] = [
      ['soil_ph_water', 0.33, 0.47, 0.55],
      ['soil_ph_salt', 0.27, 0.32, 0.44],
      ['phosphorus', 1.49, 1.55, 1.78],
      ['potassium', 1.4, 1.52, 1.66],
      ['calcium', 1.29, 1.32, 1.43],
      ['organic_matter', 1.22, 1.24, 1.61],
      ['zinc', 1.56, 1.65, 2.7],
      ['nitrate_n', 2.13, null, 2.59],
    ];
    const other = asLaboratoryId('other');
    for (const [analyte, plain, season, laboratory] of table) {
      const reach = (a: string, more: Partial<TestPoint> = {}): number => {
        const outcome = answered(compare(['a', a, 6, { analyte }], ['a', '2026-04-14', 6, { analyte, ...more }]));
        return outcome.ratio?.hi ?? outcome.hi;
      };
      expect(reach('2025-04-10'), analyte).toBeCloseTo(plain, 2);
      expect(reach('2025-04-10', { laboratoryId: other }), analyte).toBeCloseTo(laboratory, 2);
      if (season !== null) expect(reach('2025-10-10'), analyte).toBeCloseTo(season, 2);
    }
  });
});
