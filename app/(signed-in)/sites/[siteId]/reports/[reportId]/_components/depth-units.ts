/** Exact by definition. */
const CM_PER_INCH = 2.54;

export type DepthUnit = 'in' | 'cm';
export const depthUnit = (units: 'us' | 'metric'): DepthUnit => (units === 'us' ? 'in' : 'cm');

/** As it stands in a field: at most two decimals, none that say nothing. */
export function shownDepth(cm: string | null, unit: DepthUnit): string {
  if (cm === null) return '';
  const value = unit === 'in' ? Number(cm) / CM_PER_INCH : Number(cm);
  return String(Math.round(value * 100) / 100);
}

/** In centimetres; the text itself when it is no number, so that the refusal can be said at the field. */
export function typedDepth(text: string, unit: DepthUnit): { ok: true; cm: number | null } | { ok: false } {
  const typed = text
    .trim()
    .replace(',', '.')
    .replace(/\s*(in|cm|inches|")$/i, '');
  if (typed === '') return { ok: true, cm: null };
  if (!/^\d+(\.\d+)?$|^\.\d+$/.test(typed)) return { ok: false };
  const value = Number(typed) * (unit === 'in' ? CM_PER_INCH : 1);
  return { ok: true, cm: Math.round(value * 1000) / 1000 };
}
