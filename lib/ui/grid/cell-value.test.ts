import { describe, expect, it } from 'vitest';
import { faultOf, isEditable, tidyValue } from './cell-value';
import type { GridColumn } from './types';

const number: GridColumn = { id: 'value', header: 'Value', kind: 'number' };
const unit: GridColumn = {
  id: 'unit',
  header: 'Unit',
  kind: 'select',
  options: [
    { value: 'mg/kg', label: 'ppm' },
    { value: 'lb/acre', label: 'lb/acre' },
  ],
};

describe('faultOf', () => {
  it.each(['6.4', '6,4', '<0.1', '< 0.1', '>= 200', '1,234.5', '.5', 'nd', 'n.d.', 'trace', ''])(
    'takes %j',
    (value) => {
      expect(faultOf(number, value)).toBeNull();
    },
  );

  it.each(['6.4.1', 'six', '6 4', '--', '12 lb/acre'])('refuses %j with a sentence', (value) => {
    expect(faultOf(number, value)).toMatch(/Write it like/);
  });

  it('wants one of the choices', () => {
    expect(faultOf(unit, 'mg/kg')).toBeNull();
    expect(faultOf(unit, 'furlong')).toMatch(/pick one/);
  });

  it('asks the column first when it has a check of its own', () => {
    expect(faultOf({ ...number, validate: () => 'no' }, '6.4')).toBe('no');
  });
});

describe('tidyValue', () => {
  it('trims and takes the label of a choice for its value', () => {
    expect(tidyValue(number, ' 6.4 ')).toBe('6.4');
    expect(tidyValue(unit, 'PPM')).toBe('mg/kg');
    expect(tidyValue(unit, 'furlong')).toBe('furlong');
  });
});

describe('isEditable', () => {
  it('is off for a locked grid, row or column', () => {
    const row = { id: 'r', cells: {} };
    expect(isEditable(number, row, false)).toBe(true);
    expect(isEditable(number, row, true)).toBe(false);
    expect(isEditable(number, { ...row, readOnly: true }, false)).toBe(false);
    expect(isEditable({ ...number, kind: 'readonly' }, row, false)).toBe(false);
    expect(isEditable(number, undefined, false)).toBe(false);
  });
});
