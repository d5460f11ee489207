import { describe, expect, it } from 'vitest';
import { compareForms } from './compareForms';

const row = (id: string, analyte: string, printed: string) => ({
  id,
  analyte,
  unit: 'mg/kg',
  form: null,
  value: printed,
  qualifier: '=' as const,
  printed,
  state: 'proposed' as const,
});

describe('a data file held against its page', () => {
  const page = [row('p', 'phosphorus', '52'), row('k', 'potassium', '188'), row('z', 'zinc', '2.1')];
  const file = [row('P', 'phosphorus', '52'), row('K', 'potassium', '150'), row('Z', 'zinc', '2.4')];
  const above = [row('a', 'phosphorus', '40'), row('b', 'potassium', '150'), row('c', 'zinc', '1.8')];

  it('says of a cell that differs which side repeats the sample above it', () => {
    const told = (found: ReturnType<typeof compareForms>) => found.differences.map((one) => [one.analyte, one.repeats]);
    expect(told(compareForms(page, file, { here: above, there: above }))).toEqual([
      ['potassium', 'there'],
      ['zinc', null],
    ]);
    expect(told(compareForms(file, page, { here: above, there: above }))[0]).toEqual(['potassium', 'here']);
    expect(told(compareForms(page, file))).toEqual([
      ['potassium', null],
      ['zinc', null],
    ]);
  });
});
