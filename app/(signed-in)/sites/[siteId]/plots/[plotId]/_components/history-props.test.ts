import { describe, expect, it } from 'vitest';
import type { HistoryAnswer, SeriesAnswer } from '@/lib/schemas/history';
import { breakWords, chosenSeries, driftProps, fileSlug, firstDay, miniSeries, papersOf } from './history-props';

type Point = SeriesAnswer['points'][number];

const point = (id: string, takenOn: string, value: number, more: Partial<Point> = {}): Point => ({
  id,
  takenOn,
  value,
  unit: 'pH',
  printed: value.toFixed(1),
  qualifier: 'exact',
  low: value - 0.3,
  high: value + 0.3,
  method: '1:1 soil to water',
  laboratory: 'Millbrook Soil Office',
  depth: '0–6 in',
  breakBefore: null,
  reportId: `report-${takenOn}`,
  ...more,
});

const series = (analyte: string, label: string, points: Point[], more: Partial<SeriesAnswer> = {}): SeriesAnswer => ({
  analyte,
  label,
  unit: '',
  isPh: true,
  decimals: 1,
  points,
  band: { low: 6, high: 6.5, label: '6 to 6.5, Vegetables', source: 'a publisher, a title' },
  trend: [],
  ...more,
});

const ph = series('soil_ph_water', 'Soil pH (in water)', [
  point('a', '2025-04-12', 7.3),
  point('b', '2026-04-11', 6.8, { breakBefore: 'The method changed here, so the line is not joined.', reportId: null }),
]);
const potassium = series('potassium', 'Potassium', [point('k', '2025-04-12', 210, { printed: '210' })], {
  unit: 'mg/kg',
  isPh: false,
  decimals: 0,
  band: null,
});
const history: HistoryAnswer = {
  today: '2026-12-01',
  plot: { id: 'plot-1', name: 'Café bed / north' },
  series: [ph, potassium],
  amendments: [
    { id: 's', on: '2024-10-20', label: 'Elemental sulfur, 90 %, prilled, 9 lb', detail: '9 lb over 646 sq ft' },
  ],
};

describe('chosenSeries', () => {
  it('takes what the address asks for, else pH, else what there is', () => {
    expect(chosenSeries(history.series, 'potassium')?.analyte).toBe('potassium');
    expect(chosenSeries([potassium, ph], null)?.analyte).toBe('soil_ph_water');
    expect(chosenSeries([potassium, ph], 'zinc')?.analyte).toBe('soil_ph_water');
    expect(chosenSeries([potassium], null)?.analyte).toBe('potassium');
    expect(chosenSeries([], 'potassium')).toBeUndefined();
  });
});

describe('driftProps', () => {
  const props = driftProps(history, ph, { siteId: 'site-1', siteName: 'Hill Field' });

  it('leads each point to its report where it has one', () => {
    expect(props.points.map((one) => one.href)).toEqual(['/sites/site-1/reports/report-2025-04-12', undefined]);
  });

  it('puts the reason of a break into words that stand inside a sentence', () => {
    expect(props.points.map((one) => one.breakBefore)).toEqual([null, 'the method changed here']);
    expect(breakWords('These two tests cannot be compared, so the line is not joined.')).toBe(
      'these two tests cannot be compared',
    );
  });

  it('says the amount of an application once', () => {
    expect(props.amendments[0]).toMatchObject({
      label: 'Elemental sulfur, 90 %, prilled, 9 lb',
      detail: 'over 646 sq ft',
    });
  });

  it('names files so that any system takes them', () => {
    expect(props.fileName).toBe('cafe-bed-north-ph-in-water');
    expect(fileSlug('///')).toBe('plot');
  });
});

describe('the other layers', () => {
  it('begins the time axis at the first test or application', () => {
    expect(firstDay(history)).toBe('2024-10-20');
    expect(firstDay({ ...history, series: [], amendments: [] })).toBe('2026-12-01');
  });

  it('leads each small chart to its large one, with room for the figures of the band only', () => {
    expect(miniSeries(history, 'site-1').map((mini) => [mini.href, mini.band?.label])).toEqual([
      ['?analyte=soil_ph_water', '6 to 6.5'],
      ['?analyte=potassium', undefined],
    ]);
  });

  it('lists each report once, newest first, with how much of it belongs here', () => {
    const later = series('zinc', 'Zinc', [point('z', '2026-04-11', 3, { reportId: 'report-new' })]);
    expect(papersOf({ series: [ph, potassium, later] })).toEqual([
      { reportId: 'report-new', days: ['2026-04-11'], values: 1 },
      { reportId: 'report-2025-04-12', days: ['2025-04-12'], values: 2 },
    ]);
  });
});
