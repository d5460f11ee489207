import { describe, expect, it } from 'vitest';
import { typedLines } from '@/tests/support/typedPage';
import { columnAt, tablesOf } from './tables';
import { earlierYears } from './years';

function years(text: string) {
  const [table] = tablesOf(typedLines(text));
  if (table === undefined) throw new Error('The text holds no table.');
  const { earlier, groups } = earlierYears(table, (cell) => columnAt(table.columns, cell));
  const first = (text_: string) => text_.split('  ')[0];
  return {
    earlier: [...earlier].map(([row, year]) => `${year}: ${row.line.phrases.at(-1)?.text}`),
    groups: groups.map((group) => group.map((row) => first(row.line.text))),
  };
}

describe('earlierYears', () => {
  it('keeps the latest year of each plot and knows where the next plot begins', () => {
    const found = years(`
Plot        Year     pH      P ppm    K ppm
Top bed     2026     6.4     38       210
            2024     6.1     30       180
            2021     5.9     25       150
Low bed     2026     6.8     44       240
            2024     6.7     41       230`);
    expect(found.groups).toEqual([
      ['Top bed', '2024', '2021'],
      ['Low bed', '2024'],
    ]);
    expect(found.earlier).toEqual(['2024: 180', '2021: 150', '2024: 230']);
  });
  it('knows the latest wherever it stands', () => {
    const found = years(`
Plot        Year     pH      P ppm    K ppm
Top bed     2021     5.9     25       150
            2026     6.4     38       210
            2024     6.1     30       180`);
    expect(found.earlier).toEqual(['2021: 150', '2024: 180']);
  });
  it('tells two seasons of one year apart', () => {
    const found = years(`
Plot        Taken           pH      P ppm    K ppm
Top bed     Fall 2026       6.4     38       210
            Spring 2026     6.1     30       180`);
    expect(found.earlier).toEqual(['Spring 2026: 180']);
  });
  it('sets nothing aside where each plot has one row', () => {
    const found = years(`
Plot         Year     pH      P ppm    K ppm
Top bed      2026     6.4     38       210
Low bed      2024     6.1     30       180
Long bed     2026     5.9     25       150`);
    expect(found.earlier).toEqual([]);
  });
  it('sets nothing aside where all rows are of one year', () => {
    const found = years(`
Plot         Year     pH      P ppm    K ppm
Top bed      2026     6.4     38       210
             2026     6.1     30       180`);
    expect(found.earlier).toEqual([]);
  });
});
