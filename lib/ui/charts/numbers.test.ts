import { describe, expect, it } from 'vitest';
import { formatDay, formatNumber, formatRange, formatSigned } from './numbers';

describe('numbers in words', () => {
  it('have a true minus sign and no negative zero', () => {
    expect(formatNumber(-0.4, 1)).toBe('\u22120.4');
    expect(formatNumber(-0.04, 1)).toBe('0.0');
    expect(formatSigned(0.4, 1)).toBe('+0.4');
    expect(formatSigned(0.04, 1)).toBe('0.0');
  });

  it('say open ranges in words', () => {
    expect(formatRange(0.32, 0.6, 2)).toBe('0.32 to 0.60');
    expect(formatRange(null, 0.6, 1)).toBe('0.6 or less');
    expect(formatRange(0.3, null, 1)).toBe('0.3 or more');
    expect(formatRange(null, null, 1)).toBe('anything');
  });
});

describe('formatDay', () => {
  it('writes the month in letters and shifts no day', () => {
    expect(formatDay('2026-05-03')).toBe('3 May 2026');
    expect(formatDay('2026-01-01')).toBe('1 Jan 2026');
  });
});
