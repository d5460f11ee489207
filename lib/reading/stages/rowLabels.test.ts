import { describe, expect, it } from 'vitest';
import { typedLines } from '@/tests/support/typedPage';
import { isRatingHere, labelText, rowRoleOf, wrappedLabel } from './rowLabels';

/** The label of the first cell of a row, up to the row's first number. */
function labelAt(text: string, row: number) {
  const lines = typedLines(text);
  const cells = lines[row]?.cells ?? [];
  const [cell] = cells;
  const number = cells.find((one) => one.meaning.kind === 'value');
  if (cell === undefined) throw new Error('The text has no such row.');
  return wrappedLabel(lines, row, cell, number?.phrase.x0 ?? cell.phrase.x1);
}

describe('wrappedLabel', () => {
  it('puts a label together from the line above', () => {
    const found = labelAt('Organic\nmatter          3.2\nZinc            1.1', 1);
    expect(found?.label.analyte).toBe('organic_matter');
    expect(found?.lines).toHaveLength(1);
  });
  it('puts a label together from the line below', () => {
    const found = labelAt('Exchangeable    1.2\nacidity\nZinc            1.1', 0);
    expect(found?.label.analyte).toBe('exchangeable_acidity');
    expect(found?.lines).toHaveLength(1);
  });
  it('takes the unit from the second line of a label', () => {
    expect(labelAt('Phosphorus      38\n(ppm)\nZinc            1.1', 0)?.label).toMatchObject({
      analyte: 'phosphorus',
      unit: 'mg/kg',
    });
  });
  it('leaves the rows above and below their own labels', () => {
    const found = labelAt('Calcium         1400\nMagnesium       120\nZinc            1.1', 1);
    expect(found?.label.analyte).toBe('magnesium');
    expect(found?.lines).toEqual([]);
  });
  it('keeps a remark under a label as its tail, never as its name', () => {
    const found = labelAt('Phosphorus      38\nthat crops can use', 0);
    expect([found?.label.text, found?.tail]).toEqual(['Phosphorus', 'that crops can use']);
  });
  it('does not reach over a gap', () => {
    expect(labelAt('Organic\n\nmatter          3.2', 1)).toBeNull();
  });
  it('has no answer for words that name nothing', () => {
    expect(labelAt('Number of beds  12', 0)).toBeNull();
  });
});

describe('labelText', () => {
  it.each([
    ['Soil pH:', 'Soil pH'],
    ['Soil pH ......', 'Soil pH'],
    ['• Zinc', 'Zinc'],
    ['- Zinc =', 'Zinc'],
    ['Olsen-P', 'Olsen-P'],
  ])('"%s" is "%s"', (text, bare) => expect(labelText(text)).toBe(bare));
});

describe('isRatingHere', () => {
  it('knows the rating behind a number from hydrogen with its own', () => {
    const [line] = typedLines('Zinc      1.1  H                 H            2.4');
    if (line === undefined) throw new Error('The text has no line.');
    const at = line.cells.flatMap((cell, index) => (cell.phrase.text === 'H' ? [index] : []));
    expect(at.map((index) => isRatingHere(line, index))).toEqual([true, false]);
    expect(isRatingHere(line, 0)).toBe(false);
  });
  it('knows no rating that follows a name', () => {
    const [line] = typedLines('Zinc      H      2.4');
    expect(line === undefined ? null : isRatingHere(line, 1)).toBe(false);
  });
});

describe('rowRoleOf', () => {
  it.each([
    ['Desired value:', 'desired'],
    ['Value found', 'result'],
    ['Last year', 'previous'],
    ['Units', null],
    ['Calcium', null],
  ])('"%s" is %s', (text, role) => expect(rowRoleOf(text)).toBe(role));
});
