import { describe, expect, it } from 'vitest';
import { parseNumber } from './parse-number';

describe('parseNumber', () => {
  it.each([
    ['6.4', 6.4, '6.4', ''],
    ['6,4', 6.4, '6.4', ''],
    [' 6,40 ', 6.4, '6.40', ''],
    ['12 lb', 12, '12', 'lb'],
    ['12lb', 12, '12', 'lb'],
    ['1 500', 1500, '1500', ''],
    ['1,500.5', 1500.5, '1500.5', ''],
    ['1.500,5', 1500.5, '1500.5', ''],
    ['1,250,000', 1250000, '1250000', ''],
    ['0,500', 0.5, '0.500', ''],
    ['.5', 0.5, '0.5', ''],
    ['5.', 5, '5', ''],
    ['-3,2', -3.2, '-3.2', ''],
    ['\u22123.2', -3.2, '-3.2', ''],
    ['1500 sq ft', 1500, '1500', 'sq ft'],
    ['1000 m2', 1000, '1000', 'm2'],
    ['4 %', 4, '4', '%'],
  ])('reads %j', (typed, value, text, unit) => {
    expect(parseNumber(typed)).toEqual({ ok: true, value, text, unit });
  });

  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['six', 'not_a_number'],
    ['6.4.1', 'not_a_number'],
    ['6-8', 'not_a_number'],
    ['1,500', 'ambiguous_separators'],
    ['12,345', 'ambiguous_separators'],
  ])('says why not for %j', (typed, reason) => {
    expect(parseNumber(typed)).toEqual({ ok: false, reason });
  });
});
