import { describe, expect, it } from 'vitest';
import { readLabel } from '../labels/label';
import { withAdvice } from './advised';
import type { Column } from './columns';

function column(heading: string): Column {
  return { x0: 0, x1: 1, heading, label: readLabel(heading), field: null, role: null, position: 1, unexplained: 0 };
}
/** Headings of the columns that say what to spread. */
function advised(...headings: string[]): string[] {
  return withAdvice(headings.map(column)).flatMap((one) => (one.role === 'recommendation' ? [one.heading] : []));
}

describe('withAdvice', () => {
  it('sets a table of what to spread aside', () => {
    expect(advised('Crop', 'N', 'P2O5', 'K2O', 'Lime')).toEqual(['N', 'P2O5', 'K2O', 'Lime']);
    expect(advised('Crop', 'N lb/acre', 'P2O5 lb/acre', 'K2O lb/acre')).toEqual([
      'N lb/acre',
      'P2O5 lb/acre',
      'K2O lb/acre',
    ]);
  });
  it('tells oxides to spread from the P and K that were found', () => {
    expect(advised('pH', 'P ppm', 'K ppm', 'P2O5 lb/acre', 'K2O lb/acre')).toEqual(['P2O5 lb/acre', 'K2O lb/acre']);
  });
  it('keeps oxides that are the only P and K of a soil, and those in a unit of soils', () => {
    expect(advised('pH', 'P2O5', 'K2O', 'Mg')).toEqual([]);
    expect(advised('Crop', 'N', 'P2O5 mg/kg', 'K2O mg/kg')).toEqual([]);
  });
  it('keeps an ordinary table and the lime requirement of a soil', () => {
    expect(advised('pH', 'Organic matter', 'P ppm', 'K ppm')).toEqual([]);
    expect(advised('pH', 'Buffer pH', 'Lime requirement')).toEqual([]);
  });
});
