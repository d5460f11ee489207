/**
 * Words that stand around a number on a report. The same letter can be a rating or an element ("H", "M", "S", "B"):
 * position decides, never the letter alone, and a rating belongs to the laboratory that printed it.
 */
export type Qualifier = '=' | '<' | '>' | 'nd' | 'trace';

export const QUALIFIERS: readonly {
  readonly key: Qualifier;
  readonly label: string;
  readonly spellings: readonly string[];
}[] = [
  { key: '=', label: 'measured', spellings: [] },
  { key: '<', label: 'below', spellings: ['<', '≤', 'less than', 'below'] },
  { key: '>', label: 'above', spellings: ['>', '≥', 'more than', 'greater than', 'over'] },
  {
    key: 'nd',
    label: 'not detected',
    spellings: [
      'ND',
      'N.D.',
      'nd',
      'BDL',
      'B.D.L.',
      'not detected',
      'none detected',
      '<LOD',
      '<MDL',
      '<RL',
      'below detection',
    ],
  },
  { key: 'trace', label: 'trace', spellings: ['trace', 'Trace', 'tr', 'Tr.', 'tr.'] },
];

/** Cells that say "not analysed": they give no row. */
export const NOT_ANALYSED: readonly string[] = [
  '',
  '-',
  '--',
  '---',
  '–',
  '—',
  'n/a',
  'N/A',
  'NA',
  'N.A.',
  'NT',
  'N.T.',
  'not tested',
  'not requested',
  'not analyzed',
  'not analysed',
  'NR',
  '*',
  '**',
  '#N/A',
  '.',
  '. .',
  'none requested',
];

type RatingClass = 'very_low' | 'low' | 'medium' | 'optimum' | 'high' | 'very_high' | 'excessive';

/** Rating words, without bare digits and without letters that are more often something else. */
export const RATINGS: readonly {
  readonly key: RatingClass;
  readonly label: string;
  readonly spellings: readonly string[];
}[] = [
  {
    key: 'very_low',
    label: 'very low',
    spellings: ['VL', 'V L', 'VLow', 'Very Low', 'Very Deficient', 'Deficient', 'Def'],
  },
  {
    key: 'low',
    label: 'low',
    spellings: ['L', 'L-', 'L+', 'Low', 'Insufficient', 'Marginal', 'Below Optimum', 'Below'],
  },
  { key: 'medium', label: 'medium', spellings: ['M', 'M-', 'M+', 'Med', 'Medium', 'Moderate', 'Mod', 'MR'] },
  {
    key: 'optimum',
    label: 'optimum',
    spellings: [
      'O',
      'OPT',
      'Opt',
      'Optimum',
      'Optimal',
      'Ideal',
      'Sufficient',
      'Suff',
      'SUF',
      'S',
      'Adequate',
      'A',
      'OK',
      'Good',
      'Normal',
      'In range',
    ],
  },
  { key: 'high', label: 'high', spellings: ['H', 'H-', 'H+', 'High', 'Above Optimum', 'Above Opt', 'AO', 'Above'] },
  { key: 'very_high', label: 'very high', spellings: ['VH', 'V H', 'VHi', 'Very High'] },
  {
    key: 'excessive',
    label: 'excessive',
    spellings: ['EH', 'EX', 'E', 'Ex', 'Excessive', 'Excess', 'Excessively High', 'Toxic', 'Very Excessive'],
  },
];
