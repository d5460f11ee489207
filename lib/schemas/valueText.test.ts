import { describe, expect, it } from 'vitest';
import { readValueText } from './valueText';

describe('a value cell', () => {
  it.each([
    ['6.4', '6.4', '='],
    ['6,4', '6.4', '='],
    [' 7.10 ', '7.10', '='],
    ['.5', '0.5', '='],
    ['-1.5', '-1.5', '='],
    ['<0.1', '0.1', '<'],
    ['≤ 0,05', '0.05', '<'],
    ['> 100', '100', '>'],
    ['12 %', '12', '='],
    ['1 500', '1500', '='],
    ['1,500.5', '1500.5', '='],
    ['1.500,5', '1500.5', '='],
    ['nd', null, 'nd'],
    ['N.D.', null, 'nd'],
    ['Trace', null, 'trace'],
    ['', null, '='],
  ])('%j', (typed, value, qualifier) => {
    expect(readValueText(typed)).toEqual({ ok: true, printed: typed.trim(), value, qualifier });
  });

  it.each(['abc', '1..2', '6.4.1', '1e5', 'NaN', 'Infinity', '=1+1', '--', '<'])('refuses %j', (typed) => {
    expect(readValueText(typed)).toEqual({ ok: false, reason: 'not-a-value' });
  });

  it('asks about what can be read two ways', () => {
    expect(readValueText('1,500')).toEqual({ ok: false, reason: 'ambiguous' });
    expect(readValueText('<1,500')).toEqual({ ok: false, reason: 'ambiguous' });
  });
});
