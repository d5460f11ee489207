import { describe, expect, it } from 'vitest';
import type { Page, Reading, Word } from '../types';
import { maskJson } from './maskJson';
import { shownWords } from './maskWords';
import { classOf } from './tokens';

const WIDTH = 600;
const HEIGHT = 800;
const SIZE = 10;

/** Words of one line; a bar parts cells that stand well apart. */
function line(y: number, text: string, left = 40): Word[] {
  const words: Word[] = [];
  let x = left;
  for (const cell of text.split('|')) {
    for (const one of cell.trim().split(/\s+/)) {
      const width = one.length * 5;
      const box = { x0: x / WIDTH, x1: (x + width) / WIDTH, y0: y / HEIGHT, y1: (y + 8) / HEIGHT };
      words.push({ text: one, ...box, size: SIZE, direction: 0 });
      x += width + 3;
    }
    x += 40;
  }
  return words;
}
const pageOf = (...lines: string[]): Page => ({
  number: 1,
  width: WIDTH,
  height: HEIGHT,
  rotation: 0,
  words: lines.flatMap((text, at) => line(100 + at * 40, text)),
});
const reading = (over: Partial<Reading> = {}): Reading => ({
  file: 'r.pdf',
  kind: 'soil',
  error: null,
  pages: 1,
  warnings: [],
  lab: { name: null },
  samples: [],
  recommendations: [],
  ...over,
});
const sample = (over: Partial<Reading['samples'][number]>) => ({
  sampleId: null,
  labNumber: null,
  fieldName: null,
  depth: null,
  dateSampled: null,
  dateSampledPrinted: null,
  dateReported: null,
  dateReportedPrinted: null,
  results: [],
  ...over,
});
const shown = (page: Page, read = reading()) => {
  const visible = shownWords(page, read);
  return page.words.map((word, at) => (visible[at] ? word.text : '#')).join(' ');
};

describe('a printed word', () => {
  it.each(['6.8', '<0.1', '221H', '6.8*', '1,250', '6.0-6.8', '45', '(12)', '1:1'])('%s is a number', (text) =>
    expect(classOf(text)).toBe('number'),
  );
  it.each(['Phosphorus', '(ppm)', 'meq/100g', 'Mehlich', 'Optimum', 'CEC', 'pH:'])('%s is known', (text) =>
    expect(classOf(text)).toBe('known'),
  );
  it.each([
    '48213',
    '555-1234',
    '04/12/2025',
    '2025-04-12',
    '555.123.4567',
    'Wren',
    'wren@garden.test',
    'F20411',
    'PO-77',
  ])('%s is not shown', (text) => expect(classOf(text)).toBe('unknown'));
});

describe('a page that is handed on', () => {
  it('keeps values, units, analytes, methods and ratings', () => {
    expect(shown(pageOf('pH | P | K', 'Phosphorus (P) | 45 | ppm | High', 'Mehlich 3'))).toBe(
      'pH P K Phosphorus (P) 45 ppm High Mehlich 3',
    );
  });

  it('hides names and addresses, and the numbers in them', () => {
    expect(shown(pageOf('Wren Onslow', '12 Mill Race Lane', 'Springfield 62704', 'Box 118'))).toMatch(/^[# ]+$/);
  });

  it('keeps a value beside a name that stands in another cell', () => {
    expect(shown(pageOf('North bed | 6.8 | 45'))).toBe('# # 6.8 45');
  });

  it('hides telephone numbers however they are written', () => {
    expect(shown(pageOf('555-0142', '(555) 123 4567', '555 0142'))).toMatch(/^[# ]+$/);
  });

  it('hides what follows a caption of identity or stands under it, in known words too', () => {
    expect(shown(pageOf('Grower: Sandy Loam', 'Account No | 1042', 'pH | 6.8'))).toBe(
      'Grower: # # Account No # pH 6.8',
    );
    expect(shown({ ...pageOf(), words: [...line(100, 'Client'), ...line(112, '77')] })).toBe('Client #');
  });

  it('hides a method that can be a surname unless it stands as a method', () => {
    expect(shown(pageOf('Olsen P | 12'))).toBe('Olsen P 12');
    expect(shown(pageOf('Wren Olsen'))).toBe('# #');
  });

  it('hides the laboratory’s name, though each word of it is known', () => {
    const read = reading({ lab: { name: 'Good Soil Test' } });
    expect(shown(pageOf('Good Soil Test', 'Soil test report'), read)).toBe('# # # Soil test report');
  });

  it('hides sample names that are numbers, but no value that happens to be the same', () => {
    const page = pageOf('12 | 6.8 | 12');
    const value = page.words[2];
    if (!value) throw new Error('The value is missing.');
    const box = [value.x0 - 0.001, value.y0 - 0.001, value.x1 + 0.001, value.y1 + 0.001] as const;
    const result = { page: 1, box } as unknown as Reading['samples'][number]['results'][number];
    expect(shown(page, reading({ samples: [sample({ sampleId: '12', results: [result] })] }))).toBe('# 6.8 12');
  });

  it('reads lines that run up the side as lines', () => {
    const page = pageOf('Wren | 6.8');
    const turned = page.words.map(
      (word): Word => ({
        ...word,
        x0: word.y0,
        x1: word.y1,
        y0: 1 - word.x1,
        y1: 1 - word.x0,
        direction: 270,
      }),
    );
    expect(shown({ ...page, words: turned })).toBe('# 6.8');
  });
});

describe('what the stages saw', () => {
  const pageText = 'Wren Onslow Mill Lane pH 6.8 Phosphorus ppm notes';
  const hidden = ['Wren', 'Onslow', 'Mill', 'Lane', 'notes'];
  const masked = (value: unknown) => JSON.stringify(maskJson(value, hidden, pageText));

  it('loses every hidden word, wherever it stands and however it is written', () => {
    const said = masked({
      a: 'Wren',
      b: ['wren onslow', 'MILL-lane'],
      c: { 'Wren Onslow': 'pH 6.8' },
      d: new Set(['Onslow']),
    });
    expect(said).not.toMatch(/wren|onslow|mill|lane/i);
    expect(said).toContain('pH 6.8');
  });

  it('keeps the program’s own words, but not one that also stands on the page', () => {
    expect(maskJson({ zone: 'results', kind: 'notes', analyte: 'soil_ph_water' }, hidden, pageText)).toEqual({
      zone: 'results',
      kind: '█████',
      analyte: 'soil_ph_water',
    });
  });

  it('keeps places and values, and loses long whole numbers', () => {
    expect(maskJson({ x: 101.25, value: 6.8, wrong: 5550142, text: '5550142' }, [], '')).toEqual({
      x: 101.25,
      value: 6.8,
      wrong: '█',
      text: '███████',
    });
  });

  it('writes a page once and then refers to it', () => {
    const page = { number: 1, words: ['6.8'] };
    expect(maskJson({ pages: [page], line: { page } }, [], '', [page])).toEqual({
      pages: [{ number: 1, words: ['6.8'] }],
      line: { page: { samePage: 1 } },
    });
  });
});
