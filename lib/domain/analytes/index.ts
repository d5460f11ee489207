import { ANALYTE_ROWS, type AnalyteGroup, type AnalyteKey } from './list';
import { type AnalyteMethod, methodsOf } from './methods';
import spellings from './spellings.json';
import type { UnitKey } from './units';

export { ANALYTE_GROUPS, ANALYTE_KEYS, type AnalyteGroup, type AnalyteKey, isAnalyteKey } from './list';
export {
  type AnalyteMethod,
  isMethodKey,
  METHODS,
  type MethodKey,
  methodLabel,
  methodsOf,
} from './methods';
export { isUnitKey, UNITS, type UnitKey, unitOf } from './units';
export { NOT_ANALYSED, QUALIFIERS, type Qualifier, RATINGS } from './words';

export type Analyte = {
  readonly key: AnalyteKey;
  /** Words for people. */
  readonly label: string;
  readonly symbol: string;
  readonly group: AnalyteGroup;
  /** The usual unit: what charts and comparisons use when nothing else is chosen. */
  readonly unit: UnitKey;
  /** Decimals a laboratory usually prints in that unit. */
  readonly decimals: number;
  /** Words and symbols that reports use. */
  readonly spellings: readonly string[];
  readonly methods: readonly AnalyteMethod[];
  /** Widest believable range in `unit` over all methods that share that unit; null for words. */
  readonly plausible: readonly [number, number] | null;
  /** Where the range comes from. */
  readonly source: string;
};

function rangeIn(methods: readonly AnalyteMethod[], unit: string): readonly [number, number] | null {
  let range: [number, number] | null = null;
  for (const method of methods) {
    if (method.plausible === null || method.plausibleUnit !== unit || method.key === 'total') continue;
    const [low, high] = method.plausible;
    range = range === null ? [low, high] : [Math.min(range[0], low), Math.max(range[1], high)];
  }
  return range;
}

/** Every analyte in display order. */
export const ANALYTES: readonly Analyte[] = ANALYTE_ROWS.map(([key, label, symbol, group, unit, decimals]) => {
  const methods = methodsOf(key);
  return {
    key,
    label,
    symbol,
    group,
    unit,
    decimals,
    spellings: spellings[key],
    methods,
    plausible: rangeIn(methods, unit),
    source: methods[0]?.source ?? 'No published range is recorded.',
  };
});

const BY_KEY: ReadonlyMap<AnalyteKey, Analyte> = new Map(ANALYTES.map((entry) => [entry.key, entry]));

/** The registry entry of a key. Every key of the union has one; a missing one is a programming error. */
export function analyte(key: AnalyteKey): Analyte {
  const entry = BY_KEY.get(key);
  if (entry === undefined) throw new Error(`No analyte ${key}.`);
  return entry;
}
