import { assemble } from './assemble';
import { type Identity, remark, type SamplePart } from './candidate';
import { clean } from './labels/normal';
import { NO_RESULTS } from './readPages';
import { ANY_DATE } from './stages/dates';
import type { Statements } from './stages/sections';
import { type NumberStyle, numberStyle } from './stages/values';
import { decode } from './table/decode';
import { dateText } from './table/fields';
import { gridOf, unwrapped } from './table/grid';
import { joinSamples } from './table/joinSamples';
import { materialByNumbers, materialOf } from './table/material';
import { readSheet, type SheetReading, type Untaken, untakenOf } from './table/sheet';
import type { Sheet } from './table/types';
import { type Reading, type Remark, refusedReading } from './types';

export const MAX_ROWS = 20_000;
export const MAX_COLUMNS = 1_000;

export type { Sheet, Untaken };

/** What the reader saw of a data file, kept so that a person can see why a number was taken or left. */
export type TableTrace = {
  readonly sheets: readonly SheetReading[];
  /** Every number that is no result, with the reason. */
  readonly untaken: readonly Untaken[];
};

const TOO_LARGE = (what: string) =>
  remark('table-too-large', `This file has more than ${what}. It is kept; cut it into smaller files and upload those.`);
const BINARY = remark(
  'not-text',
  'This file is named as a data file but holds no text. It is kept; save it again as CSV or upload the PDF.',
);
const EMPTY = remark('empty', 'This file is empty. Save it again at the laboratory page and upload it once more.');

export type TableInput = {
  readonly fileName: string;
  /** Days of a sheet's cells, as ISO and as the sheet shows them. */
  readonly shownDates?: ReadonlyMap<string, string>;
  readonly warnings?: readonly Remark[];
} & ({ readonly bytes: Uint8Array } | { readonly text: string } | { readonly sheets: readonly Sheet[] });

type Opened = { ok: true; sheets: readonly Sheet[]; delimiter: string | null } | { ok: false; error: Remark };

function opened(input: TableInput): Opened {
  if ('sheets' in input) {
    const sheets = input.sheets.map((sheet) => ({
      ...sheet,
      grid: sheet.grid.map((row) => row.map((cell) => unwrapped(clean(cell)))),
    }));
    const empty = sheets.every((sheet) => sheet.grid.every((row) => row.every((cell) => cell === '')));
    return empty ? { ok: false, error: EMPTY } : { ok: true, sheets, delimiter: null };
  }
  const decoded = 'text' in input ? { ok: true as const, text: input.text } : decode(input.bytes);
  if (!decoded.ok) return { ok: false, error: BINARY };
  if (decoded.text.replace(/^\ufeff/, '').trim() === '') return { ok: false, error: EMPTY };
  const { grid, delimiter } = gridOf(decoded.text);
  return { ok: true, sheets: [{ number: 1, name: null, grid, merges: [] }], delimiter };
}

function* cellsOf(sheets: readonly Sheet[]): Generator<string> {
  for (const sheet of sheets) for (const row of sheet.grid) for (const cell of row) if (cell !== '') yield cell;
}

/** Decimal comma or point from the cells; where they leave it open, a semicolon between cells speaks for the comma. */
function styleOf(sheets: readonly Sheet[], delimiter: string | null): NumberStyle {
  const style = numberStyle(cellsOf(sheets));
  if (style.decimalComma || delimiter !== ';') return style;
  let [points, commas] = [0, 0];
  for (const cell of cellsOf(sheets)) {
    if (/^[<>]?\s?\d*\.\d+$/.test(cell)) points += 1;
    else if (/^[<>]?\s?\d+,\d+$/.test(cell)) commas += 1;
  }
  return { decimalComma: points === 0 && commas > 0 };
}

/** Where the field is all that names a sample, it is the sample's name; one field of several samples names none. */
function namedByField(parts: readonly SamplePart[]): SamplePart[] {
  const fields = parts.flatMap((part) => (part.identity.sampleId === undefined ? (part.identity.fieldName ?? []) : []));
  const numbers = new Set(parts.map((part) => part.identity.labNumber ?? part.identity.fieldName));
  if (new Set(fields).size < Math.min(fields.length, numbers.size)) return [...parts];
  return parts.map((part) => {
    const { sampleId, fieldName } = part.identity;
    return sampleId !== undefined || fieldName === undefined
      ? part
      : { ...part, identity: { ...part.identity, sampleId: fieldName } };
  });
}

function shareAll(parts: readonly SamplePart[], shared: Identity): SamplePart[] {
  const one = parts.every((part) => part.identity.sampleId === undefined && part.identity.labNumber === undefined);
  const { sampleId, labNumber, fieldName, ...always } = shared;
  const names: Identity = {
    ...(sampleId === undefined ? {} : { sampleId }),
    ...(labNumber === undefined ? {} : { labNumber }),
  };
  const field: Identity = fieldName === undefined ? {} : { fieldName };
  return parts.map((part) => ({ ...part, identity: { ...always, ...field, ...(one ? names : {}), ...part.identity } }));
}

function allStatements(readings: readonly SheetReading[]): Statements {
  const methods = new Map(readings.flatMap((one) => [...one.statements.methods]));
  return { unit: readings.find((one) => one.statements.unit !== null)?.statements.unit ?? null, methods };
}

/** ISO day -> the words of the file for it. */
function printedDays(sheets: readonly Sheet[], shownDates: TableInput['shownDates']): ReadonlyMap<string, string> {
  const days = new Map(shownDates ?? []);
  for (const cell of cellsOf(sheets)) {
    if (!/^[\d.]{5,10}$/.test(cell)) continue;
    const iso = dateText(cell);
    if (iso !== cell && !days.has(iso)) days.set(iso, cell);
  }
  return days;
}

function shown(reading: Reading, dates: ReadonlyMap<string, string>): Reading {
  const back = (printed: string | null) => (printed === null ? null : (dates.get(printed) ?? printed));
  return {
    ...reading,
    samples: reading.samples.map((sample) => ({
      ...sample,
      dateSampledPrinted: back(sample.dateSampledPrinted),
      dateReportedPrinted: back(sample.dateReportedPrinted),
    })),
  };
}

/**
 * Reads a laboratory's data file or sheets: samples down and analytes across, one number a row, or analytes down, in any
 * mixture and number. Each number carries its cell (sheet, row and column from 1). Stages: decoding, grid, facts of each
 * row, tables with their headings, columns, rows, lines around the tables, samples, checks; the trace holds what they saw
 * and why each number that was not taken is no result. Errors: none are thrown for content; see the refusal codes.
 */
export function readTableTraced(input: TableInput): { reading: Reading; trace: TableTrace | null } {
  return read(input, true);
}

/** The reading alone; see readTableTraced. */
export function readTable(input: TableInput): Reading {
  return read(input, false).reading;
}

function read(input: TableInput, traced: boolean): { reading: Reading; trace: TableTrace | null } {
  const file = input.fileName;
  const refuse = (error: Remark) => ({ reading: refusedReading({ file, pages: 0, error }), trace: null });
  const open = opened(input);
  if (!open.ok) return refuse(open.error);
  if (open.sheets.some((sheet) => sheet.grid.length > MAX_ROWS)) return refuse(TOO_LARGE('20,000 rows'));
  if (open.sheets.some((sheet) => sheet.grid.some((row) => row.length > MAX_COLUMNS)))
    return refuse(TOO_LARGE('1,000 columns'));
  const style = styleOf(open.sheets, open.delimiter);
  const readings = open.sheets.map((sheet) => readSheet(sheet, style, traced));
  const trace: TableTrace = { sheets: readings, untaken: traced ? readings.flatMap((one) => untakenOf(one)) : [] };
  const lab = { name: readings.find((one) => one.laboratory !== null)?.laboratory ?? null };
  const materials = readings.map((one) =>
    materialOf([one.facts.sheet.name ?? '', ...one.texts.filter((text) => text.length < 200)]),
  );
  const soilSaid = readings.some((one) => /\bsoil\b/i.test(one.texts.join(' ')));
  const soil = readings.filter((_, index) => materials[index] === null);
  const parts = soil.flatMap((one) => shareAll(namedByField(one.parts), one.shared));
  const other = materials.find((one) => one !== null) ?? (soilSaid ? null : materialByNumbers(parts)) ?? null;
  const nothing = soil.length === 0 || (other !== null && materials.every((one) => one === null));
  const remarks = new Map(soil.flatMap((one) => one.remarks.map((remark): [string, Remark] => [remark.code, remark])));
  const warnings: Remark[] = [...(input.warnings ?? []), ...remarks.values()];
  const what = other ?? soil.find((one) => one.other !== null)?.other ?? null;
  if (what !== null) {
    const some = nothing || parts.every((part) => part.candidates.length === 0);
    warnings.push(
      remark(
        'not-soil',
        `This looks like ${what}, not a soil test; ${some ? 'nothing' : 'only the soil'} of it was taken.`,
      ),
    );
    if (some) {
      return {
        reading: { file, kind: 'not-soil', error: null, pages: 0, warnings, lab, samples: [], recommendations: [] },
        trace,
      };
    }
  }
  const { samples, warnings: found } = assemble({
    parts: joinSamples(parts),
    statements: allStatements(soil),
    dateTexts: [...cellsOf(open.sheets)].filter((cell) => cell.length < 40 && ANY_DATE.test(cell)),
  });
  if (samples.length === 0) return { reading: refusedReading({ file, pages: 0, error: NO_RESULTS }), trace };
  const reading: Reading = {
    file,
    kind: 'soil',
    error: null,
    pages: 0,
    warnings: [...warnings, ...found],
    lab,
    samples,
    recommendations: soil.flatMap((one) => one.recommendations),
  };
  return { reading: shown(reading, printedDays(open.sheets, input.shownDates)), trace };
}
