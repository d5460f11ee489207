import { describe, expect, it } from 'vitest';
import type { ReadResult } from '../types';
import { checkInk } from './ink';
import { leftover } from './leftover';
import { mendWords } from './mend';
import { mergeViews } from './merge';
import { setOf } from './place';
import { readScanTraced } from './readScan';
import { withThirdLook } from './third';
import { judge } from './trust';
import type { Ink, Merged, Seen } from './types';

const LETTER = 30;
const seen = (text: string, x0: number, y0: number, more: Partial<Seen> = {}): Seen => ({
  text,
  x0,
  y0,
  x1: x0 + text.length * 18,
  y1: y0 + 30,
  certainty: 0.95,
  ...more,
});
const merged = (text: string, more: Partial<Merged> = {}): Merged => ({
  ...seen(text, 100, 100),
  support: 2,
  others: [],
  of: 2,
  point: 'unknown',
  ...more,
});
/** One body of ink for each figure, 14 wide; a point is four wide and stands on the line. */
const bodies = (starts: readonly number[]): Ink[] => starts.map((x0) => ({ x0, y0: 100, x1: x0 + 14, y1: 130 }));
const point = (x0: number): Ink => ({ x0, y0: 125, x1: x0 + 4, y1: 130 });

describe('two views of one page', () => {
  it('agree on a word, which then has the support of both', () => {
    const [word] = mergeViews([[seen('7.1', 10, 10)], [seen('7.1', 11, 10)]], LETTER);
    expect(word).toMatchObject({ text: '7.1', support: 2, others: [] });
  });

  it('differ: the better one stands and the other is kept beside it', () => {
    const words = mergeViews([[seen('7.1', 10, 10)], [seen('7.7', 10, 10, { certainty: 0.6 })]], LETTER);
    expect(words).toHaveLength(1);
    expect(words[0]).toMatchObject({ text: '7.1', support: 1, others: ['7.7'] });
  });

  it('keep a word that one of them passed over', () => {
    const words = mergeViews([[seen('pH', 10, 10), seen('6.4', 200, 10)], [seen('pH', 10, 10)]], LETTER);
    expect(words.map(({ text, support }) => `${text} ${support}`)).toEqual(['pH 2', '6.4 1']);
  });

  it('lose a word that one of them took over two lines', () => {
    const tall = seen('69', 10, 10, { y1: 90 });
    const words = mergeViews([[seen('6.2', 10, 10), seen('9.1', 10, 60)], [tall]], LETTER);
    expect(words.map(({ text }) => text).sort()).toEqual(['6.2', '9.1']);
  });
});

describe('the ink under a number', () => {
  it('shows the point that the engine lost', () => {
    const [word] = checkInk([merged('71', { x1: 140 })], [...bodies([102, 126]), point(119)], LETTER);
    expect(word).toMatchObject({ text: '7.1', point: 'added', others: ['71'] });
  });

  it('does not take the end of a broken figure for a point', () => {
    const [word] = checkInk([merged('65', { x1: 140 })], [...bodies([102, 122]), point(118)], LETTER);
    expect(word?.text).toBe('65');
  });

  it('is not asked for a point where its pieces are not the characters', () => {
    const touching: Ink[] = [{ x0: 102, y0: 100, x1: 140, y1: 130 }];
    const [word] = checkInk([merged('71', { x1: 140 })], [...touching, point(119)], LETTER);
    expect(word).toMatchObject({ text: '71', point: 'unknown' });
  });

  it('denies a point that is not there', () => {
    const [word] = checkInk([merged('7.1', { x1: 140 })], bodies([102, 126]), LETTER);
    expect(word).toMatchObject({ text: '7.1', point: 'not-seen' });
  });

  it('tells a comma between thousands from a point by how low it hangs', () => {
    const figures = bodies([102, 126, 144, 162]);
    const hanging: Ink = { x0: 118, y0: 124, x1: 123, y1: 136 };
    const word = merged('4.111', { x1: 180 });
    expect(checkInk([word], [...figures, hanging], LETTER)[0]?.text).toBe('4,111');
    expect(checkInk([word], [...figures, point(118)], LETTER)[0]?.text).toBe('4.111');
  });

  it('parts a number from the rating letter that stands apart, and not from one that is glued on', () => {
    const apart = checkInk([merged('51L', { x1: 170 })], bodies([102, 120, 152]), LETTER);
    expect(apart.map((word) => word.text)).toEqual(['51', 'L']);
    const glued = checkInk([merged('51L', { x1: 156 })], bodies([102, 120, 138]), LETTER);
    expect(glued.map((word) => word.text)).toEqual(['51L']);
  });

  it('is put together where no word lies on it', () => {
    const boxes = leftover(bodies([102, 120, 400]), [merged('x', { x0: 395, x1: 420 })], LETTER);
    expect(boxes).toEqual([{ x0: 102, y0: 100, x1: 134, y1: 130 }]);
  });
});

describe('usual confusions of the engine', () => {
  it.each([
    ['Ib/acre', 'lb/acre'],
    ['Ibs/acre', 'lbs/acre'],
    ['(NH40Ac)', '(NH4OAc)'],
    ['KCI', 'KCl'],
    ['K20', 'K2O'],
    ['P205', 'P2O5'],
    ['pprn', 'ppm'],
    ['rng/kg', 'mg/kg'],
    ['mgkg', 'mg/kg'],
    ['0.M.', 'O.M.'],
    ['Yo', '%'],
    ['pH-KCI', 'pH-KCl'],
    ['S04-S', 'SO4-S'],
    ['N03-N', 'NO3-N'],
    ['CI', 'Cl'],
    ['Il', 'II'],
    ['(p.p-m.)', '(p.p.m.)'],
    ['Ibslacre', 'lbs/acre'],
    ['Magnesiurn', 'Magnesium'],
    ['1O4', '104'],
    ['l.5', '1.5'],
  ])('%s is %s', (wrong, right) => {
    expect(mendWords([merged(wrong)])[0]?.text).toBe(right);
  });

  it.each(['B1', 'A1', 'C1', 'Fee', 'Bed', 'Leeks', 'Reports', '6.4', '221H'])('%s stays', (text) => {
    expect(mendWords([merged(text)])[0]?.text).toBe(text);
  });

  it('tells a sample called A1 from aluminium by its column', () => {
    const column = ['Al', 'A2', 'A3'].map((text, row) => merged(text, { y0: 100 + row * 60, y1: 130 + row * 60 }));
    expect(mendWords(column).map((word) => word.text)).toEqual(['A1', 'A2', 'A3']);
    expect(mendWords([merged('Al')])[0]?.text).toBe('Al');
  });

  it('lets a third look decide between two', () => {
    expect(withThirdLook(merged('7.7', { support: 1, others: ['7.1'] }), '7.1')).toMatchObject({
      text: '7.1',
      support: 2,
      others: ['7.7'],
    });
    expect(withThirdLook(merged('7.7', { support: 2 }), '7.1')).toMatchObject({ text: '7.7', others: ['7.1'] });
  });
});

describe('lines', () => {
  it('get one baseline and one size, whatever letters stand in them', () => {
    const words = [
      seen('Calcium', 10, 100),
      seen('ppm', 300, 108.3, { y1: 139.3 }),
      seen('1250', 420, 100.4, { y1: 130.4 }),
    ];
    const sets = words.map((word) => setOf(words).get(word));
    expect(new Set(sets.map((set) => set?.base)).size).toBe(1);
    expect(new Set(sets.map((set) => set?.size)).size).toBe(1);
  });
});

describe('what a number from a scan is worth', () => {
  const result = (printed: string): ReadResult => ({
    analyte: 'soil_ph_water',
    label: 'pH',
    printed,
    value: Number(printed),
    qualifier: '=',
    unit: 'pH',
    unitPrinted: null,
    form: null,
    method: null,
    methodPrinted: null,
    rating: null,
    primary: true,
    page: 1,
    box: null,
    cell: null,
    confidence: 0.99,
    doubts: [],
  });
  const spot = (word: Merged) => ({ page: 1, words: [word], box: { x0: 0, y0: 0, x1: 10, y1: 10 } });

  it('is sure when both views and the second look say the same', () => {
    const { ceiling, doubts } = judge(result('7.1'), spot(merged('7.1', { point: 'seen' })), '7.1');
    expect(ceiling).toBeGreaterThanOrEqual(0.95);
    expect(doubts).toEqual([]);
  });

  it('is doubted when two readings differ, and says which', () => {
    const { ceiling, doubts } = judge(result('7.1'), spot(merged('7.1', { support: 1, others: ['7.7'] })), '7.7');
    expect(ceiling).toBeLessThanOrEqual(0.5);
    expect(doubts).toEqual([{ code: 'two-readings', sentence: 'Two readings differ: 7.1 / 7.7.' }]);
  });

  it('is doubted when one look alone saw it', () => {
    const { ceiling, doubts } = judge(result('7.1'), spot(merged('7.1', { support: 1 })), '');
    expect(ceiling).toBeLessThan(0.95);
    expect(doubts.map((one) => one.code)).toEqual(['one-look']);
  });

  it('is doubted when no point can be seen in it', () => {
    const { ceiling, doubts } = judge(result('7.1'), spot(merged('7.1', { point: 'not-seen' })), '7.1');
    expect(ceiling).toBeLessThan(0.7);
    expect(doubts.map((one) => one.code)).toEqual(['decimal-point']);
  });

  it('is doubted when its point may be a comma between thousands', () => {
    const { ceiling, doubts } = judge(result('3.060'), spot(merged('3.060', { point: 'seen' })), '3.060');
    expect(ceiling).toBeLessThan(0.7);
    expect(doubts.map((one) => one.code)).toEqual(['decimal-point']);
  });
});

describe('a scanned page through all stages', () => {
  const line = (y: number, label: string, value: string, unit: string): Seen[] => [
    seen(label, 100, y),
    seen(value, 600, y),
    ...(unit === '' ? [] : [seen(unit, 800, y)]),
  ];
  const view = [
    ...line(100, 'Soil', 'Report', ''),
    ...line(200, 'pH', '6.4', ''),
    ...line(260, 'Phosphorus', '36', 'ppm'),
    ...line(320, 'Potassium', '160', 'ppm'),
    ...line(380, 'Magnesium', '120', 'ppm'),
  ];
  const page = {
    number: 1,
    width: 1600,
    height: 2200,
    letter: LETTER,
    scale: 2.6,
    views: [view, view],
    pieces: [],
    // Half as large on the page as stored, from its middle.
    stored: (box: { x0: number; y0: number; x1: number; y1: number }) =>
      [box.x0 / 3200 + 0.5, box.y0 / 4400 + 0.5, box.x1 / 3200 + 0.5, box.y1 / 4400 + 0.5] as const,
  };

  it('gives boxes on the page as stored and looks again at every number', async () => {
    const asked: string[] = [];
    const { reading } = await readScanTraced({
      fileName: 'x.png',
      pages: [page],
      lookAgain: async (_, spots, as) => {
        asked.push(...spots.map(() => as));
        return spots.map((spot) => (Math.abs(spot.y0 - 260) < 40 ? '38' : ''));
      },
    });
    const results = reading.samples[0]?.results ?? [];
    expect(results.map((one) => one.printed)).toEqual(['6.4', '36', '160', '120']);
    expect(asked.filter((as) => as === 'number')).toHaveLength(4);
    const phosphorus = results.find((one) => one.analyte === 'phosphorus');
    expect(phosphorus?.doubts.map((one) => one.code)).toContain('two-readings');
    expect(phosphorus?.confidence).toBeLessThan(0.95);
    expect(phosphorus?.box?.[0]).toBeCloseTo(0.5 + 600 / 3200, 2);
    expect(phosphorus?.box?.[1]).toBeCloseTo(0.5 + 260 / 4400, 2);
  });
});
