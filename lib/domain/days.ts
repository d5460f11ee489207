/**
 * Calendar days as text, 'YYYY-MM-DD', in the proleptic Gregorian calendar. No clock and no time zone: a day is what the
 * grower wrote on the bag.
 *
 * Purpose: check, count and shift days without the platform's date object, whose default is the machine's zone.
 * Method: days are counted from 1970-01-01 with the civil-day arithmetic of H. Hinnant, "chrono-Compatible Low-Level Date
 * Algorithms" (2013). Valid from year 1583 to 9999.
 * Errors: `parseDay` answers `{ ok: false, reason: 'not-a-day' }`; `asDay` throws, for constants and checked boundaries.
 * Worked example: 1970-01-01 is number 0 and 2000-03-01 is number 11017.
 */
declare const dayBrand: unique symbol;
export type Day = string & { readonly [dayBrand]: true };

type Civil = { readonly year: number; readonly month: number; readonly day: number };

const monthLength = (year: number, month: number): number => {
  if (month === 2) return (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0 ? 29 : 28;
  return month === 4 || month === 6 || month === 9 || month === 11 ? 30 : 31;
};

/** Checks a text; the calendar decides, so 2026-02-29 is no day. */
export function parseDay(text: string): { ok: true; day: Day } | { ok: false; reason: 'not-a-day' } {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(text);
  if (!match) return { ok: false, reason: 'not-a-day' };
  const [year, month, day] = [Number(match[1]), Number(match[2]), Number(match[3])];
  const fits = year >= 1583 && month >= 1 && month <= 12 && day >= 1 && day <= monthLength(year, month);
  return fits ? { ok: true, day: text as Day } : { ok: false, reason: 'not-a-day' };
}

export function asDay(text: string): Day {
  const parsed = parseDay(text);
  if (!parsed.ok) throw new RangeError(`"${text}" is not a day of the form YYYY-MM-DD.`);
  return parsed.day;
}

export const civil = (day: Day): Civil => ({
  year: Number(day.slice(0, 4)),
  month: Number(day.slice(5, 7)),
  day: Number(day.slice(8, 10)),
});

const fromCivil = ({ year, month, day }: Civil): Day =>
  asDay(`${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`);

/** Days since 1970-01-01. */
export function dayNumber(day: Day): number {
  const { year, month, day: dayOfMonth } = civil(day);
  const shifted = month <= 2 ? year - 1 : year;
  const era = Math.floor(shifted / 400);
  const yearOfEra = shifted - era * 400;
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + dayOfMonth - 1;
  return (
    era * 146_097 + yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear - 719_468
  );
}

export function dayFromNumber(number: number): Day {
  const shifted = number + 719_468;
  const era = Math.floor(shifted / 146_097);
  const dayOfEra = shifted - era * 146_097;
  const yearOfEra = Math.floor(
    (dayOfEra - Math.floor(dayOfEra / 1460) + Math.floor(dayOfEra / 36_524) - Math.floor(dayOfEra / 146_096)) / 365,
  );
  const dayOfYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthIndex = Math.floor((5 * dayOfYear + 2) / 153);
  const month = monthIndex < 10 ? monthIndex + 3 : monthIndex - 9;
  const day = dayOfYear - Math.floor((153 * monthIndex + 2) / 5) + 1;
  return fromCivil({ year: yearOfEra + era * 400 + (month <= 2 ? 1 : 0), month, day });
}

export const addDays = (day: Day, count: number): Day => dayFromNumber(dayNumber(day) + count);

/** From `from` to `to`, negative when `to` is earlier. */
export const daysBetween = (from: Day, to: Day): number => dayNumber(to) - dayNumber(from);

/** Whole months on; the 31st becomes the last day of a shorter month. */
export function addMonths(day: Day, count: number): Day {
  const { year, month, day: dayOfMonth } = civil(day);
  const index = year * 12 + (month - 1) + count;
  const target = { year: Math.floor(index / 12), month: (((index % 12) + 12) % 12) + 1 };
  return fromCivil({ ...target, day: Math.min(dayOfMonth, monthLength(target.year, target.month)) });
}

/** 1 on 1 January. 29 February counts as 28 February so that the same day of two years has the same number. */
export function dayOfYear(day: Day): number {
  const { year, month, day: dayOfMonth } = civil(day);
  const leap = monthLength(year, 2) === 29 && (month > 2 || dayOfMonth === 29) && month >= 2 ? 1 : 0;
  return daysBetween(fromCivil({ year, month: 1, day: 1 }), day) + 1 - leap;
}

const monthNames = 'January February March April May June July August September October November December'.split(' ');

/** "10 April 2026", the form used in sentences. */
export function dayInWords(day: Day): string {
  const { year, month, day: dayOfMonth } = civil(day);
  return `${dayOfMonth} ${monthNames[month - 1] ?? ''} ${year}`;
}
