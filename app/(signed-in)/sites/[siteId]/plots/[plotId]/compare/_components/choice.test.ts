import { describe, expect, it } from 'vitest';
import {
  askedOf,
  type ComparableTest,
  compareQuery,
  defaultPair,
  pairFor,
  presetsFor,
  seasonWords,
  testsOf,
} from './choice';

const test = (id: string, takenOn: string, plotId = 'here'): ComparableTest => ({
  id,
  plotId,
  plotName: plotId === 'here' ? 'Top bed' : 'Wall bed',
  takenOn,
  printed: '6.8',
  laboratory: null,
});
const spring26 = test('s26', '2026-04-11');
const fall25 = test('f25', '2025-10-05');
const spring25 = test('s25', '2025-04-12');
const wall26 = test('w26', '2026-04-11', 'wall');
const tests = [spring26, wall26, fall25, spring25];

describe('testsOf', () => {
  const row = (id: string, composite: number, analysis: number, more: object = {}) => ({
    id,
    plotId: 'here',
    takenOn: '2026-04-11',
    printed: '6.8',
    laboratory: { id: 'l', name: 'Millbrook Soil Office' },
    composite,
    analysis,
    method: '1:1_water',
    form: null,
    unitBasis: 'none' as const,
    analyte: 'soil_ph_water',
    ...more,
  });

  it('counts bags and analyses of one day as one test, known by the first', () => {
    const found = testsOf([row('bag2', 2, 1), row('again', 1, 2), row('first', 1, 1)], new Map([['here', 'Top bed']]));
    expect(found.map((one) => [one.id, one.plotName, one.laboratory])).toEqual([
      ['first', 'Top bed', 'Millbrook Soil Office'],
    ]);
  });

  it('keeps two methods of one day apart and puts the newest first', () => {
    const found = testsOf(
      [row('old', 1, 1, { takenOn: '2025-04-12' }), row('water', 1, 1), row('salt', 1, 1, { method: '0.01M_CaCl2' })],
      new Map(),
    );
    expect(found.map((one) => one.id)).toEqual(['water', 'salt', 'old']);
  });
});

describe('seasonWords', () => {
  it('goes by the half of the earth, and gives December to the year whose winter it opens', () => {
    expect(seasonWords('2026-04-11', 'north')).toBe('Spring 2026');
    expect(seasonWords('2026-04-11', 'south')).toBe('Fall 2026');
    expect(seasonWords('2025-12-20', 'north')).toBe('Winter 2026');
  });
});

describe('what is compared without being asked', () => {
  it('is the newest test against the one before', () => {
    expect(defaultPair(tests, 'here')).toEqual({ a: 'f25', b: 's26' });
  });
  it('is a neighbour of the same day where the plot has one test', () => {
    expect(defaultPair([spring26, test('w25', '2025-04-12', 'wall'), wall26], 'here')).toEqual({ a: 's26', b: 'w26' });
  });
  it('is nothing where there is one test, or none of this plot', () => {
    expect(defaultPair([spring26], 'here')).toBeNull();
    expect(defaultPair([wall26], 'here')).toBeNull();
  });
});

describe('presetsFor', () => {
  it('offers last fall, last spring and the neighbour, each pair once', () => {
    expect(presetsFor(tests, 'here', 'north')).toEqual([
      { label: 'Spring 2026 with fall 2025', a: 'f25', b: 's26' },
      { label: 'Spring 2026 with spring 2025', a: 's25', b: 's26' },
      { label: 'Same day, Wall bed', a: 's26', b: 'w26' },
    ]);
  });
  it('offers nothing for a plot without tests', () => {
    expect(presetsFor([wall26], 'here', 'north')).toEqual([]);
  });
});

describe('the address', () => {
  const asked = (query: string) => askedOf(Object.fromEntries(new URLSearchParams(query)));

  it('brings back what it was made of', () => {
    const query = compareQuery({ analyte: 'soil_ph_water', a: 's25', b: 'w26' });
    expect(asked(query)).toEqual({ analyte: 'soil_ph_water', a: 's25', b: 'w26' });
    expect(pairFor(asked(query), tests, 'here')).toEqual({ pair: { a: 's25', b: 'w26' }, replaced: false });
  });
  it('fills in the side that is missing, never with the same test', () => {
    expect(pairFor(asked('?a=f25'), tests, 'here').pair).toEqual({ a: 'f25', b: 's26' });
    expect(pairFor(asked('?b=f25'), tests, 'here').pair).toEqual({ a: 's26', b: 'f25' });
  });
  it('says when it names a test that is not there, and falls back', () => {
    expect(pairFor(asked('?a=gone&b=gone'), tests, 'here')).toEqual({ pair: { a: 'f25', b: 's26' }, replaced: true });
  });
  it('takes a repeated parameter for none', () => {
    expect(askedOf({ a: ['s25', 'f25'], b: 's26' })).toEqual({ analyte: null, a: null, b: 's26' });
  });
});
