import { describe, expect, it } from 'vitest';
import { numberStyle, readCell } from './values';

const POINT = { decimalComma: false };
const COMMA = { decimalComma: true };

describe('readCell', () => {
  it.each([
    ['6.5', 6.5, '=', null, null, '6.5'],
    ['<0.1', 0.1, '<', null, null, '<0.1'],
    ['< 0.1', 0.1, '<', null, null, '< 0.1'],
    ['99+', 99, '>', null, null, '99+'],
    ['> 300', 300, '>', null, null, '> 300'],
    ['1,096', 1096, '=', null, null, '1,096'],
    ['.5', 0.5, '=', null, null, '.5'],
    ['221H+', 221, '=', 'H+', null, '221H+'],
    ['168 VH', 168, '=', 'VH', null, '168'],
    ['6.8*', 6.8, '=', null, null, '6.8*'],
    ['4.5 %', 4.5, '=', null, '%', '4.5'],
    ['120 ppm High', 120, '=', 'High', 'mg/kg', '120'],
    ['28L+ ppm', 28, '=', 'L+', 'mg/kg', '28L+'],
    ['ND', null, 'nd', null, null, 'ND'],
    ['trace', null, 'trace', null, null, 'trace'],
  ])('%s', (text, value, qualifier, rating, unit, printed) => {
    expect(readCell(text, POINT)).toMatchObject({ kind: 'value', value, qualifier, rating, unit, printed });
  });
  it.each(['', '--', 'NT', 'n/a', '—', 'not tested'])('"%s" is not analysed, never a value', (text) => {
    expect(readCell(text, POINT)).toEqual({ kind: 'none' });
  });
  it.each(['4-14', '6.0 - 6.8', '100 to 160', '0–6'])('"%s" is a range, never a value', (text) => {
    expect(readCell(text, POINT)).toEqual({ kind: 'range' });
  });
  it.each(['10/05/2024', '2024-10-05', '5 October 2024', 'Oct 5, 2024'])('"%s" is a day', (text) => {
    expect(readCell(text, POINT)).toEqual({ kind: 'date' });
  });
  it.each(['12 Elm Street', '1:1', '1:1 water', 'Bed 4'])('"%s" is words', (text) => {
    expect(readCell(text, POINT).kind).toBe('text');
  });
  it('reads decimal commas where the document writes them', () => {
    expect(numberStyle(['6,5', '12,45', '320'])).toEqual(COMMA);
    expect(numberStyle(['6.5', '1,096'])).toEqual(POINT);
    expect(readCell('6,5', COMMA)).toMatchObject({ value: 6.5, doubtful: null });
    expect(readCell('1.096,5', COMMA)).toMatchObject({ value: 1096.5 });
  });
  it('doubts a number whose point or comma can mean two things', () => {
    expect(readCell('1.096', COMMA)).toMatchObject({ doubtful: expect.stringContaining('thousands') });
    expect(readCell('6,5', POINT)).toMatchObject({ value: 6.5, doubtful: expect.stringContaining('comma') });
  });
});
