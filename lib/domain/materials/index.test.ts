import { describe, expect, it } from 'vitest';
import { ANALYTE_KEYS } from '../analytes';
import { gramsPerM2, inches, kilograms, pounds, squareFeet, squareMetres, toKilograms, toSquareMetres } from '../units';
import { citation, MATERIALS, material, suggestIntendedChange, type Texture } from '.';

const get = (key: string) => {
  const found = material(key);
  if (!found.ok) throw new Error(found.reason);
  return found.material;
};

const ask = (key: string, lbPer1000: number, texture: Texture | null, depth: number | null = 6, freeLime = false) =>
  suggestIntendedChange({
    material: get(key),
    amount: toKilograms(pounds(lbPer1000)),
    area: toSquareMetres(squareFeet(1000)),
    texture,
    depth: depth === null ? null : inches(depth),
    freeLime,
  });

const first = (answer: ReturnType<typeof ask>) => {
  const suggestion = answer.ok ? answer.suggestions[0] : undefined;
  if (suggestion === undefined) throw new Error('No suggestion.');
  return suggestion;
};

describe('the catalogue', () => {
  it('holds the published analyses', () => {
    // Defra RB209: sulfur 80-90 % S, Epsom salt 16 % MgO (9.65 % Mg). Oklahoma State: limestone 20-40 % Ca.
    expect(get('elemental-sulfur-90').analysis.S?.range).toEqual([80, 90]);
    expect(get('epsom-salt').analysis.Mg?.percent).toBeCloseTo(16 * 0.603, 1);
    expect(get('ground-limestone').analysis.Ca?.range).toEqual([20, 40]);
    // RB209 neutralising value 50-55 as CaO, times 1.785: a CCE of 89 to 98.
    expect(get('ground-limestone').analysis.CCE?.range).toEqual([50, 55].map((nv) => Math.round(nv * 1.785)));
    // University of Nebraska-Lincoln: potassium sulfate 0-0-50-18S. Cornell NRCCA: triple superphosphate 46 % P2O5.
    expect(get('potassium-sulfate').analysis.K2O?.percent).toBe(50);
    expect(get('triple-superphosphate').analysis.P2O5?.percent).toBe(46);
  });

  it('has unique keys, known analytes, a source without an address and at least one caution each', () => {
    expect(new Set(MATERIALS.map((entry) => entry.key)).size).toBe(MATERIALS.length);
    for (const entry of MATERIALS) {
      expect(entry.affects.every((key) => ANALYTE_KEYS.includes(key))).toBe(true);
      expect(citation(entry.source)).not.toMatch(/http|www/);
      expect(entry.cautions.length).toBeGreaterThan(0);
    }
    expect(material('moon dust')).toEqual({ ok: false, reason: 'no-such-material' });
  });
});

describe('what an amount is meant to do', () => {
  it('lowers pH one unit with 1 lb of sulfur per 100 sq ft of sandy soil (eXtension)', () => {
    const change = first(ask('elemental-sulfur-90', 10 / 0.9, 'light'));
    expect(change.high).toBeCloseTo(-1, 10);
    expect(change.weakSource).toBe(false);
    expect(first(ask('elemental-sulfur-90', 20 / 0.9, 'heavy')).high).toBeCloseTo(-1, 10);
  });

  it('lowers pH one unit with 135 g/m2 on sand and 270 g/m2 on clay at 15 cm (Royal Horticultural Society)', () => {
    const rhs = (rate: number, texture: Texture) => {
      const area = squareMetres(100);
      const grams = gramsPerM2(rate) * area;
      const answer = suggestIntendedChange({
        material: get('elemental-sulfur-90'),
        amount: kilograms(grams / 1000 / 0.9),
        area,
        texture,
        depth: inches(6),
      });
      return first(answer).low;
    };
    expect(rhs(135, 'light')).toBeCloseTo(-1, 3);
    expect(rhs(270, 'heavy')).toBeCloseTo(-1, 3);
  });

  it('says when a figure has no accountable author', () => {
    const medium = first(ask('elemental-sulfur-90', 10, 'medium'));
    expect(medium.weakSource).toBe(true);
    expect(medium.source).toContain('weak source');
    const lime = first(ask('ground-limestone', 50, 'medium'));
    expect([lime.low, lime.high].map((value) => Number(value.toFixed(3)))).toEqual([0.625, 1]);
    expect(lime.weakSource).toBe(true);
  });

  it('halves the change over twice the depth', () => {
    expect(first(ask('ground-limestone', 50, 'medium', 12)).high).toBeCloseTo(0.5, 10);
  });

  it('raises K by what the build-up figures leave to be found', () => {
    // R vector ppm-k: 5 lb of 0-0-50 at a share of 0.32 gives 16.365 ppm; the share runs from 0.24 to 0.40.
    const k = first(ask('potassium-sulfate', 5, null));
    expect(k.low).toBeCloseTo((16.3654480854658 * 0.24) / 0.32, 6);
    expect(k.high).toBeCloseTo((16.3654480854658 * 0.4) / 0.32, 6);
    expect(k.low).toBeLessThan(k.likely);
  });

  it('refuses with a reason', () => {
    const why = (answer: ReturnType<typeof ask>) => (answer.ok ? 'answered' : answer.reason);
    expect(why(ask('elemental-sulfur-90', 10, null))).toBe('texture-missing');
    expect(why(ask('elemental-sulfur-90', 10, 'light', null))).toBe('depth-missing');
    expect(why(ask('elemental-sulfur-90', 10, 'light', 6, true))).toBe('free-lime');
    expect(why(ask('garden-compost', 500, 'light'))).toBe('no-published-rule');
    expect(why(ask('gypsum', 50, 'light'))).toBe('no-published-rule');
  });
});
