import { describe, expect, it } from 'vitest';
import { HIGH, WIDE } from '@/tests/support/typedPage';
import type { Word } from '../types';
import { uprightHeads } from './uprightHeads';

/** A word that runs up (270) or down (90) the page: 10 points wide, from one height to another. */
function strip(text: string, x: number, y0: number, y1: number, direction: 90 | 270 = 270): Word {
  return { text, x0: x / WIDE, x1: (x + 10) / WIDE, y0: y0 / HIGH, y1: y1 / HIGH, size: 10, direction };
}
const heads = (...sideways: Word[]) =>
  uprightHeads({ number: 1, width: WIDE, height: HIGH, turn: 0, words: [], sideways });
const texts = (...sideways: Word[]) => heads(...sideways).map((head) => head.text);

const CALCIUM = strip('Calcium', 180, 58, 100);
const ZINC = strip('Zinc', 220, 76, 100);

describe('uprightHeads', () => {
  it('lays headings down at the height of their lower end', () => {
    const found = heads(strip('Phosphorus', 100, 40, 100), strip('Potassium', 140, 46, 100), CALCIUM);
    expect(found.map((head) => head.text)).toEqual(['Phosphorus', 'Potassium', 'Calcium']);
    for (const [index, x] of [100, 140, 180].entries()) {
      expect(found[index]?.x0).toBeCloseTo(x);
      expect(found[index]?.x1).toBeCloseTo(x + 10);
      expect(found[index]?.y0).toBeCloseTo(90);
      expect(found[index]?.y1).toBeCloseTo(100);
    }
  });
  it('puts words together in the order in which they are read, upwards or downwards', () => {
    expect(texts(strip('pH', 100, 62, 74), strip('Soil', 100, 76, 100), CALCIUM, ZINC)).toContain('Soil pH');
    const down = [strip('pH', 100, 66, 78, 90), strip('Soil', 100, 40, 64, 90)];
    expect(texts(...down, strip('Calcium', 140, 40, 82, 90), strip('Zinc', 180, 40, 64, 90))).toContain('Soil pH');
  });
  it('puts two narrow lines of one heading together, the left one first when it runs upwards', () => {
    const found = texts(strip('Organic', 100, 58, 100), strip('matter', 111, 64, 100), CALCIUM, ZINC);
    expect(found).toEqual(['Organic matter', 'Calcium', 'Zinc']);
  });
  it('leaves captions one under another, notes in the margin and straight words aside', () => {
    expect(heads(strip('Cations', 20, 100, 150), strip('Anions', 20, 300, 340), strip('Traces', 20, 500, 540))).toEqual(
      [],
    );
    expect(heads(strip('Copy for the grower', 20, 100, 220))).toEqual([]);
    expect(
      heads(...[CALCIUM, ZINC, strip('Iron', 260, 76, 100)].map((word) => ({ ...word, direction: 0 as const }))),
    ).toEqual([]);
  });
});
