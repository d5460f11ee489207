import { describe, expect, it } from 'vitest';
import { areaText, depthText, fieldErrors, readFields, toAreaM2, toDepthCm } from './application-body';
import { type IntentRow, readIntents, type Suggestion, suggestionWords, typedSuggestion } from './intents';

const typed = { material: 'gypsum', amount: '5,5', amountUnit: 'lb', appliedOn: '2026-04-20' };

describe('readFields', () => {
  it('turns feet and inches into what the API takes (1 ft = 0.3048 m, 1 in = 2.54 cm, 1959)', () => {
    const read = readFields({ ...typed, areaM2: '1000', depthCm: '6', note: '  ' }, [], 'us');
    if (!read.ok) throw new Error('this can be read');
    expect(read.body).toMatchObject({ material: { key: 'gypsum' }, amount: 5.5, amountUnit: 'lb' });
    expect(read.body.areaM2).toBeCloseTo(92.90304, 8);
    expect(read.body.depthCm).toBeCloseTo(15.24, 10);
    expect('note' in read.body || 'plannedAmount' in read.body).toBe(false);
  });

  it('takes metric as it is typed, and lets what is below nothing through for the API to refuse', () => {
    const read = readFields({ ...typed, areaM2: '60', depthCm: '-3' }, [], 'metric');
    expect(read.ok && [read.body.areaM2, read.body.depthCm]).toEqual([60, -3]);
    expect([toAreaM2(-1, 'us'), toDepthCm(-1, 'us')]).toEqual([-1, -1]);
  });

  it('sends a figure that was left alone back whole', () => {
    const kept = { areaM2: 61.2345, depthCm: 15 };
    const shown = { areaM2: areaText(61.2345, 'us'), depthCm: depthText(15, 'us') };
    const read = readFields({ ...typed, ...shown }, [], 'us', kept);
    expect(read.ok && [read.body.areaM2, read.body.depthCm]).toEqual([61.2345, 15]);
    const changed = readFields({ ...typed, ...shown, areaM2: '600' }, [], 'us', kept);
    expect(changed.ok && changed.body.areaM2).toBeCloseTo(600 * 0.3048 ** 2, 8);
  });

  it('shows large areas without a sign that could be a decimal comma', () => {
    expect(areaText(toAreaM2(1500, 'us'), 'us')).toBe('1500');
  });

  it('says what is missing or cannot be read, at its field', () => {
    const read = readFields({ ...typed, material: 'own', amount: 'a lot', 'material.name': ' ' }, [], 'us');
    expect(read.ok ? {} : Object.keys(read.errors).sort()).toEqual(['amount', 'material.name']);
    expect(readFields({ ...typed, material: '' }, [], 'us')).toMatchObject({
      ok: false,
      errors: { material: expect.any(String) },
    });
  });

  it('carries an own material with how it acts and on what', () => {
    const read = readFields(
      { ...typed, material: 'own', 'material.name': 'Wood ash', 'material.reaction': 'lime' },
      ['potassium'],
      'us',
    );
    expect(read.ok && read.body.material).toEqual({ name: 'Wood ash', reaction: 'lime', affects: ['potassium'] });
    const unknown = readFields(
      { ...typed, material: 'own', 'material.name': 'Seaweed', 'material.reaction': '' },
      [],
      'us',
    );
    expect(unknown.ok && unknown.body.material).toEqual({ name: 'Seaweed', reaction: null, affects: [] });
  });
});

const suggestion: Suggestion = {
  analyte: 'soil_ph_water',
  unit: 'pH',
  likely: -0.4615,
  low: -0.277,
  high: -0.766,
  source: 'A publisher, a title',
  weakSource: false,
};
const row = (key: number, more: Partial<IntentRow>): IntentRow => ({
  key,
  analyte: '',
  typed: '',
  from: null,
  ...more,
});

describe('readIntents', () => {
  it('keeps range and source with a suggestion that was taken as it is', () => {
    const read = readIntents([
      row(0, { analyte: 'soil_ph_water', typed: typedSuggestion(suggestion), from: suggestion }),
    ]);
    expect(read.ok && read.intents).toEqual([
      {
        analyte: 'soil_ph_water',
        unit: 'pH',
        fullChange: -0.46,
        low: -0.277,
        high: -0.766,
        source: 'A publisher, a title',
      },
    ]);
  });

  it('makes a changed suggestion the grower’s own', () => {
    const read = readIntents([row(0, { analyte: 'soil_ph_water', typed: '-0.3', from: suggestion })]);
    expect(read.ok && read.intents[0]).toMatchObject({ fullChange: -0.3, low: null, source: 'typed by the grower' });
  });

  it('leaves an empty row out, remembers which rows were sent, and asks about a half-filled one', () => {
    const read = readIntents([row(0, {}), row(4, { analyte: 'potassium', typed: '45' })]);
    expect(read.ok && [read.keys, read.intents[0]?.unit]).toEqual([[4], 'mg/kg']);
    expect(readIntents([row(2, { typed: '45' })])).toMatchObject({
      errors: { 'intents.2.analyte': expect.any(String) },
    });
    expect(readIntents([row(2, { analyte: 'potassium' })])).toMatchObject({
      errors: { 'intents.2.fullChange': expect.any(String) },
    });
  });

  it('gives the sentences of the API to the rows they came from', () => {
    const fields = {
      'intents.0.fullChange': 'A change of nothing cannot be checked.',
      amount: 'Give the amount spread.',
    };
    expect(fieldErrors(fields, [4])).toEqual({
      'intents.4.fullChange': 'A change of nothing cannot be checked.',
      amount: 'Give the amount spread.',
    });
    expect(fieldErrors({ 'intents.0.unit': 'Too long.' }, [1])).toEqual({ 'intents.1.fullChange': 'Too long.' });
  });
});

describe('suggestionWords', () => {
  it('gives the range from low to high with its middle', () => {
    expect(suggestionWords(suggestion)).toEqual({ label: 'pH in water', range: '−0.77 to −0.28, middle −0.46' });
    expect(
      suggestionWords({ ...suggestion, analyte: 'potassium', unit: 'mg/kg', likely: 38.4, low: 30.2, high: 49.6 }),
    ).toEqual({ label: 'Potassium', range: '+30 to +50 mg/kg, middle +38 mg/kg' });
  });
});
