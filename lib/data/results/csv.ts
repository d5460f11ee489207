/** A cell that is only a number stays one, minus sign included; nothing else may look like a formula to a spreadsheet. */
const NUMBER = /^-?\d+(\.\d+)?$/;
const FORMULA = /^[=+\-@\t\r]/;

export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  const text = String(value);
  if (NUMBER.test(text)) return text;
  const safe = FORMULA.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** RFC 4180, with the mark that lets spreadsheets see UTF-8. */
export const toCsv = (rows: readonly (readonly (string | number | null)[])[]): string =>
  `\ufeff${rows.map((row) => `${row.map(csvCell).join(',')}\r\n`).join('')}`;
