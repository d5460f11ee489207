import { ANALYTES, isMethodKey, methodLabel, unitOf } from '@/lib/domain/analytes';

const LABELS: ReadonlyMap<string, string> = new Map(ANALYTES.map((entry) => [entry.key, entry.label]));

export const analyteLabel = (key: string): string => LABELS.get(key) ?? key;

type Band = {
  readonly analyte: string;
  readonly low: string | null;
  readonly high: string | null;
  readonly unit: string | null;
  readonly method: string | null;
};

const trimmed = (decimal: string) => (decimal.includes('.') ? decimal.replace(/\.?0+$/, '') : decimal);

/** "6 to 6.5", "up to 30 mg/kg": a pH needs no unit behind it. */
export function bandText({ low, high, unit }: Band): string {
  const label = unit === null || unit === 'pH' ? '' : ` ${unitOf(unit)?.label ?? unit}`;
  if (low !== null && high !== null) return `${trimmed(low)} to ${trimmed(high)}${label}`;
  if (high !== null) return `up to ${trimmed(high)}${label}`;
  return low === null ? 'no band' : `from ${trimmed(low)}${label}`;
}

export function methodText({ method }: Pick<Band, 'method'>): string {
  if (method === null) return 'any method';
  return isMethodKey(method) ? methodLabel(method) : method;
}
