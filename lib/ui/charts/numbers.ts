const MINUS = '\u2212';

/** 6.3, −0.4: a true minus sign, a fixed number of decimals, never "−0.0". */
export function formatNumber(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? `${MINUS}${text}` : text;
}

/** +0.4, −0.4, 0.0 */
export function formatSigned(value: number, decimals: number): string {
  const text = formatNumber(value, decimals);
  return value > 0 && Number(text) !== 0 ? `+${text}` : text;
}

/** "0.32 to 0.60"; with an open side "0.32 or more". */
export function formatRange(low: number | null, high: number | null, decimals: number, signed = false): string {
  const write = signed ? formatSigned : formatNumber;
  if (low === null && high === null) return 'anything';
  if (low === null) return `${write(high ?? 0, decimals)} or less`;
  if (high === null) return `${write(low, decimals)} or more`;
  return `${write(low, decimals)} to ${write(high, decimals)}`;
}

/** A change is finer than the values it comes from, except where those are whole numbers. */
export function changeDecimals(analyte: { readonly decimals: number }): number {
  return analyte.decimals === 0 ? 0 : analyte.decimals + 1;
}

/** "6.3", "41 ppm" */
export function withUnit(text: string, unit: string): string {
  return unit === '' ? text : `${text} ${unit}`;
}

/** Milliseconds of an ISO day at midnight UTC; days have no zone, so none is applied. */
export function dayMs(isoDay: string): number {
  return Date.parse(`${isoDay.slice(0, 10)}T00:00:00Z`);
}

export function isoDay(ms: number): string {
  return new Date(ms).toISOString().slice(0, 10);
}

/** "3 May 2026": the month in letters, whatever the reader's habit of day and month. */
export function formatDay(isoDayText: string, locale = 'en-GB'): string {
  return new Intl.DateTimeFormat(locale, { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' }).format(
    new Date(dayMs(isoDayText)),
  );
}
