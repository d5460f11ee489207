import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { DriftChart } from './drift-chart';
import { ph, phBand, phBroken, sulfur } from './sample-data';
import type { DriftChartProps } from './types';

const props: DriftChartProps = {
  title: 'pH, North bed',
  analyte: ph,
  points: phBroken,
  amendments: sulfur,
  band: phBand,
  asOf: '2026-06-01',
  source: 'Tern Lane Growers',
  fileName: 'north-bed-ph',
};

/** As the server sends it, before any script has run. */
const page = (own: Partial<DriftChartProps> = {}) => renderToStaticMarkup(<DriftChart {...props} {...own} />);
const words = (html: string) => html.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ');

describe('DriftChart on the server', () => {
  it('brings finding, caption and the whole table without script or inline style', () => {
    const html = page();
    expect(html).not.toContain('style=');
    expect(words(html)).toContain('pH went from 6.3 on 11 Apr 2025 to 6.1 on 14 Apr 2026');
    expect(words(html)).toContain('Target band 6.0 to 6.8: your own target for onions.');
    expect(html.match(/<th scope="row"/g)).toHaveLength(7);
    expect(words(html)).toContain('not joined to the test before: methods differ');
    expect(words(html)).toContain('Spread: Sulfur 9 lb');
  });

  it('says the sentence it is given instead of its own', () => {
    expect(words(page({ finding: 'pH falls by 0.2 a year.' }))).toContain('pH falls by 0.2 a year.');
    expect(words(page({ finding: 'pH falls by 0.2 a year.' }))).not.toContain('Fewer than four tests');
  });

  it('keeps a finding that stands above it as the name of the figure only', () => {
    const html = page({ hideFinding: true });
    const id = /<figure[^>]*aria-labelledby="([^"]+)"/.exec(html)?.[1];
    expect(html).toContain(`<p id="${id}" class="sr-only">`);
  });

  it('leads from the row of a test to where it can be read', () => {
    const html = page({ points: phBroken.map((point) => ({ ...point, href: `/reports/${point.id}` })) });
    expect(html.match(/<a href="\/reports\/p\d"/g)).toHaveLength(phBroken.length);
    expect(page()).not.toContain('<a ');
  });

  it('with nothing to draw shows the shape of what will come and offers no download', () => {
    const html = page({ points: [], amendments: [] });
    expect(words(html)).toContain('No test to draw yet');
    expect(html).not.toContain('<table');
    expect(html).not.toContain('Download CSV');
  });
});
