export type ParsedNumber =
  | { ok: true; value: number; text: string; unit: string }
  | { ok: false; reason: 'empty' | 'not_a_number' | 'ambiguous_separators' };

/**
 * Reads a number as people type it: "6,4", "6.4", "1 500", "1,500.5", "12 lb". A single comma is a decimal sign
 * unless three digits and nothing else follow a leading group ("1,500" could be either, so it is asked about).
 * `text` is the number in the form the API takes; `unit` is whatever letters followed it.
 */
export function parseNumber(typed: string): ParsedNumber {
  const trimmed = typed.trim().replace(/\u2212/g, '-');
  if (trimmed === '') return { ok: false, reason: 'empty' };
  const match = /^([+-]?)([\d.,\s\u00a0\u202f']*\d[.,]?)\s*([^\d\s.,+-][^\d]*\d?)?$/u.exec(trimmed);
  const digits = match?.[2];
  if (!match || digits === undefined) return { ok: false, reason: 'not_a_number' };
  const plain = toPlain(digits.replace(/[\s\u00a0\u202f']/g, ''));
  if (!plain.ok) return plain;
  const text = `${match[1] === '-' ? '-' : ''}${plain.text}`;
  const value = Number(text);
  if (!Number.isFinite(value)) return { ok: false, reason: 'not_a_number' };
  return { ok: true, value, text, unit: (match[3] ?? '').trim() };
}

type Plain = { ok: true; text: string } | { ok: false; reason: 'not_a_number' | 'ambiguous_separators' };

function toPlain(digits: string): Plain {
  const commas = digits.split(',').length - 1;
  const points = digits.split('.').length - 1;
  if (commas === 0 && points <= 1) return tidy(digits);
  if (commas === 1 && points === 0) {
    // "0,500" and "12,5" can only be decimals; "1,500" might be fifteen hundred.
    if (/^[1-9]\d{0,2},\d{3}$/.test(digits)) return { ok: false, reason: 'ambiguous_separators' };
    return tidy(digits.replace(',', '.'));
  }
  if (/^\d{1,3}(,\d{3})+(\.\d*)?$/.test(digits)) return tidy(digits.replaceAll(',', ''));
  if (/^\d{1,3}(\.\d{3})+(,\d*)?$/.test(digits)) return tidy(digits.replaceAll('.', '').replace(',', '.'));
  return { ok: false, reason: 'not_a_number' };
}

function tidy(text: string): Plain {
  const body = text.replace(/\.$/, '');
  return { ok: true, text: body.startsWith('.') ? `0${body}` : body };
}

/** What a number field holds, as the API takes it; what cannot be read goes as typed, and the schema says why not. */
export function numberText(typed: string | undefined): string {
  const read = parseNumber(typed ?? '');
  return read.ok ? read.text : (typed ?? '').trim();
}

export const numberReason: Record<'empty' | 'not_a_number' | 'ambiguous_separators', string> = {
  empty: 'Enter a number.',
  not_a_number: 'This is not a number Loamline can read. Write it like 6.4 or 6,4.',
  ambiguous_separators: 'This could be read two ways. Write 1500 for fifteen hundred, or 1.5 for one and a half.',
};
