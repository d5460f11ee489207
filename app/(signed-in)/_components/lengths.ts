import { numberText } from '@/lib/ui/fields/parse-number';

/** Exact by definition. */
const METRES_PER_FOOT = 0.3048;

export type LengthUnit = 'ft' | 'm';
export const lengthUnit = (units: 'us' | 'metric'): LengthUnit => (units === 'us' ? 'ft' : 'm');

/** As it stands in a field: at most one decimal. */
export function shownLength(metres: number, unit: LengthUnit): string {
  const value = unit === 'ft' ? metres / METRES_PER_FOOT : metres;
  return String(Math.round(value * 10) / 10);
}

/** What a field holds, in metres; text that is no number goes on as it is, and the schema says so at the field. */
export function typedMetres(text: string | undefined, unit: LengthUnit): number | string {
  const typed = numberText(text);
  const value = Number(typed);
  if (typed === '' || !Number.isFinite(value)) return typed;
  return Math.round((unit === 'ft' ? value * METRES_PER_FOOT : value) * 1000) / 1000;
}
