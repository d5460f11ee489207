import type { LengthUnit } from './types';

const METRES_PER_FOOT = 0.3048;
const SQUARE_METRES_PER_SQUARE_FOOT = METRES_PER_FOOT * METRES_PER_FOOT;

export function lengthText(metres: number, unit: LengthUnit): string {
  return `${lengthNumber(metres, unit)} ${unit}`;
}

/** As it stands in a field: at most two decimals, none that are zero. */
export function lengthNumber(metres: number, unit: LengthUnit): string {
  return String(Number((unit === 'ft' ? metres / METRES_PER_FOOT : metres).toFixed(2)));
}

export function areaText(squareMetres: number, unit: LengthUnit): string {
  const value = unit === 'ft' ? squareMetres / SQUARE_METRES_PER_SQUARE_FOOT : squareMetres;
  const rounded = value < 100 ? Number(value.toFixed(1)) : Math.round(value);
  return `${rounded.toLocaleString('en-US')} ${unit === 'ft' ? 'sq ft' : 'm²'}`;
}

export type ReadLength =
  | { readonly ok: true; readonly metres: number }
  | { readonly ok: false; readonly reason: 'not-a-length' };

/** "12.5", "12,5", "41 ft", "12 m": a unit typed in wins over the unit of the field. */
export function readLength(typed: string, unit: LengthUnit): ReadLength {
  const found = /^\s*(\d+(?:[.,]\d+)?|[.,]\d+)\s*(ft|feet|foot|'|m|metres?|meters?)?\s*$/i.exec(typed);
  if (!found?.[1]) return { ok: false, reason: 'not-a-length' };
  const value = Number(found[1].replace(',', '.'));
  const named = found[2]?.toLowerCase();
  const feet = named === undefined ? unit === 'ft' : named.startsWith('f') || named === "'";
  return { ok: true, metres: feet ? value * METRES_PER_FOOT : value };
}

/** The day with its month in letters, so that nobody reads it the other way round. */
export function dayText(isoDate: string): string {
  const [year, month, day] = isoDate.split('-').map(Number);
  if (!year || !month || !day) return isoDate;
  const date = new Date(Date.UTC(year, month - 1, day));
  return date.toLocaleDateString('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' });
}
