import { describe, expect, it } from 'vitest';
import { linesOfPage, pageOfWords, placedWord } from '@/tests/support/typedPage';
import type { Word } from '../types';
import { cardRows } from './cards';

function cards(words: readonly Word[]) {
  return cardRows(linesOfPage(pageOfWords(words)), new Set()).map(({ candidate: one }) => ({
    analyte: one.label.analyte,
    printed: one.value.printed,
    unit: one.unit,
    rating: one.rating,
    doubts: one.doubts.map((doubt) => doubt.code),
  }));
}
const found = (words: readonly Word[]) => cards(words).map((card) => `${card.analyte} ${card.printed}`);

describe('cardRows', () => {
  it('takes the large number over a name, with the unit and rating under it', () => {
    const words = [
      placedWord('38', 100, 100, 24),
      placedWord('Phosphorus', 90, 130),
      placedWord('ppm', 100, 142),
      placedWord('210', 400, 100, 24),
      placedWord('Potassium', 395, 130),
      placedWord('High', 410, 142),
    ];
    const doubts = ['number-apart'];
    expect(cards(words)).toEqual([
      { analyte: 'phosphorus', printed: '38', unit: 'mg/kg', rating: null, doubts },
      { analyte: 'potassium', printed: '210', unit: null, rating: 'High', doubts },
    ]);
  });
  it('takes the number set larger than the figures of its scale', () => {
    const scale = ['4', '5', '7', '8'].map((figure, index) => placedWord(figure, 200 + 60 * index, 106, 8));
    expect(found([placedWord('Zinc', 40, 100), ...scale, placedWord('6.4', 330, 96, 18)])).toEqual(['zinc 6.4']);
  });
  it('takes nothing where no figure stands out', () => {
    const scale = ['4', '5', '7', '8'].map((figure, index) => placedWord(figure, 200 + 60 * index, 100));
    expect(found([placedWord('Zinc', 40, 100), ...scale])).toEqual([]);
  });
  it('leaves a number alone that another name stands before', () => {
    const words = [
      placedWord('6.4', 100, 100, 24),
      placedWord('Zinc', 108, 130),
      placedWord('Boron', 108, 160),
      placedWord('Copper', 600, 500),
    ];
    expect(found(words)).toEqual(['zinc 6.4']);
  });
  it('takes nothing from lines that were read before', () => {
    const lines = linesOfPage(pageOfWords([placedWord('38', 100, 100, 24), placedWord('Phosphorus', 90, 130)]));
    expect(cardRows(lines, new Set(lines))).toEqual([]);
  });
});
