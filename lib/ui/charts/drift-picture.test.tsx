import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { DriftPicture, wrap } from './drift-picture';
import { manyAmendments, ph, phBand, phBroken } from './sample-data';

const html = renderToStaticMarkup(
  <DriftPicture
    title="pH, <North> bed"
    finding="Two tests."
    drawnOn="Drawn 1 Jun 2026"
    source="Tern Lane Growers"
    fontFamily="sans-serif"
    analyte={ph}
    points={phBroken}
    amendments={manyAmendments}
    band={phBand}
    asOf="2026-06-01"
  />,
);

describe('DriftPicture', () => {
  it('travels alone: no class, no style, nothing fetched', () => {
    expect(html).not.toMatch(/class=|style=|href=|url\(/);
    expect(html).toContain('xmlns="http://www.w3.org/2000/svg"');
  });

  it('carries title, day, source, the break and what the flags mean', () => {
    for (const words of [
      'pH, &lt;North&gt; bed',
      'Drawn 1 Jun 2026',
      'Tern Lane Growers',
      'your own target for onions',
      'from 11 Apr 2025, not joined: methods differ',
      '20 May 2025: Borax 2 oz, mixed into 6 lb of sand',
    ]) {
      expect(html).toContain(words);
    }
  });
});

describe('a long source', () => {
  it('goes on in the next line instead of off the edge', () => {
    const band = {
      ...phBand,
      source: `${'A department of agriculture, its guide to reading a soil report. '.repeat(3)}Last words`,
    };
    const long = renderToStaticMarkup(
      <DriftPicture
        title="pH"
        finding="Two tests."
        drawnOn="Drawn 1 Jun 2026"
        source="Tern Lane Growers"
        fontFamily="sans-serif"
        analyte={ph}
        points={phBroken}
        amendments={[]}
        band={band}
        asOf="2026-06-01"
      />,
    );
    expect(long).toContain('Last words.');
    const texts = [...long.matchAll(/<text[^>]*>([^<]*)/g)].map((match) => match[1] ?? '');
    expect(Math.max(...texts.map((text) => text.length))).toBeLessThanOrEqual(130);
  });
});

describe('wrap', () => {
  it('breaks between words and ends what does not fit in an ellipsis', () => {
    expect(wrap('one two three four', 9, 3)).toEqual(['one two', 'three', 'four']);
    expect(wrap('one two three four', 9, 1)).toEqual(['one two…']);
  });
});
