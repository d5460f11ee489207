import { describe, expect, it } from 'vitest';
import { HIGH, pageOfWords, placedWord, WIDE } from '@/tests/support/typedPage';
import type { Word } from '../types';
import { storedBox, uprightWords } from './words';

const texts = (...words: Word[]) => uprightWords(pageOfWords(words)).words.map((word) => word.text);

describe('uprightWords', () => {
  it('parts a label from its number at the dots between them', () => {
    const [label, number, ...rest] = uprightWords(pageOfWords([placedWord('Zinc......2.1', 100, 50)])).words;
    expect([label?.text, number?.text, rest]).toEqual(['Zinc', '2.1', []]);
    expect(label?.x1).toBeCloseTo(100 + 4 * 6);
    expect(number?.x0).toBeCloseTo(100 + 10 * 6);
  });
  it('drops dots, rules and bars that stand alone, and keeps a dash', () => {
    expect(
      texts(
        ...['.....', '_____', '|', '-----', '=====', '-', '4.2'].map((text, at) => placedWord(text, 100 + 60 * at, 50)),
      ),
    ).toEqual(['-', '4.2']);
  });
  it('sets lowered figures into their word', () => {
    const p2o5 = [
      placedWord('P', 100, 50),
      placedWord('2', 106, 56, 6),
      placedWord('O', 109.6, 50),
      placedWord('5', 115.6, 56, 6),
    ];
    expect(texts(...p2o5)).toEqual(['P2O5']);
  });
  it('keeps the raised power of a unit and drops the mark of a footnote', () => {
    expect(texts(placedWord('mg/dm', 100, 50), placedWord('3', 130, 48, 6))).toEqual(['mg/dm3']);
    expect(texts(placedWord('38', 100, 50), placedWord('a', 112, 48, 6))).toEqual(['38']);
    expect(texts(placedWord('Zinc', 100, 50), placedWord('1', 124, 48, 6))).toEqual(['Zinc']);
  });
  it('keeps a small figure that stands apart', () => {
    expect(texts(placedWord('Zinc', 100, 50), placedWord('3', 160, 52, 6))).toEqual(['Zinc', '3']);
  });
  it('joins the pieces of a cut word, and not two words', () => {
    expect(texts(placedWord('Phos', 100, 50), placedWord('phorus', 124, 50))).toEqual(['Phosphorus']);
    expect(texts(placedWord('Soil', 100, 50), placedWord('pH', 127, 50))).toEqual(['Soil', 'pH']);
  });
  it('drops a word printed twice in one place', () => {
    expect(texts(placedWord('Zinc', 100, 50), placedWord('Zinc', 100.2, 50.2))).toEqual(['Zinc']);
  });
  it('sets words that run another way aside', () => {
    const page = uprightWords(pageOfWords([placedWord('Potassium', 100, 50), placedWord('Draft', 300, 400, 30, 270)]));
    expect([page.turn, page.words.length, page.sideways.map((word) => word.text)]).toEqual([0, 1, ['Draft']]);
  });
});

describe('a turned page', () => {
  /** "Soil pH 6.4" as a person reads it, stored on a page turned by a quarter, a half or three quarters. */
  const STORED: readonly { turn: 90 | 180 | 270; boxes: readonly (readonly [number, number, number, number])[] }[] = [
    {
      turn: 90,
      boxes: [
        [800, 40, 810, 70],
        [800, 80, 810, 95],
      ],
    },
    {
      turn: 180,
      boxes: [
        [820, 700, 850, 710],
        [790, 700, 805, 710],
      ],
    },
    {
      turn: 270,
      boxes: [
        [60, 700, 70, 730],
        [60, 670, 70, 685],
      ],
    },
  ];
  it.each(STORED)('of $turn degrees is read from left to right', ({ turn, boxes }) => {
    const words = boxes.map(
      ([x0, y0, x1, y1], at): Word => ({
        text: at === 0 ? 'Potassium' : '210',
        x0: x0 / WIDE,
        y0: y0 / HIGH,
        x1: x1 / WIDE,
        y1: y1 / HIGH,
        size: 10,
        direction: turn,
      }),
    );
    const page = uprightWords(pageOfWords(words));
    const [name, number] = [...page.words].sort((a, b) => a.x0 - b.x0);
    expect([page.turn, name?.text, number?.text]).toEqual([turn, 'Potassium', '210']);
    expect(name?.y0).toBeCloseTo(number?.y0 ?? -1);
    // The place on the page as stored is given back as it was.
    for (const [at, word] of [name, number].entries()) {
      const [x0, y0, x1, y1] = word === undefined ? [] : storedBox(page, word);
      const [a, b, c, d] = boxes[at] ?? [0, 0, 0, 0];
      expect(x0).toBeCloseTo(a / WIDE, 4);
      expect(y0).toBeCloseTo(b / HIGH, 4);
      expect(x1).toBeCloseTo(c / WIDE, 4);
      expect(y1).toBeCloseTo(d / HIGH, 4);
    }
  });
});

describe('storedBox', () => {
  it('never leaves the page', () => {
    const page = uprightWords(pageOfWords([placedWord('Zinc', 100, 50)]));
    expect(storedBox(page, { x0: -20, y0: -1, x1: 2 * WIDE, y1: HIGH + 5 })).toEqual([0, 0, 1, 1]);
  });
});
