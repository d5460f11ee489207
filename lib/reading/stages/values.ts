import { NOT_ANALYSED, QUALIFIERS, type Qualifier, RATINGS, type UnitKey } from '@/lib/domain/analytes';
import { unitOnly } from '../labels/label';

export type Value = {
  readonly kind: 'value';
  readonly printed: string;
  readonly value: number | null;
  readonly qualifier: Qualifier;
  readonly rating: string | null;
  readonly unit: UnitKey | null;
  readonly unitPrinted: string | null;
  /** Characters of the phrase that are the number: from, to. */
  readonly span: readonly [number, number];
  readonly doubtful: string | null;
};

export type CellMeaning =
  | Value
  | { readonly kind: 'none' }
  | { readonly kind: 'range' }
  | { readonly kind: 'rating'; readonly rating: string }
  | { readonly kind: 'date' }
  | { readonly kind: 'text' };

/** How this document writes its numbers. */
export type NumberStyle = { readonly decimalComma: boolean };

const RATING_WORDS: ReadonlyMap<string, string> = new Map(
  RATINGS.flatMap((rating) => rating.spellings.map((word): [string, string] => [word.toLowerCase(), word])),
);
const NONE = new Set(NOT_ANALYSED.map((text) => text.toLowerCase()));
const WORD_QUALIFIERS = QUALIFIERS.filter((entry) => entry.key === 'nd' || entry.key === 'trace').flatMap((entry) =>
  entry.spellings.map((spelling): [string, Qualifier] => [spelling.toLowerCase(), entry.key]),
);

const DATE =
  /^(\d{1,4}[/.-]\d{1,2}[/.-]\d{1,4}|\d{1,2}[ -][A-Za-z]{3,9}\.?,?[ -]\d{2,4}|[A-Za-z]{3,9}\.? \d{1,2},? \d{4})$/;
const RANGE = /^\(?[<>]?\s*\d[\d.,]*\s*(?:-|–|—|to)\s*\d[\d.,]*\s*\)?\s*(%|[a-zA-Z/]+\d*)?$/i;
const NUMBER =
  /^(?<sign><|>|≤|≥|less than|more than|greater than)?\s*(?<digits>[-−+]?(?:\d{1,3}(?:[ ,]\d{3})+(?:\.\d+)?|\d{1,3}(?:\.\d{3})+,\d+|\d*[.,]?\d+))(?<plus>\+)?(?<rest>(?![\d.,:/]).*)?$/i;

/** True when the text is a rating word ("VH", "Above Optimum") and nothing else. */
export function ratingIn(text: string): string | null {
  const bare = text.replace(/[()*]/g, '').trim();
  return bare !== '' && RATING_WORDS.has(bare.toLowerCase()) ? bare : null;
}

/** Decimal comma or point, from the numbers of the whole document that can be only one of the two. */
export function numberStyle(texts: Iterable<string>): NumberStyle {
  let comma = 0;
  let point = 0;
  for (const text of texts) {
    if (/^[<>]?\s?\d+,(\d{1,2}|\d{4,})$/.test(text) || /^\d{1,3}(\.\d{3})+,\d+$/.test(text)) comma += 1;
    if (/^[<>]?\s?\d*\.(\d{1,2}|\d{4,})$/.test(text) || /^\d{1,3}(,\d{3})+(\.\d+)?$/.test(text)) point += 1;
  }
  return { decimalComma: comma > point };
}

function decimal(digits: string, style: NumberStyle): { value: number; doubtful: string | null } | null {
  let plain = digits.replace(/−/g, '-').replace(/ /g, '');
  let doubtful: string | null = null;
  if (style.decimalComma) {
    if (/^-?\d{1,3}\.\d{3}$/.test(plain)) doubtful = 'The point may part thousands or decimals.';
    if (plain.includes(',')) plain = plain.replace(/\./g, '').replace(',', '.');
  } else if (/,/.test(plain)) {
    if (/^-?\d{1,3}(,\d{3})+(\.\d+)?$/.test(plain)) plain = plain.replace(/,/g, '');
    else {
      plain = plain.replace(',', '.');
      doubtful = 'A comma stands where this report writes a point.';
    }
  }
  const value = Number(plain);
  return plain === '' || !Number.isFinite(value) ? null : { value, doubtful };
}

type Tail = { rating: string | null; unit: UnitKey | null; unitPrinted: string | null };

/** What may follow the number in its own cell: a rating, a unit, a footnote mark, or unit and rating. */
function tailOf(rest: string): Tail | null {
  const text = rest.replace(/[*†‡§^↑↓→←↗↘▲▼△▽●○■□]+\d?/g, '').trim();
  const aside = /^(.*?)\s*\(([^()]{1,40})\)$/.exec(text);
  if (aside !== null && ratingIn(text) === null && unitOnly(text) === null) {
    const before = tailOf(aside[1] ?? '');
    const rating = ratingIn(aside[2] ?? '');
    const unit = before?.unit == null ? unitOnly(aside[2] ?? '') : null;
    return before === null
      ? null
      : {
          rating: before.rating ?? rating,
          unit: before.unit ?? unit?.unit ?? null,
          unitPrinted: before.unitPrinted ?? unit?.printed ?? null,
        };
  }
  if (text === '') return { rating: null, unit: null, unitPrinted: null };
  const rating = ratingIn(text);
  if (rating !== null) return { rating, unit: null, unitPrinted: null };
  const unit = unitOnly(text);
  if (unit !== null) return { rating: null, unit: unit.unit, unitPrinted: unit.printed };
  const words = text.split(' ');
  for (let cut = 1; cut < words.length; cut++) {
    const [left, right] = [words.slice(0, cut).join(' '), words.slice(cut).join(' ')];
    const first = unitOnly(left);
    const last = ratingIn(right);
    const [rated, after] = [ratingIn(left), unitOnly(right)];
    if (rated !== null && after !== null) return { rating: rated, unit: after.unit, unitPrinted: after.printed };
    if (first !== null && last !== null) return { rating: last, unit: first.unit, unitPrinted: first.printed };
  }
  return null;
}

/** No number with its sign, unit and rating is longer; a longer text is not looked through for one. */
export const LONGEST_CELL = 200;

/** What one cell says. A "+" glued to a rating letter ("221H+") is the rating's; after bare digits it means "or more". */
export function readCell(raw: string, style: NumberStyle): CellMeaning {
  if (raw.length > LONGEST_CELL) return { kind: 'text' };
  const bracketed = /^\((.+)\)$/.exec(raw.trim());
  if (bracketed !== null && /^[<>]?\s?\d/.test(bracketed[1] ?? '')) {
    const inside = readCell(bracketed[1] ?? '', style);
    if (inside.kind === 'value' && inside.unit !== null) {
      const at = raw.indexOf('(') + 1;
      return { ...inside, span: [inside.span[0] + at, inside.span[1] + at] };
    }
  }
  const text = raw.trim();
  const lower = text.toLowerCase();
  const word = WORD_QUALIFIERS.find(([spelling]) => spelling === lower);
  if (word !== undefined) {
    return {
      kind: 'value',
      printed: text,
      value: null,
      qualifier: word[1],
      rating: null,
      unit: null,
      unitPrinted: null,
      span: [0, raw.length],
      doubtful: null,
    };
  }
  if (NONE.has(lower)) return { kind: 'none' };
  if (DATE.test(text)) return { kind: 'date' };
  if (RANGE.test(text)) return { kind: 'range' };
  const rating = ratingIn(text);
  if (rating !== null) return { kind: 'rating', rating };
  const match = NUMBER.exec(text);
  const groups = match?.groups;
  if (groups === undefined) return { kind: 'text' };
  const digits = groups.digits ?? '';
  const number = decimal(digits, style);
  const rest = groups.rest ?? '';
  const tail = tailOf(rest);
  if (number === null || tail === null) return { kind: 'text' };
  const sign = groups.sign ?? '';
  const below = sign === '<' || sign === '≤' || /less/i.test(sign);
  const qualifier: Qualifier = below ? '<' : sign !== '' || groups.plus !== undefined ? '>' : '=';
  const end = text.length - rest.length;
  const glued = rest !== '' && !rest.startsWith(' ');
  const printed = glued ? text.slice(0, end) + (rest.split(' ')[0] ?? '') : text.slice(0, end).trim();
  const lead = raw.indexOf(text);
  return {
    kind: 'value',
    printed,
    value: number.value,
    qualifier,
    ...tail,
    span: [lead, lead + end],
    doubtful: number.doubtful,
  };
}
