import { describe, expect, it } from 'vitest';
import { basisDoubts } from './basis';
import type { HistoryValue } from './history';

const value = (analyte: HistoryValue['analyte'], printed: string, over: Partial<HistoryValue> = {}): HistoryValue => ({
  analyte,
  printed,
  value: Number(printed),
  qualifier: '=',
  unit: 'mg/kg',
  method: null,
  form: null,
  ...over,
});
const ph = (printed: string) => value('soil_ph_water', printed, { unit: 'pH' });
const codes = (rows: readonly HistoryValue[], name: string | null = 'North') => {
  const found = basisDoubts(name, rows);
  return Object.fromEntries(
    rows.flatMap((row) => (found.get(row) ?? []).map((doubt) => [row.analyte, doubt.code] as const)),
  );
};

describe('a number per acre of light soil', () => {
  const density = (printed: string) => value('density', printed, { unit: 'g/cm3' });
  const potassium = value('potassium', '240', { unit: 'lb/acre' });
  it('is asked about by density, or by the sample’s name where there is none', () => {
    expect(codes([density('0.3'), potassium, value('zinc', '2')])).toEqual({ potassium: 'area-unit-light-soil' });
    expect(codes([potassium], 'Potting mix A')).toEqual({ potassium: 'area-unit-light-soil' });
  });
  it('is not for mineral soil, whatever the plot is called', () => {
    expect(codes([density('1.2'), potassium], 'Potting mix B')).toEqual({});
    expect(codes([potassium], 'Potting shed bed')).toEqual({});
    expect(codes([potassium], null)).toEqual({});
  });
});

describe('shares that are of the bases only', () => {
  const share = (key: HistoryValue['analyte'], printed: string, over: Partial<HistoryValue> = {}) =>
    value(key, printed, { unit: '%', ...over });
  const three = [share('sat_k', '5'), share('sat_ca', '75.2'), share('sat_mg', '19.9')];
  it('are asked about on an acid soil', () => {
    expect(codes([ph('5.9'), ...three])).toEqual({
      sat_k: 'shares-of-bases',
      sat_ca: 'shares-of-bases',
      sat_mg: 'shares-of-bases',
    });
  });
  it('are not when the page names the acidity or the method, adds to less, or the soil holds no acidity', () => {
    for (const rows of [
      [ph('7.2'), ...three],
      [ph('5.9'), ...three, share('sat_h', '12')],
      [ph('5.9'), ...three.map((row) => ({ ...row, method: 'of_bases' as const }))],
      [ph('5.9'), share('sat_k', '5'), share('sat_ca', '61'), share('sat_mg', '16')],
      three,
    ]) {
      expect(codes(rows)).toEqual({});
    }
  });
});

describe('a base saturation that is not bases over capacity', () => {
  const meq = (key: HistoryValue['analyte'], printed: string) => value(key, printed, { unit: 'meq/100g' });
  const saturation = value('base_saturation', '85', { unit: '%' });
  it('is asked about', () => {
    // (5 + 1 + 0.4) / 12 = 53 %
    const rows = [meq('cec', '12'), meq('calcium', '5'), meq('magnesium', '1'), meq('potassium', '0.4'), saturation];
    expect(codes(rows)).toEqual({ base_saturation: 'saturation-apart' });
    expect([...basisDoubts(null, rows).values()].flat()[0]?.sentence).toContain('make 53 %');
  });
  it('is not within rounding, or where the page lacks a base', () => {
    // 1700 / 200.4 + 146 / 121.5 + 156 / 391 = 10.08 of 12 = 84 %
    const ppm = [value('calcium', '1700'), value('magnesium', '146'), value('potassium', '156')];
    expect(codes([meq('cec', '12'), ...ppm, saturation])).toEqual({});
    expect(codes([meq('cec', '12'), meq('calcium', '5'), meq('magnesium', '1'), saturation])).toEqual({});
  });
});
