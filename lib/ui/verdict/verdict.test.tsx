import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { VERDICTS } from '../../domain/effects/types';
import { VerdictGlyph } from './glyph';
import { RefusalBox } from './refusal-box';
import { VerdictLine } from './verdict-line';

describe('VerdictGlyph', () => {
  it('has a drawing of its own for each verdict, in the same colours', () => {
    const drawings = VERDICTS.map((verdict) => renderToStaticMarkup(<VerdictGlyph verdict={verdict} />));
    expect(new Set(drawings).size).toBe(VERDICTS.length);
    for (const html of drawings) {
      const colours = new Set(html.match(/#[0-9A-F]{6}/gi));
      expect([...colours].sort()).toEqual(['#1D4E63', '#211A16', '#DDE9EC']);
      expect(html).toContain('aria-hidden="true"');
      expect(html).not.toContain('style=');
    }
  });
});

describe('VerdictLine', () => {
  it('says the word exactly, the numbers, the controls and what would settle it', () => {
    const html = renderToStaticMarkup(
      <VerdictLine
        verdict="cannot tell yet"
        sentence="Anywhere between −0.40 and +0.10 fits."
        comparedWith="compared with the untreated plots"
        settledBy="15 cores next time."
      />,
    );
    const words = html
      .replace(/<[^>]+>/g, ' ')
      .replace(/\s+/g, ' ')
      .trim();
    expect(words).toBe(
      'cannot tell yet , compared with the untreated plots Anywhere between −0.40 and +0.10 fits. What would settle it: 15 cores next time.',
    );
  });
});

describe('RefusalBox', () => {
  it('has no glyph and names what would help beside both values', () => {
    const html = renderToStaticMarkup(
      <RefusalBox
        refusal="not comparable"
        reason="The two tests differ in method."
        help="Ask for the same method next time."
        values={[
          { label: 'Spring 2025', printed: '41 ppm', note: 'Mehlich-3' },
          { label: 'Spring 2026', printed: '30 ppm', note: 'Bray P1' },
        ]}
      />,
    );
    expect(html).not.toContain('<svg');
    for (const part of ['not comparable', '41 ppm', '30 ppm', 'Ask for the same method next time.']) {
      expect(html).toContain(part);
    }
  });
});
