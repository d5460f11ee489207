import type { ChartAnalyte, DriftAmendment, DriftPoint, TargetBand } from './types';

/** Invented values for the gallery and the tests beside the charts. */
export const ph: ChartAnalyte = { label: 'pH', unit: '', isPh: true, decimals: 1 };
export const potassium: ChartAnalyte = { label: 'Potassium', unit: 'ppm', isPh: false, decimals: 0 };
export const boron: ChartAnalyte = { label: 'Boron', unit: 'ppm', isPh: false, decimals: 1 };

export const phBand: TargetBand = { low: 6, high: 6.8, label: '6.0 to 6.8', source: 'your own target for onions' };

const common = {
  qualifier: 'exact',
  method: 'water, 1:1',
  laboratory: 'Fenwick Soil Desk',
  depth: '0 to 6 in',
  breakBefore: null,
} as const;

export function phPoint(id: string, takenOn: string, value: number, breakBefore: string | null = null): DriftPoint {
  return {
    ...common,
    id,
    takenOn,
    value,
    printed: value.toFixed(1),
    low: Number((value - 0.26).toFixed(2)),
    high: Number((value + 0.26).toFixed(2)),
    breakBefore,
  };
}

export const phHistory: readonly DriftPoint[] = [
  phPoint('p1', '2022-04-12', 7.4),
  phPoint('p2', '2023-04-09', 7.3),
  phPoint('p3', '2024-04-15', 7.3),
  phPoint('p4', '2025-04-11', 6.9),
  phPoint('p5', '2026-04-14', 6.6),
];

/** The laboratory changed its method after 2024. */
export const phBroken: readonly DriftPoint[] = phHistory.map((p) => {
  if (p.id === 'p4')
    return {
      ...p,
      method: 'calcium chloride',
      value: 6.3,
      printed: '6.3',
      low: 6.04,
      high: 6.56,
      breakBefore: 'methods differ',
    };
  return p.id === 'p5' ? { ...p, method: 'calcium chloride', value: 6.1, printed: '6.1', low: 5.84, high: 6.36 } : p;
});

export const sulfur: readonly DriftAmendment[] = [
  { id: 'a1', on: '2024-05-02', label: 'Sulfur 9 lb', detail: 'on 1,200 sq ft, worked in 6 in deep' },
  { id: 'a2', on: '2025-05-06', label: 'Sulfur 6 lb', detail: 'on 1,200 sq ft, worked in 6 in deep' },
];

export const manyAmendments: readonly DriftAmendment[] = [
  ...sulfur,
  { id: 'a3', on: '2022-10-20', label: 'Compost 2 in' },
  { id: 'a4', on: '2023-05-03', label: 'Potassium sulfate 4 lb' },
  { id: 'a5', on: '2025-05-20', label: 'Borax 2 oz', detail: 'mixed into 6 lb of sand' },
  { id: 'a6', on: '2025-10-18', label: 'Compost 1 in' },
];

export const boronBand: TargetBand = { low: 0.8, high: 1.5, label: '0.8 to 1.5', source: 'your own target for onions' };

export const boronHistory: readonly DriftPoint[] = [
  {
    ...common,
    id: 'b1',
    takenOn: '2023-04-09',
    value: 0.1,
    printed: '< 0.1',
    qualifier: 'below',
    low: null,
    high: null,
    method: 'hot water',
  },
  {
    ...common,
    id: 'b2',
    takenOn: '2024-04-15',
    value: 0.1,
    printed: '< 0.1',
    qualifier: 'below',
    low: null,
    high: null,
    method: 'hot water',
  },
  {
    ...common,
    id: 'b3',
    takenOn: '2025-04-11',
    value: 0.4,
    printed: '0.4',
    low: 0.26,
    high: 0.62,
    method: 'hot water',
  },
  { ...common, id: 'b4', takenOn: '2026-04-14', value: 0.9, printed: '0.9', low: 0.58, high: 1.4, method: 'hot water' },
];

export function ppmHistory(prefix: string, values: readonly number[], spread = 0.12): readonly DriftPoint[] {
  return values.map((value, i) => ({
    ...common,
    id: `${prefix}${i}`,
    takenOn: `${2022 + i}-04-1${i}`,
    value,
    printed: String(value),
    low: Math.round(value * (1 - spread)),
    high: Math.round(value * (1 + spread)),
    method: 'Mehlich-3',
  }));
}
