import { describe, expect, it } from 'vitest';
import { sourceOfSet, TARGET_SETS, targetSet } from '.';

const ph = (key: string) => {
  const found = targetSet(key);
  return found.ok ? found.set.bands.find((band) => band.analyte === 'soil_ph_water') : undefined;
};

describe('built-in target sets', () => {
  it('prints what North Carolina gives for most vegetables: 6.0 to 6.5', () => {
    // N.C. Department of Agriculture & Consumer Services, Soil Testing: Understand Your Report - Homeowners, plant types.
    expect([ph('vegetables-1')?.low, ph('vegetables-1')?.high]).toEqual([6.0, 6.5]);
  });

  it('prints what UMass Extension gives for pumpkin and squash: 6.0 to 6.8', () => {
    // UMass Extension, Pumpkins and Squash - growing tips, Lime and Fertilizing.
    expect([ph('pumpkin-and-squash-1')?.low, ph('pumpkin-and-squash-1')?.high]).toEqual([6.0, 6.8]);
  });

  it('names a published source for every band and says what is missing', () => {
    for (const set of TARGET_SETS) {
      expect(set.bands.every((band) => band.source.status === 'published')).toBe(true);
      expect(sourceOfSet(set)).not.toContain('http');
      expect(set.gaps.length).toBeGreaterThan(0);
    }
    expect(new Set(TARGET_SETS.map((set) => set.key)).size).toBe(TARGET_SETS.length);
    expect(targetSet('onions')).toEqual({ ok: false, reason: 'no-such-set' });
  });
});
