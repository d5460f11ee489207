import { type AnalyteKey, analyte } from '../analytes';

/** Numbers and names as the sentences write them. */
export type Speaker = {
  readonly name: string;
  /** A size without sign, with its unit ("0.46", "38 mg/kg"). */
  readonly size: (value: number) => string;
  readonly value: (value: number) => string;
};

const PH_DECIMALS = 2;
const TWO_FIGURES = 10;

/** pH gets one decimal more than it is printed with, because differences of 0.05 count; others below 10 too. */
export function speakerFor(key: AnalyteKey, unit: string): Speaker {
  const { label, decimals } = analyte(key);
  const isPh = analyte(key).unit === 'pH';
  const digits = (value: number): string =>
    value.toFixed(isPh ? PH_DECIMALS : Math.abs(value) >= TWO_FIGURES ? decimals : decimals + 1);
  const withUnit = (value: number): string =>
    isPh ? digits(value) : `${digits(value)}${unit === '%' ? ' %' : ` ${unit}`}`;
  return { name: isPh ? 'pH' : label, size: (value) => withUnit(Math.abs(value)), value: withUnit };
}

export const verbFor = (change: number): 'rose' | 'fell' => (change < 0 ? 'fell' : 'rose');
export const nounFor = (change: number): 'rise' | 'fall' => (change < 0 ? 'fall' : 'rise');

/** "0.32 to 0.60" seen in the direction of `direction`, or "between a rise of … and a fall of …" across zero. */
export function intervalInWords(lo: number, hi: number, direction: number, speaker: Speaker): string {
  const crosses = lo < 0 && hi > 0;
  if (!crosses) {
    const [near, far] = [Math.abs(lo), Math.abs(hi)].sort((a, b) => a - b);
    return `${speaker.size(near ?? 0)} to ${speaker.size(far ?? 0)}`;
  }
  const against = direction < 0 ? hi : lo;
  const along = direction < 0 ? lo : hi;
  return `between a ${nounFor(against)} of ${speaker.size(against)} and a ${nounFor(along)} of ${speaker.size(along)}`;
}

export const listInWords = (items: readonly string[]): string =>
  items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1) ?? ''}`;
