import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { CompareStrip, compareSentence } from './compare-strip';
import { Dumbbell } from './dumbbell';
import { IntervalStrip, intervalSentence } from './interval-strip';
import { ph, phBand, phHistory, potassium, sulfur } from './sample-data';
import { SmallMultiples } from './small-multiples';
import { stripScale } from './strip-scale';
import type { CompareStripProps, IntervalStripProps } from './types';

const fall: IntervalStripProps = {
  analyte: ph,
  planned: -0.5,
  change: { estimate: -0.46, low: -0.6, high: -0.32 },
  half: -0.25,
  oneAndHalf: -0.75,
};

const compare: CompareStripProps = {
  analyte: ph,
  earlier: { label: 'Fall 2025', takenOn: '2025-10-02', value: 6.9, printed: '6.9', low: 6.64, high: 7.16 },
  later: { label: 'Spring 2026', takenOn: '2026-04-14', value: 6.6, printed: '6.6', low: 6.34, high: 6.86 },
  outcome: {
    kind: 'difference',
    difference: { estimate: -0.3, low: -0.66, high: 0.06 },
    moreThanNoise: false,
    widenedBy: ['another season'],
  },
};

describe('stripScale', () => {
  it('keeps the order of values and stays inside its rims', () => {
    const scale = stripScale([-0.75, 0], { signed: true, least: 0.4 });
    const places = [-0.75, -0.5, 0].map(scale.at);
    expect([...places].sort((a, b) => a - b)).toEqual(places);
    expect(Math.min(...places)).toBeGreaterThanOrEqual(5);
    expect(Math.max(...places)).toBeLessThanOrEqual(95);
  });

  it('labels round ticks with one sign and no negative zero', () => {
    const { ticks } = stripScale([-0.75, 0.1], { signed: true, least: 0.4 });
    expect(ticks.map((t) => t.label)).toContain('0.0');
    expect(ticks.map((t) => t.label)).toContain('\u22120.5');
  });
});

describe('IntervalStrip', () => {
  it('says change, interval, plan and zone in words', () => {
    expect(intervalSentence(fall)).toBe(
      'Change of pH seen: \u22120.46, 90% interval \u22120.60 to \u22120.32. ' +
        'Planned: \u22120.50; half to one and a half times that is \u22120.75 to \u22120.25.',
    );
  });

  it('says what was due where the plan had not all reacted', () => {
    expect(intervalSentence({ ...fall, plannedWord: 'due' })).toContain('Due by then: −0.50;');
    expect(renderToStaticMarkup(<IntervalStrip {...fall} plannedWord="due" />)).toContain('due −0.50');
  });

  it('says an open zone and an open interval', () => {
    const open = intervalSentence({ ...fall, oneAndHalf: null, change: { estimate: -0.4, low: null, high: -0.1 } });
    expect(open).toContain('90% interval \u22120.10 or less');
    expect(open).toContain('is \u22120.25 or less');
  });

  it('draws without any inline style, in words that a reader of the page also gets', () => {
    const html = renderToStaticMarkup(<IntervalStrip {...fall} comparedWith="compared with 2 untreated plots" />);
    expect(html).not.toContain('style=');
    expect(html).toContain('planned \u22120.50');
    expect(html).toContain('seen \u22120.46');
    expect(html).toMatch(/<figcaption[^>]*>Change of pH seen, compared with 2 untreated plots/);
  });
});

describe('CompareStrip', () => {
  it('gives both values, the difference and why the interval is wider', () => {
    expect(compareSentence(compare)).toBe(
      'Fall 2025 (2 Oct 2025) 6.9; Spring 2026 (14 Apr 2026) 6.6. Difference \u22120.30, 90% interval \u22120.66 to +0.06. ' +
        'Not more than the noise of two tests: it may be nothing. The interval is wider for another season.',
    );
  });

  it('calls the zero of two plots no difference', () => {
    expect(renderToStaticMarkup(<CompareStrip {...compare} />)).toContain('no change');
    expect(renderToStaticMarkup(<CompareStrip {...compare} zeroWord="no difference" />)).not.toContain('no change');
  });

  it('draws no difference when the comparison is refused', () => {
    const refused: CompareStripProps = {
      ...compare,
      outcome: { kind: 'refused', reason: 'the two tests differ in method.' },
    };
    const html = renderToStaticMarkup(<CompareStrip {...refused} />);
    expect(html).toContain('6.9');
    expect(html).toContain('6.6');
    expect(html).toContain('No difference is given: the two tests differ in method.');
    expect(html).not.toContain('\u22120.3');
    expect(html).not.toContain('no change');
  });
});

describe('Dumbbell', () => {
  const props = {
    analyte: ph,
    before: { takenOn: '2025-04-11', value: 6.9, printed: '6.9', low: 6.64, high: 7.16 },
    after: { takenOn: '2026-04-14', value: 6.6, printed: '6.6', low: 6.34, high: 6.86 },
    intended: { low: 6.15, high: 6.65 },
  };
  it('draws an arrow head only for a clear change', () => {
    const heads = (clear: boolean) =>
      renderToStaticMarkup(<Dumbbell {...props} changeIsClear={clear} />).match(/<path d="M-?14 /g)?.length ?? 0;
    expect(heads(true)).toBe(1);
    expect(heads(false)).toBe(0);
  });
});

describe('SmallMultiples', () => {
  it('keeps the order given and says each finding in words', () => {
    const html = renderToStaticMarkup(
      <SmallMultiples
        title="All analytes"
        from="2022-01-01"
        asOf="2026-06-01"
        amendments={sulfur}
        series={[
          { analyte: potassium, points: [], band: null },
          { analyte: ph, points: phHistory, band: phBand },
        ]}
      />,
    );
    expect(html).not.toContain('style=');
    expect(html.indexOf('Potassium')).toBeLessThan(html.indexOf('pH went from'));
    expect(html).toContain('No confirmed Potassium test yet.');
    expect(html).toContain('Spread: Sulfur 9 lb on 2 May 2024');
  });
});
