import { describe, expect, it } from 'vitest';
import { hasHidden, plainReading, plainText } from './plain';
import type { Reading, ReadResult } from './types';

const result: ReadResult = {
  analyte: 'soil_ph_water',
  label: 'Soil\u202e pH',
  printed: '6.\u00004',
  value: Number.POSITIVE_INFINITY,
  qualifier: '=',
  unit: 'pH',
  unitPrinted: '\u0007',
  form: null,
  method: null,
  methodPrinted: null,
  rating: 'low\ud800',
  primary: true,
  page: 1,
  box: [0, 0, Number.NaN, 1],
  cell: null,
  confidence: Number.NaN,
  doubts: [{ code: 'odd', sentence: 'Reads \u2066"x".' }],
};
const reading: Reading = {
  file: 'a.csv',
  kind: 'soil',
  error: null,
  pages: 0,
  warnings: [],
  lab: { name: 'Marsh\u001b Lane' },
  samples: [
    {
      sampleId: 'x'.repeat(5_000),
      labNumber: null,
      fieldName: null,
      depth: { top: 0, bottom: Number.POSITIVE_INFINITY, unit: 'in' },
      dateSampled: null,
      dateSampledPrinted: null,
      dateReported: null,
      dateReportedPrinted: null,
      results: [result],
    },
  ],
  recommendations: [],
};

describe('plainReading', () => {
  it('leaves nothing hidden, endless or not a number', () => {
    const plain = plainReading(reading, true);
    const [sample] = plain.samples;
    expect(sample?.results[0]).toMatchObject({
      label: 'Soil pH',
      printed: '6. 4',
      value: null,
      unitPrinted: '',
      rating: 'low',
      box: null,
      confidence: 0,
      doubts: [{ code: 'odd', sentence: 'Reads "x".' }],
    });
    expect([plain.lab.name, sample?.sampleId?.length, sample?.depth]).toEqual(['Marsh Lane', 1_000, null]);
    expect(plain.warnings.map((warning) => warning.code)).toEqual(['hidden-characters']);
    expect(plainReading(reading, false).warnings).toEqual([]);
  });
  it('knows hidden characters from those that people write', () => {
    expect(['a\u0000', 'a\u202e', 'a\u2069', '\ud800a', 'a\udfff'].filter((text) => !hasHidden(text))).toEqual([]);
    expect(['Früh-\u00adbeet', 'a\tb\nc', '\ud83c\udf31 bed', 'Ca²⁺ µg', '\u05d0'].filter(hasHidden)).toEqual([]);
    expect(plainText('\ud83c\udf31 bed')).toBe('\ud83c\udf31 bed');
  });
});
