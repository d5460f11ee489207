import { describe, expect, it } from 'vitest';
import { makeReviewPlot } from '@/tests/support/review-rows';
import { shownDepth, typedDepth } from './depth-units';
import { plotOptions } from './plot-options';

describe('depth', () => {
  // 1 inch is 2.54 cm by definition (international yard and pound agreement, 1959).
  it('turns inches and centimetres both ways', () => {
    expect(shownDepth('15.24', 'in')).toBe('6');
    expect(shownDepth('15.24', 'cm')).toBe('15.24');
    expect(typedDepth('6', 'in')).toEqual({ ok: true, cm: 15.24 });
    expect(typedDepth('15,5 cm', 'cm')).toEqual({ ok: true, cm: 15.5 });
    expect(typedDepth('', 'in')).toEqual({ ok: true, cm: null });
    expect(typedDepth('deep', 'in')).toEqual({ ok: false });
  });
});

describe('plotOptions', () => {
  it('begins with the plot the file was dropped on, then the newest test', () => {
    const tested = (id: string, takenOn: string) => makeReviewPlot(id, id, { lastTest: { takenOn, ph: null } });
    const plots = [
      makeReviewPlot('b2', 'b2'),
      makeReviewPlot('b10', 'b10'),
      tested('old', '2024-04-01'),
      tested('new', '2026-04-01'),
    ];
    expect(plotOptions(plots, 'old').map((one) => one.value)).toEqual(['old', 'new', 'b2', 'b10']);
  });
});
