import { describe, expect, it } from 'vitest';
import { driftFinding } from './finding';
import { boron, boronBand, boronHistory, ph, phBand, phBroken, phHistory } from './sample-data';

const say = (points: typeof phHistory, band: typeof phBand | null = phBand) =>
  driftFinding({ analyte: ph, points, band });

describe('driftFinding', () => {
  it('says that there is no test', () => {
    expect(say([])).toBe('No confirmed pH test yet. The first one puts a dot here.');
  });

  it('claims no movement from one test', () => {
    expect(say(phHistory.slice(0, 1))).toBe(
      'One test: pH 7.4 on 12 Apr 2022, above the target band. A second one, taken the same way, gives a difference.',
    );
  });

  it('claims no trend from two or three', () => {
    expect(say(phHistory.slice(0, 2))).toContain('Two tests: pH went from 7.4 on 12 Apr 2022 to 7.3 on 9 Apr 2023');
    expect(say(phHistory.slice(0, 2))).toContain('Fewer than four tests show no trend.');
    expect(say(phHistory.slice(0, 3))).toMatch(/^Three tests: .*Fewer than four tests show no trend\.$/);
  });

  it('states from, to and the band with four or more', () => {
    expect(say(phHistory)).toBe(
      '5 tests: pH went from 7.4 on 12 Apr 2022 to 6.6 on 14 Apr 2026, inside the target band.',
    );
  });

  it('sets nothing against a test across a break', () => {
    const text = say(phBroken);
    expect(text).toContain('since the last break (methods differ)');
    expect(text).toContain('from 6.3 on 11 Apr 2025 to 6.1 on 14 Apr 2026');
    expect(text).not.toContain('7.4');
  });

  it('keeps a limit a limit, and places it only where that is certain', () => {
    const one = driftFinding({ analyte: boron, points: boronHistory.slice(0, 1), band: boronBand });
    expect(one).toContain('Boron < 0.1 ppm on 9 Apr 2023, below the target band');
    const wide = { ...boronBand, low: 0.05 };
    expect(driftFinding({ analyte: boron, points: boronHistory.slice(0, 1), band: wide })).not.toContain('target band');
  });

  it('says nothing of the band for a result without any limit', () => {
    const [first] = boronHistory;
    if (first === undefined) throw new Error('no sample');
    const unknown = { ...first, value: 0, printed: 'not detected', qualifier: 'below-unknown' } as const;
    const text = driftFinding({ analyte: boron, points: [unknown], band: boronBand });
    expect(text).toContain('not detected');
    expect(text).not.toContain('target band');
  });

  it('does without a band', () => {
    expect(say(phHistory, null)).not.toContain('band');
  });
});
