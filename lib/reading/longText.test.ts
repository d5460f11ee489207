import { describe, expect, it } from 'vitest';
import { readLabel, unitOnly } from './labels/label';
import { clean } from './labels/normal';
import { readPasted } from './pasted/readPasted';
import { readPages } from './readPages';
import { readTable } from './readTable';
import { dateOrder, readDate } from './stages/dates';
import { readCell } from './stages/values';
import { readTableCell } from './table/cell';
import { fieldOf } from './table/fields';
import { labelOf } from './table/spoken';

const LENGTH = 10_000;
/** What laboratories print, without end: each sends some pattern as far as it goes before it fails. */
const PIECES = [
  '1 ',
  '0',
  '1.',
  '1,',
  '. ',
  '(',
  '( ',
  ')',
  ' - ',
  '1-',
  '/',
  '<',
  'a ',
  'ab-',
  'a: ',
  'pH ',
  'ppm ',
  '1 Jan ',
  '20',
  '%',
  'soil ',
  'to ',
  '_',
  '..',
  'P (ppm) ',
  'apply 3 lb ',
];
const TEXTS = PIECES.flatMap((piece) => {
  const text = piece.repeat(Math.ceil(LENGTH / piece.length)).slice(0, LENGTH);
  return [text, `${text}!`];
});
/** A pattern that runs away takes minutes; the usual is a few milliseconds, and a busy machine must not decide. */
const MILLISECONDS = 5_000;

const style = { decimalComma: false };
const order = dateOrder([]);
const READERS: Readonly<Record<string, (text: string) => unknown>> = {
  clean,
  unitOnly,
  readLabel,
  labelOf,
  fieldOf,
  readDate: (text) => readDate(clean(text), order),
  readCell: (text) => readCell(text, style),
  readTableCell: (text) => readTableCell(text, style),
  'a table': (text) => readTable({ fileName: 'a.csv', text: `Sample ID,Soil pH\n${text.replaceAll(',', ' ')},6.4\n` }),
  'a pasted text': (text) => readPasted({ fileName: 'a.txt', text: `Soil pH: 6.4\n${text}\n` }),
};

describe('texts of 10 kB', () => {
  it.each(Object.entries(READERS))('keep %s busy for no longer than a moment', { timeout: 120_000 }, (_, read) => {
    const slow = TEXTS.filter((text) => {
      const began = performance.now();
      read(text);
      return performance.now() - began > MILLISECONDS;
    });
    expect(slow.map((text) => text.slice(0, 20))).toEqual([]);
  });

  it.each([1e9, 1e30, 1e300, Number.POSITIVE_INFINITY, Number.NaN])('a word that lies %d pages down ends', (far) => {
    const word = { x0: 0.1, x1: 0.2, size: 10, direction: 0 as const };
    const near = ['Soil', 'pH', '6.4'].map((text, at) => ({
      ...word,
      text,
      x0: at / 4,
      x1: at / 4 + 0.05,
      y0: 0.1,
      y1: 0.11,
    }));
    const words = [...near, { ...word, text: 'Iron', y0: far, y1: far }, { ...word, text: '7', y0: -far, y1: far }];
    const reading = readPages({
      fileName: 'a.pdf',
      pages: [{ number: 1, width: 612, height: 792, rotation: 0, words }],
    });
    expect(['soil', 'refused']).toContain(reading.kind);
  });

  it('are no number, unit or label, and the honest ones beside them are', () => {
    expect(readCell('1 '.repeat(LENGTH), style)).toEqual({ kind: 'text' });
    expect(readCell('6.4', style)).toMatchObject({ kind: 'value', value: 6.4 });
    expect(unitOnly('ppm '.repeat(LENGTH))).toBeNull();
    expect(readLabel('pH '.repeat(LENGTH))).toBeNull();
    expect(clean('x'.repeat(LENGTH))).toHaveLength(1_000);
    const told = readPasted({
      fileName: 'a.txt',
      text: `Sample ID,Soil pH,P (ppm)\nBed 4,6.4,38\n${'x '.repeat(900)}\n`,
    });
    expect(told.samples[0]?.results.map((result) => result.value)).toEqual([6.4, 38]);
  });
});
