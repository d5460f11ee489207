import { type CellMeaning, LONGEST_CELL, type NumberStyle, readCell } from '../stages/values';

const SCIENCE = /^([<>]\s*)?(\d+(?:[.,]\d+)?)[eE]([+-]?\d{1,2})$/;
const NONE_FOUND =
  /^(?:nd|n\.d\.|bdl|b\.d\.l\.|u|not detected|<? ?(?:lod|mdl|rl|dl))\s*[:(]?\s*(<\s*)?(\d*[.,]?\d+)\s*\)?$/i;
const LIMIT_FIRST = /^(<\s*\d*[.,]?\d+)\s*\(?(?:nd|bdl|u)\)?$/i;

function numberIn(text: string, style: NumberStyle): number | null {
  const meaning = readCell(text.replace(/\s/g, ''), style);
  return meaning.kind === 'value' ? meaning.value : null;
}

/** Ways of writing a number that only data files have, put as a page would print them; null when it is none of them. */
function plain(text: string): string | null {
  if (/^[<>]?\s*\d{1,3}(?:['’]\d{3})+(?:[.,]\d+)?$/.test(text)) return text.replace(/['’]/g, '');
  if (/^[<>]?\s*\d{1,3}(?:[ \u202f]\d{3})+,\d+$/.test(text)) return text.replace(/[ \u202f]/g, '');
  const after = /^(\d*[.,]?\d+)\s*([<>])$/.exec(text);
  if (after !== null) return `${after[2]}${after[1]}`;
  const words = /^(below|under|above|over)\s+(\d*[.,]?\d+)$/i.exec(text);
  if (words !== null) return `${/below|under/i.test(words[1] ?? '') ? '<' : '>'}${words[2]}`;
  const estimated = /^[~≈]?\s*([<>]?\s*\d*[.,]?\d+)(?:\s*(?:J|est\.?|\^|\*+|±\s*[\d.,]+))?$/.exec(text);
  return estimated !== null && estimated[1] !== text ? (estimated[1] ?? null) : null;
}

/** What one cell of a data file says: as on a page, and in the further ways that data files have. */
export function readTableCell(text: string, style: NumberStyle): CellMeaning {
  const direct = readCell(text, style);
  if (direct.kind !== 'text' || text.length > LONGEST_CELL) return direct;
  const bare = {
    kind: 'value',
    printed: text,
    rating: null,
    unit: null,
    unitPrinted: null,
    span: [0, text.length],
    doubtful: null,
  } as const;
  const science = SCIENCE.exec(text);
  if (science !== null) {
    const value = Number(`${(science[2] ?? '').replace(',', '.')}e${science[3]}`);
    const qualifier = science[1]?.startsWith('<') ? '<' : science[1] === undefined ? '=' : '>';
    return { ...bare, value, qualifier };
  }
  const limit = NONE_FOUND.exec(text)?.[2] ?? LIMIT_FIRST.exec(text)?.[1]?.replace('<', '');
  if (limit !== undefined) return { ...bare, value: numberIn(limit, style), qualifier: 'nd' };
  const other = plain(text);
  if (other === null) return direct;
  const meaning = readCell(other, style);
  return meaning.kind === 'value' ? { ...meaning, printed: text } : direct;
}
