import { describe, expect, it } from 'vitest';
import { contextAt, contextsOf, withShared } from './contexts';
import type { IdentityHit } from './identity';

function hit(field: IdentityHit['field'], value: string, x0: number, y0: number, page = 1): IdentityHit {
  return { field, value, page, line: Math.round(y0 / 12), x0, y0 };
}

/** Two panels side by side, their lines going on in turn, under a day that holds for both. */
const PANELS = [
  hit('dateReported', '12 Aug 2026', 50, 40),
  hit('sampleId', 'Top bed', 50, 100),
  hit('sampleId', 'Low bed', 350, 101),
  hit('labNumber', '101', 50, 112),
  hit('labNumber', '102', 350, 112),
  hit('depth', '0-6 in', 50, 124),
];

describe('contextsOf', () => {
  it('gives each panel its own words, and both what is said before them', () => {
    expect(contextsOf(PANELS).map((context) => context.identity)).toEqual([
      { dateReported: '12 Aug 2026', sampleId: 'Top bed', labNumber: '101', depth: '0-6 in' },
      { dateReported: '12 Aug 2026', sampleId: 'Low bed', labNumber: '102', depth: '0-6 in' },
    ]);
  });
  it('does not lay one sample’s number on the next', () => {
    const [, second] = contextsOf([
      hit('sampleId', 'Top bed', 50, 100),
      hit('labNumber', '101', 50, 112),
      hit('sampleId', 'Low bed', 50, 400),
    ]);
    expect(second?.identity).toEqual({ sampleId: 'Low bed' });
  });
  it('takes the same name said again for the same sample', () => {
    expect(contextsOf([hit('sampleId', 'Top bed', 50, 100), hit('sampleId', 'Top bed', 50, 600)])).toHaveLength(1);
  });
  it('makes one context of a page that names no sample, and none of nothing', () => {
    expect(contextsOf([hit('depth', '0-6 in', 50, 40)])).toEqual([
      { page: 1, y0: 40, x0: 50, identity: { depth: '0-6 in' } },
    ]);
    expect(contextsOf([])).toEqual([]);
  });
});

describe('contextAt', () => {
  const contexts = contextsOf([...PANELS, hit('sampleId', 'Long bed', 50, 500)]);
  const name = (page: number, y: number, x?: number) => contextAt(contexts, page, y, x)?.identity.sampleId ?? null;

  it('finds the panel over a place', () => {
    expect([name(1, 200, 60), name(1, 200, 380), name(1, 600, 60)]).toEqual(['Top bed', 'Low bed', 'Long bed']);
  });
  it('lets a table begin a little left of its panel’s title', () => {
    expect(name(1, 200, 310)).toBe('Low bed');
  });
  it('goes on over the next page, and reaches up to the first on its own', () => {
    expect(name(2, 50, 60)).toBe('Long bed');
    expect(name(1, 20, 60)).toBe('Top bed');
  });
  it('has no answer on a page before all of them', () => {
    expect(contextAt(contexts, 0, 900)).toBeNull();
  });
});

describe('withShared', () => {
  it('adds days and depth where they are missing, never a name or number', () => {
    const shared = { sampleId: 'Top bed', labNumber: '101', depth: '0-6 in', dateSampled: '1 Aug 2026' };
    expect(withShared({ sampleId: 'Low bed', depth: '6-12 in' }, shared)).toEqual({
      sampleId: 'Low bed',
      depth: '6-12 in',
      dateSampled: '1 Aug 2026',
    });
  });
});
