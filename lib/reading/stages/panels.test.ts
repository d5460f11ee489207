import { describe, expect, it } from 'vitest';
import { LEADING, linesOfPage, MARGIN, STEP, typedPage } from '@/tests/support/typedPage';
import { edgesOf } from './panels';

function edges(text: string) {
  const lines = linesOfPage(typedPage(text));
  const page = lines[0]?.line.page;
  return page === undefined ? [] : edgesOf(page, lines);
}
const left = (column: number) => MARGIN + column * STEP;
const top = (row: number) => MARGIN + row * LEADING;

const LISTS = `
Soil pH        6.4          Zinc          2.1
Phosphorus     38           Manganese     14
Potassium      210          Copper        1.2
Calcium        1400         Boron         0.6`;

describe('edgesOf', () => {
  it('stands between two lists, over the whole of their height', () => {
    const found = edges(LISTS);
    expect(found).toHaveLength(1);
    expect(found[0]?.x).toBeGreaterThan(left(19));
    expect(found[0]?.x).toBeLessThan(left(28));
    expect(found[0]?.y0).toBeLessThanOrEqual(top(0));
    expect(found[0]?.y1).toBeGreaterThanOrEqual(top(3) + 10);
  });
  it('ends where a sentence lies across it', () => {
    const [edge] = edges(`${LISTS}\nThe numbers of this page are those of the laboratory named above.`);
    expect(edge?.y1).toBeGreaterThanOrEqual(top(3) + 10);
    expect(edge?.y1).toBeLessThanOrEqual(top(4));
  });
  it('stands between two sets of the same headings', () => {
    const found = edges(`
pH      O.M.     CEC        pH      O.M.     CEC
6.4     3.2      12         6.1     2.8      11`);
    expect(found).toHaveLength(1);
    expect(found[0]?.x).toBeGreaterThan(left(20));
    expect(found[0]?.x).toBeLessThan(left(28));
  });
  it('is none in one list, in a table, or where the second names have no numbers', () => {
    expect(edges('Soil pH        6.4\nPhosphorus     38\nPotassium      210\nCalcium        1400')).toEqual([]);
    expect(
      edges('Bed      pH      P ppm     K ppm\nTop      6.4     38        210\nLow      6.1     30        180'),
    ).toEqual([]);
    expect(edges(LISTS.replace(/(Zinc|Manganese|Copper|Boron).*/g, '$1'))).toEqual([]);
  });
});
