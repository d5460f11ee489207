import { describe, expect, it } from 'vitest';
import type { Merged } from './types';
import { wholeWords, withoutTypedRules } from './whole';

function word(text: string, x0: number, x1: number, more: Partial<Merged> = {}): Merged {
  return { text, x0, x1, y0: 100, y1: 130, certainty: 0.9, support: 1, others: [], of: 2, point: 'unknown', ...more };
}

describe('words that a look cut or saw twice', () => {
  it('puts a number cut at its point together, with the lesser support', () => {
    const whole = wholeWords([word('6', 0, 20, { support: 2 }), word('.6', 24, 50)]);
    expect(whole.map(({ text, x0, x1, support }) => ({ text, x0, x1, support }))).toEqual([
      { text: '6.6', x0: 0, x1: 50, support: 1 },
    ]);
  });
  it('leaves a number and a point far apart, or on two lines, as they are', () => {
    expect(wholeWords([word('6', 0, 20), word('.6', 60, 90)])).toHaveLength(2);
    expect(wholeWords([word('6', 0, 20), word('.6', 24, 50, { y0: 140, y1: 170 })])).toHaveLength(2);
  });
  it('drops the parts of a number that another look saw whole', () => {
    const whole = wholeWords([word('4.3', 0, 60), word('4', 1, 20), word('.3', 30, 59)]);
    expect(whole.map(({ text }) => text)).toEqual(['4.3']);
  });
  it('keeps a part that two looks saw', () => {
    expect(wholeWords([word('4.3', 0, 60), word('4', 1, 20, { support: 2 })])).toHaveLength(2);
  });
  it('drops the scraps of a typed rule, and keeps doubtful cells of a row that was read', () => {
    const scraps = Array.from({ length: 7 }, (_, at) => word('3', at * 80, at * 80 + 20, { certainty: 0.5 }));
    const below = { y0: 160, y1: 190 };
    const row = Array.from({ length: 7 }, (_, at) => word('41', at * 80, at * 80 + 30, { ...below, support: 2 }));
    const doubtful = word('7', 600, 620, { ...below, certainty: 0.5 });
    expect(withoutTypedRules([...scraps, ...row, doubtful], 30)).toEqual([...row, doubtful]);
  });
});
