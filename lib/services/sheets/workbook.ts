import { z } from 'zod';
import { zipDirectory, zipIsCutOff, zipUnpacked } from './zip';

/** Merged cells, rows and columns from 0, ends included. */
type Merge = { readonly top: number; readonly left: number; readonly bottom: number; readonly right: number };
export type PlainSheet = {
  /** From 1, in the order of the workbook. */
  readonly number: number;
  readonly name: string;
  readonly grid: readonly (readonly string[])[];
  readonly merges: readonly Merge[];
};
export type Workbook =
  | {
      readonly ok: true;
      readonly sheets: readonly PlainSheet[];
      /** ISO day -> the words in which the sheet shows it. */
      readonly shownDates: ReadonlyMap<string, string>;
      readonly remarks: readonly { readonly code: string; readonly sentence: string }[];
    }
  | {
      readonly ok: false;
      readonly reason: 'encrypted-sheet' | 'sheet-truncated' | 'broken-sheet' | 'unpacks-too-large' | 'table-too-large';
    };

const MOST_UNPACKED = 100 * 1024 * 1024;
const MOST_ENTRIES = 2_000;
const MOST_ROWS = 20_000;
const MOST_COLUMNS = 1_000;
const MOST_SHEETS = 60;

/** What is used of the package's answer; everything else in it is left alone. */
const cellSchema = z.looseObject({
  t: z.string(),
  v: z.unknown().optional(),
  w: z.string().optional(),
  z: z.union([z.string(), z.number()]).optional(),
  f: z.string().optional(),
});
const spot = z.looseObject({ r: z.number(), c: z.number() });
const shownSchema = z.looseObject({ hidden: z.boolean().optional() }).nullish();
const sheetSchema = z.looseObject({
  '!data': z.array(z.array(z.unknown()).optional()).optional(),
  '!merges': z.array(z.looseObject({ s: spot, e: spot })).optional(),
  '!rows': z.array(shownSchema).optional(),
  '!cols': z.array(shownSchema).optional(),
});
const bookSchema = z.looseObject({
  SheetNames: z.array(z.string()),
  Sheets: z.record(z.string(), sheetSchema),
  Workbook: z
    .looseObject({
      WBProps: z.looseObject({ date1904: z.boolean().optional() }).optional(),
      Sheets: z.array(z.looseObject({ Hidden: z.number().optional() })).optional(),
    })
    .optional(),
});
type Tools = typeof import('@e965/xlsx');
/** Loaded only in a process that reads a sheet. */
async function loadTools(): Promise<Tools> {
  const [tools, codepages] = await Promise.all([import('@e965/xlsx'), import('@e965/xlsx/dist/cpexcel.full.mjs')]);
  tools.set_cptable(codepages);
  return tools;
}

const dayCodeSchema = z.looseObject({ y: z.number(), m: z.number(), d: z.number() });

type Counts = { rows: number; columns: number; sheets: number; formulas: number };
/** What every cell is read with, and what is noted on the way. */
type Desk = {
  readonly tools: Tools;
  readonly date1904: boolean;
  readonly shownDates: Map<string, string>;
  readonly counts: Counts;
};

function isoOf(tools: Tools, serial: number, date1904: boolean): string | null {
  const code = dayCodeSchema.safeParse(tools.SSF.parse_date_code(serial, { date1904 }));
  if (!code.success || code.data.y < 1) return null;
  const two = (part: number) => String(part).padStart(2, '0');
  return `${String(code.data.y).padStart(4, '0')}-${two(code.data.m)}-${two(code.data.d)}`;
}

/** A format that shows a day and not only a time of day. */
function showsDay(tools: Tools, format: string | number | undefined): boolean {
  return (
    typeof format === 'string' &&
    tools.SSF.is_date(format) === true &&
    /d|y/i.test(format.replace(/"[^"]*"|\\.|\[[^\]]*\]/g, ''))
  );
}

function textOf(raw: unknown, desk: Desk): string {
  if (raw === undefined || raw === null) return '';
  const parsed = cellSchema.safeParse(raw);
  if (!parsed.success) return '';
  const cell = parsed.data;
  if (cell.t === 'z' || cell.v === undefined || cell.v === null) {
    if (cell.f !== undefined) desk.counts.formulas += 1;
    return '';
  }
  if (cell.t === 'n' && typeof cell.v === 'number') {
    if (showsDay(desk.tools, cell.z)) {
      const iso = isoOf(desk.tools, cell.v, desk.date1904);
      if (iso !== null) {
        if (cell.w !== undefined) desk.shownDates.set(iso, cell.w.trim());
        return iso;
      }
    }
    return (cell.w ?? String(cell.v)).trim();
  }
  if (cell.t === 'e') return cell.w ?? '#N/A';
  return typeof cell.v === 'string' ? cell.v : (cell.w ?? String(cell.v));
}

type Book = z.infer<typeof bookSchema>;
type RawSheet = Book['Sheets'][string];

/** Rows and columns a person has hidden are left empty; the rest keeps its place. */
function gridOf(sheet: RawSheet, desk: Desk): string[][] | null {
  const { counts } = desk;
  const data = sheet['!data'] ?? [];
  const grid: string[][] = [];
  for (let row = 0; row < data.length; row++) {
    const cells = data[row] ?? [];
    const line: string[] = [];
    let filled = 0;
    for (let column = 0; column < cells.length; column++) {
      const text = textOf(cells[column], desk);
      if (text !== '') {
        if (column >= MOST_COLUMNS || row >= MOST_ROWS) return null;
        filled += 1;
      }
      if (column < MOST_COLUMNS) line.push(text);
    }
    if (filled > 0 && sheet['!rows']?.[row]?.hidden === true) {
      counts.rows += 1;
      grid.push([]);
    } else grid.push(line);
  }
  for (const [column, shown] of (sheet['!cols'] ?? []).entries()) {
    if (shown?.hidden !== true || !grid.some((row) => (row[column] ?? '') !== '')) continue;
    counts.columns += 1;
    for (const row of grid) if (row[column] !== undefined) row[column] = '';
  }
  while (grid.length > 0 && grid[grid.length - 1]?.every((cell) => cell === '') === true) grid.pop();
  return grid;
}

/** Words merged down over several rows belong to each of them; numbers stand once. */
function fillDown(grid: string[][], merges: readonly Merge[]) {
  for (const { top, bottom, left, right } of merges) {
    const text = grid[top]?.[left] ?? '';
    if (left !== right || text === '' || /^[<>]?\s*-?[\d.,]+$/.test(text)) continue;
    for (let row = top + 1; row <= bottom && row < grid.length; row++) {
      const line = grid[row];
      if (line === undefined) continue;
      while (line.length <= left) line.push('');
      line[left] = text;
    }
  }
}

function remarksOf(counts: Counts): { code: string; sentence: string }[] {
  const remarks: { code: string; sentence: string }[] = [];
  const hidden = [
    counts.sheets > 0 ? `${counts.sheets} hidden ${counts.sheets === 1 ? 'sheet' : 'sheets'}` : '',
    counts.rows > 0 ? `${counts.rows} hidden ${counts.rows === 1 ? 'row' : 'rows'}` : '',
    counts.columns > 0 ? `${counts.columns} hidden ${counts.columns === 1 ? 'column' : 'columns'}` : '',
  ].filter((part) => part !== '');
  if (hidden.length > 0)
    remarks.push({
      code: 'hidden-not-read',
      sentence: `This workbook has ${hidden.join(' and ')}, which were not read. Show them in your own program and save it again if results stand there.`,
    });
  if (counts.formulas > 0)
    remarks.push({
      code: 'formula-without-value',
      sentence: `${counts.formulas} cells hold a formula without its number and were not read. Open the workbook in your own program, save it and upload it again.`,
    });
  return remarks;
}

function open(
  tools: Tools,
  bytes: Uint8Array,
  styled: boolean,
): { ok: true; book: Book } | { ok: false; reason: 'encrypted-sheet' | 'broken-sheet' } {
  try {
    const raw: unknown = tools.read(bytes, {
      type: 'array',
      dense: true,
      cellNF: true,
      cellText: true,
      // Without a table of styles each cell costs the package an error of its own, and nothing says what is hidden.
      cellStyles: styled,
      cellHTML: false,
      cellDates: false,
      bookVBA: false,
      sheetRows: MOST_ROWS + 2,
    });
    const book = bookSchema.safeParse(raw);
    return book.success ? { ok: true, book: book.data } : { ok: false, reason: 'broken-sheet' };
  } catch (error) {
    const locked = error instanceof Error && /password|encrypt/i.test(error.message);
    return { ok: false, reason: locked ? 'encrypted-sheet' : 'broken-sheet' };
  }
}

/**
 * A workbook (XLSX or XLS) as plain text of its cells, as a person sees them: formatted numbers as shown, days as ISO,
 * formulas by the numbers kept with them. Called only in the process that is killed past its limits. Nothing in the
 * workbook is executed. Bombs are refused by the sizes their own directory states, and by those they really have.
 */
export async function workbookOf(bytes: Uint8Array): Promise<Workbook> {
  let styled = true;
  if (bytes[0] === 0x50) {
    const directory = zipDirectory(bytes);
    if (directory === null) return { ok: false, reason: zipIsCutOff(bytes) ? 'sheet-truncated' : 'broken-sheet' };
    if (directory.unpacked > MOST_UNPACKED || directory.entries > MOST_ENTRIES)
      return { ok: false, reason: 'unpacks-too-large' };
    styled = directory.names.some((name) => /styles\.(xml|bin)$/i.test(name));
    const unpacked = await zipUnpacked(bytes, directory, MOST_UNPACKED);
    if (unpacked === null) return { ok: false, reason: 'broken-sheet' };
    if (unpacked > MOST_UNPACKED) return { ok: false, reason: 'unpacks-too-large' };
  }
  const tools = await loadTools();
  const opened = open(tools, bytes, styled);
  if (!opened.ok) return opened;
  const { book } = opened;
  if (book.SheetNames.length > MOST_SHEETS) return { ok: false, reason: 'table-too-large' };
  const date1904 = book.Workbook?.WBProps?.date1904 === true;
  const shownDates = new Map<string, string>();
  const counts: Counts = { rows: 0, columns: 0, sheets: 0, formulas: 0 };
  const desk: Desk = { tools, date1904, shownDates, counts };
  const sheets: PlainSheet[] = [];
  for (const [index, name] of book.SheetNames.entries()) {
    const sheet = book.Sheets[name];
    if (sheet === undefined) continue;
    if ((book.Workbook?.Sheets?.[index]?.Hidden ?? 0) > 0) {
      if ((sheet['!data'] ?? []).length > 0) counts.sheets += 1;
      continue;
    }
    const grid = gridOf(sheet, desk);
    if (grid === null) return { ok: false, reason: 'table-too-large' };
    const merges = (sheet['!merges'] ?? []).map(({ s, e }) => ({ top: s.r, left: s.c, bottom: e.r, right: e.c }));
    fillDown(grid, merges);
    sheets.push({ number: index + 1, name, grid, merges });
  }
  return { ok: true, sheets, shownDates, remarks: remarksOf(counts) };
}
