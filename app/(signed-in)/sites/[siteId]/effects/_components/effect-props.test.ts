import { describe, expect, it } from 'vitest';
import { type ControlPlot, checkEffect, REFUSALS } from '@/lib/domain/effects';
import { asPlotId } from '@/lib/domain/ids';
import { effectInput, intent, testPoint } from '@/tests/support/test-points';
import {
  checkAnalyte,
  dumbbellProps,
  type Judged,
  meantWords,
  notesOf,
  refusalBoxProps,
  secondReading,
  spreadWords,
  stripProps,
  verdictProps,
} from './effect-props';
import { helpFor } from './refusal-help';
import { controlWords, noiseSize, whyFacts } from './why-facts';

const before = testPoint('a', '2025-04-10', 7.3);
const after = testPoint('a', '2026-04-11', 6.6);
const wall: ControlPlot = {
  plotId: asPlotId('wall'),
  name: 'Wall bed',
  tests: [testPoint('wall', '2025-04-10', 7.0), testPoint('wall', '2026-04-11', 7.0)],
  events: [],
};
const ph = checkAnalyte({ analyte: 'soil_ph_water', analyteLabel: 'Soil pH (in water)', decimals: 1 }, 'pH');

function judged(more: Partial<Parameters<typeof effectInput>[0]> = {}): Judged {
  const outcome = checkEffect(effectInput({ tests: [before, after], ...more }));
  if (!outcome.ok) throw new Error(outcome.sentence);
  return outcome;
}

describe('a verdict with an untreated plot', () => {
  const outcome = judged({ controls: [wall], siteTests: [before, after, ...wall.tests] });

  it('says that it is compared, and shows the reading without beside it', () => {
    expect(verdictProps(outcome).comparedWith).toBe('compared with the untreated plots');
    const second = secondReading(outcome);
    // One control costs more than it gives here, so the domain's own words lead to the other reading.
    expect(second?.lead).toMatch(/Without them:$/);
    expect(second?.reading.withControls).toBe(false);
    expect(second?.line.sentence).not.toContain('untreated');
  });

  it('keeps each sentence in one place', () => {
    const elsewhere = [verdictProps(outcome).sentence, secondReading(outcome)?.line.sentence, outcome.settle[0]?.text];
    for (const note of notesOf(outcome)) {
      for (const said of elsewhere) if (said) expect(note).not.toContain(said);
    }
    expect(notesOf(outcome).join(' ')).toContain('Wall bed');
  });

  it('tells which plots were used', () => {
    expect(outcome.controls.map(controlWords)).toEqual(['used']);
    expect(controlWords({ plotId: asPlotId('x'), name: 'X', used: false, why: 'other-laboratory' })).toBe(
      'not used: sent to another laboratory',
    );
  });
});

describe('a verdict without one', () => {
  const outcome = judged();

  it('claims no comparison and no second reading', () => {
    expect(verdictProps(outcome).comparedWith).toBeUndefined();
    expect(secondReading(outcome)).toBeNull();
  });

  it('marks the part of the plan that was due, once that differs from the plan by a tenth', () => {
    // Seven warm months of twelve (April to October) and a part of April have passed: less than all has reacted.
    expect(outcome.reactedShare).toBeLessThan(0.9);
    expect(stripProps(outcome, ph)).toMatchObject({ plannedWord: 'due', planned: outcome.intended });
    expect(stripProps({ ...outcome, planned: outcome.intended * 1.05 }, ph).plannedWord).toBeUndefined();
  });

  it('draws the tests as read, and where the later one was meant to land', () => {
    const ranges = new Map([[before.resultId as string, { low: 7.0, high: 7.6 }]]);
    const drawn = dumbbellProps(outcome, ph, ranges, null);
    expect(drawn?.before).toMatchObject({ value: 7.3, printed: '7.3', low: 7.0, high: 7.6 });
    expect(drawn?.after).toMatchObject({ value: 6.6, printed: '6.6', low: null });
    // Half to one and a half times the change that was due, from the earlier value, downwards.
    expect(drawn?.intended.high).toBeCloseTo(7.3 + 0.5 * outcome.intended, 6);
    expect(drawn?.intended.low).toBeCloseTo(7.3 + 1.5 * outcome.intended, 6);
  });

  it('draws no arrow while the interval holds no change, and nothing for a value known only against a limit', () => {
    const open = { ...outcome, reading: { ...outcome.reading, changeLo: -0.4, changeHi: 0.1 } };
    expect(dumbbellProps(open, ph, new Map(), null)?.changeIsClear).toBe(false);
    const low = { ...outcome, after: { ...outcome.after, qualifier: 'below' as const } };
    expect(dumbbellProps(low, ph, new Map(), null)).toBeNull();
  });

  it('gives the reasons: plan, reacted share, correction, noise', () => {
    const terms = Object.fromEntries(whyFacts(outcome, ph).map((fact) => [fact.term, fact.said]));
    expect(terms['Planned in full']).toBe('−0.80');
    expect(terms['Correction of the earlier value']).toBe('none');
    expect(terms['Spread of what was planned']).toBeUndefined();
    const short = judged({ intents: [intent(-0.8, '2025-04-15', { plannedAmount: 10, spreadAmount: 9 })] });
    expect(whyFacts(short, ph).find((fact) => fact.term === 'Spread of what was planned')?.said).toBe('90 %');
  });

  it('writes noise in pH, and in per cent on the log scale', () => {
    expect(noiseSize({ variance: 0.0144 }, outcome.reading, ph)).toBe('0.12');
    const ppm = { label: 'Potassium', unit: 'mg/kg', isPh: false, decimals: 0 };
    expect(noiseSize({ variance: 0.0144 }, { ...outcome.reading, scale: 'log' }, ppm)).toBe('12 %');
  });
});

describe('no verdict', () => {
  it('names the days on which a test can judge', () => {
    const waiting = checkEffect(effectInput({ tests: [before], intents: [intent(-0.8, '2026-10-15')] }));
    if (waiting.ok) throw new Error('nothing was tested since');
    const box = refusalBoxProps(waiting, 1);
    expect(box.refusal).toBe('waiting for the after-test');
    expect(box.help).toMatch(/^a sample taken from \d+ \w+ 2027 on and by 15 October 2028\.$/);
  });

  it('shows both values where there are two', () => {
    const salt = testPoint('a', '2026-04-11', 6.2, { method: '0.01M_CaCl2' });
    const refused = checkEffect(effectInput({ tests: [before, salt] }));
    if (refused.ok) throw new Error('these may not be compared');
    expect(refusalBoxProps(refused, 1).values?.map((value) => value.printed)).toEqual(['7.3', '6.2']);
  });

  it('has a word of help for every reason', () => {
    for (const reason of REFUSALS) expect(helpFor({ reason })).toMatch(/^[a-z].*\.$/);
  });
});

describe('what was spread and meant', () => {
  const applications = [
    { id: '1', material: 'Sulfur', amountPrinted: '9 lb', appliedOn: '2025-04-20', fullChange: -0.5 },
    { id: '2', material: 'Sulfur', amountPrinted: '4 lb', appliedOn: '2025-05-02', fullChange: -0.2 },
  ];
  it('adds up what is judged together', () => {
    expect(meantWords({ analyte: 'soil_ph_water', decimals: 1, applications })).toBe(
      'Meant: −0.70 once all has reacted',
    );
    expect(
      meantWords({
        analyte: 'organic_matter',
        decimals: 1,
        applications: [
          { id: '3', material: 'Compost', amountPrinted: '80 lb', appliedOn: '2025-04-20', fullChange: 1.5 },
        ],
      }),
    ).toBe('Meant: +1.5 % once all has reacted');
    expect(spreadWords({ applications })).toBe('Sulfur, 9 lb, on 20 Apr 2025; Sulfur, 4 lb, on 2 May 2025');
  });
});
