const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

export type DateOrder = 'day-first' | 'month-first' | 'unknown';

export type ReadDate =
  | { readonly ok: true; readonly iso: string; readonly assumed: boolean }
  | { readonly ok: false; readonly reason: 'unreadable' | 'impossible' | 'ambiguous' };

const NUMERIC = /(\d{1,4})[/.-](\d{1,2})[/.-](\d{1,4})/;
const NAMED_DAY_FIRST = /(\d{1,2})(?:st|nd|rd|th)?[ .-]+([A-Za-z]{3,9})\.?,?[ .-]+(\d{2,4})/;
const NAMED_MONTH_FIRST = /([A-Za-z]{3,9})\.? (\d{1,2})(?:st|nd|rd|th)?,? (\d{2,4})/;

/** A day in any spelling, anywhere in a text. */
export const ANY_DATE = new RegExp(`${NAMED_DAY_FIRST.source}|${NAMED_MONTH_FIRST.source}|${NUMERIC.source}`);

function iso(year: number, month: number, day: number): ReadDate {
  if (year < 1950 || year > 2100 || month < 1 || month > 12 || day < 1) return { ok: false, reason: 'impossible' };
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  const days = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1] ?? 0;
  if (day > days) return { ok: false, reason: 'impossible' };
  const two = (number: number) => String(number).padStart(2, '0');
  return { ok: true, iso: `${year}-${two(month)}-${two(day)}`, assumed: false };
}

/** Four printed digits are the year as printed ("0023" stays impossible); two digits from 70 on are of the last century. */
function yearOf(text: string): number {
  if (text.length !== 2) return Number(text);
  return Number(text) >= 70 ? 1900 + Number(text) : 2000 + Number(text);
}

function monthOf(name: string): number {
  return MONTHS.indexOf(name.slice(0, 3).toLowerCase()) + 1;
}

/** Which part of "3/4/2024" is the day, from dates of the same document that can be only one way. */
export function dateOrder(texts: Iterable<string>): DateOrder {
  let dayFirst = 0;
  let monthFirst = 0;
  for (const text of texts) {
    for (const match of text.matchAll(new RegExp(NUMERIC, 'g'))) {
      if ((match[1] ?? '').length > 2) continue;
      if (Number(match[1]) > 12) dayFirst += 1;
      if (Number(match[2]) > 12) monthFirst += 1;
    }
  }
  return dayFirst > monthFirst ? 'day-first' : monthFirst > dayFirst ? 'month-first' : 'unknown';
}

/**
 * A printed day as an ISO date. With an unknown order and both parts below 13 there is no answer, except when both are
 * the same number.
 */
export function readDate(text: string, order: DateOrder): ReadDate {
  const dayNamed = NAMED_DAY_FIRST.exec(text);
  if (dayNamed !== null && monthOf(dayNamed[2] ?? '') > 0) {
    return iso(yearOf(dayNamed[3] ?? ''), monthOf(dayNamed[2] ?? ''), Number(dayNamed[1]));
  }
  const monthNamed = NAMED_MONTH_FIRST.exec(text);
  if (monthNamed !== null && monthOf(monthNamed[1] ?? '') > 0) {
    return iso(yearOf(monthNamed[3] ?? ''), monthOf(monthNamed[1] ?? ''), Number(monthNamed[2]));
  }
  const match = NUMERIC.exec(text);
  if (match === null) return { ok: false, reason: 'unreadable' };
  const [first, second, third] = [match[1] ?? '', match[2] ?? '', match[3] ?? ''];
  if (first.length === 4) return iso(Number(first), Number(second), Number(third));
  const year = yearOf(third);
  const [a, b] = [Number(first), Number(second)];
  if (a > 12 || order === 'day-first') return iso(year, b, a);
  if (b > 12 || order === 'month-first') return iso(year, a, b);
  if (a === b) return iso(year, a, b);
  return { ok: false, reason: year < 1950 || year > 2100 ? 'impossible' : 'ambiguous' };
}
