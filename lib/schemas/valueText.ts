import type { Qualifier } from '@/lib/domain/analytes';

export type ValueText =
  | { ok: true; printed: string; value: string | null; qualifier: Qualifier }
  | { ok: false; reason: 'not-a-value' | 'ambiguous' };

const SIGNS: ReadonlyMap<string, Qualifier> = new Map([
  ['<', '<'],
  ['≤', '<'],
  ['<=', '<'],
  ['>', '>'],
  ['≥', '>'],
  ['>=', '>'],
]);

const plainNumber = (digits: string): string | null => {
  const text = digits.replace(/[\s\u00a0\u202f']/g, '').replace('\u2212', '-');
  if (/^-?(\d+\.?\d*|\.\d+)$/.test(text)) return text;
  if (/^-?\d+,\d+$/.test(text)) return text.replace(',', '.');
  if (/^-?\d{1,3}(,\d{3}){2,}(\.\d+)?$/.test(text) || /^-?\d{1,3}(,\d{3})+\.\d+$/.test(text))
    return text.replaceAll(',', '');
  if (/^-?\d{1,3}(\.\d{3})+,\d+$/.test(text)) return text.replaceAll('.', '').replace(',', '.');
  return null;
};

/**
 * Reads a value cell as people type or paste it: "6.4", "6,4", "<0.1", "nd", "trace", "". The sign and its limit stay
 * together; an empty cell is a value not given, never nothing found. "1,500" can be read two ways and is asked about.
 */
export function readValueText(typed: string): ValueText {
  const printed = typed.trim();
  if (printed === '') return { ok: true, printed, value: null, qualifier: '=' };
  if (/^(n\.?d\.?|bdl|not detected|none detected)$/i.test(printed))
    return { ok: true, printed, value: null, qualifier: 'nd' };
  if (/^(trace|tr\.?)$/i.test(printed)) return { ok: true, printed, value: null, qualifier: 'trace' };
  const match = /^(<=|>=|[<>≤≥])?\s*(.*?)\s*%?$/u.exec(printed);
  const digits = match?.[2] ?? '';
  if (/^-?[1-9]\d{0,2},\d{3}$/.test(digits)) return { ok: false, reason: 'ambiguous' };
  const number = plainNumber(digits);
  if (number === null || !Number.isFinite(Number(number)) || digits.length > 20)
    return { ok: false, reason: 'not-a-value' };
  return {
    ok: true,
    printed,
    value: number.replace(/\.$/, '').replace(/^(-?)\./, '$10.'),
    qualifier: SIGNS.get(match?.[1] ?? '') ?? '=',
  };
}

export const VALUE_TEXT_REASONS: Record<'not-a-value' | 'ambiguous', string> = {
  'not-a-value': 'This is not a value. Write it like 6.4, <0.1, nd or trace.',
  ambiguous: 'This could be read two ways. Write 1500 for fifteen hundred, or 1.5 for one and a half.',
};
