import { describe, expect, it } from 'vitest';
import { compareTests } from '@/lib/domain/effects';
import type { CompareAnswer } from '@/lib/schemas/effects';
import { NO_LEARNING, testPoint } from '@/tests/support/test-points';
import { compareProps, printedValue, refusalProps } from './compare-props';

function answer(
  a: ReturnType<typeof testPoint>,
  b: ReturnType<typeof testPoint>,
  label = 'Soil pH (in water)',
): CompareAnswer {
  const side = (test: typeof a) => ({
    resultId: test.resultId as string,
    plotId: test.plotId as string,
    plotName: test.plotId === 'top' ? 'Top bed' : 'Wall bed',
    takenOn: test.day as string,
    value: test.value,
    unit: test.unit,
    qualifier: test.qualifier,
    method: test.method,
    laboratory: 'Millbrook Soil Office',
    low: null,
    high: null,
  });
  return {
    analyte: a.analyte,
    analyteLabel: label,
    decimals: a.unit === 'pH' ? 1 : 0,
    a: side(a),
    b: side(b),
    outcome: compareTests({ a, b, noise: NO_LEARNING }),
  };
}

describe('compareProps', () => {
  it('draws the second less the first, and names what made the interval wider', () => {
    const strip = compareProps(
      answer(testPoint('top', '2025-10-05', 7.1), testPoint('top', '2026-04-11', 6.8)),
      'north',
    );
    if (strip?.outcome.kind !== 'difference') throw new Error('these can be compared');
    expect(strip.outcome.difference.estimate).toBeCloseTo(-0.3, 10);
    expect(strip.outcome.widenedBy).toEqual(['another season']);
    expect([strip.earlier.label, strip.later.label]).toEqual(['Fall 2025', 'Spring 2026']);
    expect(strip.analyte).toMatchObject({ label: 'pH in water', unit: '', isPh: true });
    expect(strip.zeroWord).toBe('no change');
  });

  it('names the plots where there are two, whose difference is no change', () => {
    const strip = compareProps(
      answer(testPoint('top', '2026-04-11', 7.1), testPoint('wall', '2026-04-11', 6.8)),
      'north',
    );
    expect([strip?.earlier.label, strip?.later.label, strip?.zeroWord]).toEqual([
      'Top bed',
      'Wall bed',
      'no difference',
    ]);
  });
});

describe('refusalProps', () => {
  it('shows both values with their methods, why, and what would help', () => {
    const mehlich = testPoint('top', '2025-04-12', 62, { analyte: 'phosphorus' });
    const bray = testPoint('top', '2026-04-11', 41, { analyte: 'phosphorus', method: 'bray_p1' });
    const asked = answer(mehlich, bray, 'Phosphorus');
    expect(compareProps(asked, 'north')).toBeNull();
    const box = refusalProps(asked);
    expect(box?.refusal).toBe('not comparable');
    expect(box?.values?.map((value) => [value.label, value.printed])).toEqual([
      ['Top bed, 12 Apr 2025', '62 mg/kg'],
      ['Top bed, 11 Apr 2026', '41 mg/kg'],
    ]);
    expect(box?.values?.[1]?.note).toContain('bray_p1');
    expect(box?.help).toContain('the same method');
  });
});

describe('printedValue', () => {
  it('never turns a limit into a number', () => {
    expect(printedValue({ value: 0.1, qualifier: 'below' }, 1)).toBe('< 0.1');
    expect(printedValue({ value: 14, qualifier: 'above' }, 0)).toBe('> 14');
    expect(printedValue({ value: 0, qualifier: 'below-unknown' }, 1)).toBe('none found');
  });
});
