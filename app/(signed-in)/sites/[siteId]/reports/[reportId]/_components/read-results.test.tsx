// @vitest-environment happy-dom
import { cleanup, render, screen, within } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import type { Result } from '@/lib/schemas/results';
import { makeReport } from '@/tests/support/review-rows';
import { ReadResults } from './read-results';

afterEach(cleanup);

const result = (analyte: string, printed: string): Result => ({
  id: analyte,
  sampleId: 'sample-1',
  reportId: 'report-1',
  analysis: 1,
  composite: 1,
  plotId: 'plot-1',
  takenOn: '2026-04-12',
  depthFromCm: null,
  depthToCm: null,
  laboratory: null,
  analyte,
  method: null,
  form: null,
  unit: null,
  unitBasis: 'none',
  value: printed,
  valueSi: null,
  qualifier: '=',
  printed,
  unitPrinted: null,
  confirmedBy: null,
  confirmedAt: '2026-04-20T08:00:00.000Z',
  supersedesId: null,
  correctionReason: null,
});

const show = (state: 'confirmed' | 'in-review', results: readonly Result[]) =>
  render(
    <ReadResults
      siteId="site-1"
      report={makeReport({ state, origin: 'file', fileName: 'spring.pdf', contentType: 'application/pdf' })}
      results={results}
      plotNames={new Map([['plot-1', 'Top bed']])}
    />,
  );

describe('a viewer', () => {
  it('reads the confirmed values in the fixed order, and is offered neither the file nor a change', () => {
    show('confirmed', [result('zinc', '4.3'), result('soil_ph_water', '6.8')]);
    const table = screen.getByRole('table', { name: 'Top bed, taken 12 Apr 2026' });
    const names = within(table).getAllByRole('rowheader');
    expect(names.map((one) => one.textContent)).toEqual(['Soil pH (in water)', 'Zinc']);
    expect(screen.queryByRole('button')).toBeNull();
    expect(screen.getAllByRole('link').map((one) => one.textContent)).toEqual(['Reports']);
  });

  it('sees no value before it is confirmed', () => {
    show('in-review', []);
    expect(screen.queryByRole('table')).toBeNull();
    expect(screen.getByText(/shown here once they are confirmed/)).toBeTruthy();
  });
});
