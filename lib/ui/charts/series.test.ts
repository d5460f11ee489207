import { describe, expect, it } from 'vitest';
import { boronHistory, phBroken, phHistory, phPoint } from './sample-data';
import { joinedPairs, sortPoints, splitSeries } from './series';

describe('sortPoints', () => {
  it('puts the oldest first and leaves its input alone', () => {
    const given = [phPoint('b', '2026-01-01', 6), phPoint('a', '2025-01-01', 6)];
    expect(sortPoints(given).map((p) => p.id)).toEqual(['a', 'b']);
    expect(given.map((p) => p.id)).toEqual(['b', 'a']);
  });
});

describe('splitSeries', () => {
  it('keeps comparable tests in one stretch', () => {
    const [only, ...rest] = splitSeries(phHistory);
    expect(rest).toHaveLength(0);
    expect(only?.points).toHaveLength(5);
    expect(only?.breakBefore).toBeNull();
  });

  it('breaks where the methods differ, with another marker and the reason', () => {
    const [before, after] = splitSeries(phBroken);
    expect(before?.points.map((p) => p.id)).toEqual(['p1', 'p2', 'p3']);
    expect(after?.points.map((p) => p.id)).toEqual(['p4', 'p5']);
    expect(after?.breakBefore).toBe('methods differ');
    expect(after?.style.marker).not.toBe(before?.style.marker);
  });

  it('gives an earlier method its marker back', () => {
    const there = { ...phPoint('b', '2024-01-01', 6, 'methods differ'), method: 'calcium chloride' };
    const back = phPoint('c', '2025-01-01', 6, 'methods differ');
    const [first, second, third] = splitSeries([phPoint('a', '2023-01-01', 6), there, back]);
    expect(third?.style).toBe(first?.style);
    expect(second?.style).not.toBe(first?.style);
  });

  it('uses another marker across a break of the same method', () => {
    const [first, second] = splitSeries([
      phPoint('a', '2023-01-01', 6),
      phPoint('b', '2024-01-01', 6, 'the outline was redrawn'),
    ]);
    expect(second?.style.marker).not.toBe(first?.style.marker);
  });
});

describe('joinedPairs', () => {
  it('draws no line to a result below the limit', () => {
    const [segment] = splitSeries(boronHistory);
    if (segment === undefined) throw new Error('no segment');
    expect(joinedPairs(segment).map(([a, b]) => [a.id, b.id])).toEqual([['b3', 'b4']]);
  });
});
