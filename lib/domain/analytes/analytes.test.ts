import { describe, expect, it } from 'vitest';
import { ANALYTE_GROUPS, ANALYTE_KEYS, ANALYTES, analyte, isAnalyteKey, isUnitKey, METHODS, UNITS } from './index';

describe('analyte registry', () => {
  it('has every key once, in a known group, with spellings and methods', () => {
    expect(new Set(ANALYTE_KEYS).size).toBe(ANALYTE_KEYS.length);
    const groups = new Set(ANALYTE_GROUPS.map((group) => group.key));
    for (const entry of ANALYTES) {
      expect(groups.has(entry.group)).toBe(true);
      expect(isUnitKey(entry.unit)).toBe(true);
      expect(entry.spellings.length).toBeGreaterThan(0);
      expect(entry.methods.length).toBeGreaterThan(0);
    }
  });
  it('keeps the groups together, in the order of the group list', () => {
    const order = ANALYTES.map((entry) => ANALYTE_GROUPS.findIndex((group) => group.key === entry.group));
    expect([...order].sort((a, b) => a - b)).toEqual(order);
  });
  it('knows the range of pH and refuses a key it does not know', () => {
    expect(analyte('soil_ph_water').plausible).toEqual([3, 10.5]);
    expect(isAnalyteKey('toString')).toBe(false);
  });
  it('gives each unit spelling to one unit only', () => {
    const seen = new Map<string, string>();
    for (const unit of UNITS) {
      for (const spelling of unit.spellings) {
        expect(seen.get(spelling) ?? unit.key).toBe(unit.key);
        seen.set(spelling, unit.key);
      }
    }
  });
  it('lists each method once with its analytes', () => {
    const mehlich = METHODS.filter((method) => method.key === 'M3');
    expect(mehlich).toHaveLength(1);
    expect(mehlich[0]?.analytes).toContain('potassium');
  });
});
