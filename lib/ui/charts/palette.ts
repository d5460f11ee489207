/**
 * Colours of the charts, as plain hex: a chart is also exported as a picture, where the page's style sheet does not reach.
 * Series colours are used in this order, always together with a marker shape, a dash and a label.
 */
export const INK = {
  chalk: '#FBF7F0',
  silt: '#EFE7DA',
  humus: '#211A16',
  clay: '#5A4E45',
  fallow: '#85776A',
  gley: '#1D4E63',
  gleyWash: '#DDE9EC',
  redHorizon: '#7E2D10',
} as const;

export type MarkerShape = 'circle' | 'square' | 'triangle' | 'diamond' | 'cross' | 'ring';

export interface SeriesStyle {
  readonly name: string;
  readonly colour: string;
  readonly marker: MarkerShape;
  /** SVG dash pattern; empty = solid. */
  readonly dash: string;
}

const FIRST: SeriesStyle = { name: 'deep water', colour: '#0C3455', marker: 'circle', dash: '' };

export const SERIES: readonly SeriesStyle[] = [
  FIRST,
  { name: 'burnt ochre', colour: '#BE6028', marker: 'square', dash: '6 3' },
  { name: 'rain', colour: '#3F96BE', marker: 'triangle', dash: '2 3' },
  { name: 'red horizon', colour: '#7E2D10', marker: 'diamond', dash: '8 3 2 3' },
  { name: 'heather', colour: '#7E5D6F', marker: 'cross', dash: '1 3' },
  { name: 'humus', colour: '#211A16', marker: 'ring', dash: '' },
];

/** Style of the n-th series; after the sixth the list starts again. */
export function seriesStyle(index: number): SeriesStyle {
  return SERIES[index % SERIES.length] ?? FIRST;
}
