import { describe, expect, it } from 'vitest';
import { dateOrder, readDate } from './dates';

describe('readDate', () => {
  it.each([
    ['2024-10-05', '2024-10-05'],
    ['5 October 2024', '2024-10-05'],
    ['Oct. 5, 2024', '2024-10-05'],
    ['Sept 28, 2024', '2024-09-28'],
    ['28.02.2024', '2024-02-28'],
    ['12/31/24', '2024-12-31'],
    ['03/03/2024', '2024-03-03'],
  ])('%s', (text, iso) => {
    expect(readDate(text, 'unknown')).toMatchObject({ ok: true, iso });
  });
  it.each([
    ['10/05/2024', 'ambiguous'],
    ['10/05/0023', 'impossible'],
    ['2923-04-01', 'impossible'],
    ['31.02.2024', 'impossible'],
    ['soon', 'unreadable'],
  ])('%s gives no day', (text, reason) => {
    expect(readDate(text, 'unknown')).toEqual({ ok: false, reason });
  });
  it('learns the order from a day that can be only one way', () => {
    expect(dateOrder(['Sampled 10/05/2024, reported 10/14/2024'])).toBe('month-first');
    expect(dateOrder(['05.10.2024', '14.10.2024'])).toBe('day-first');
    expect(readDate('10/05/2024', 'month-first')).toMatchObject({ iso: '2024-10-05' });
    expect(readDate('10/05/2024', 'day-first')).toMatchObject({ iso: '2024-05-10' });
  });
});
