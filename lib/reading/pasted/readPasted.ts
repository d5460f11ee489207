import { remark } from '../candidate';
import { readPages } from '../readPages';
import { readTable } from '../readTable';
import { decode } from '../table/decode';
import { type Reading, type ReadResult, refusedReading } from '../types';
import { alignedGrid } from './aligned';
import { isDelimited, linesOfText } from './lines';
import { pageOfLines, withTextPlaces } from './page';

export const MAX_LINES = 20_000;
const LONGEST_LINE = 20_000;
/** "Label: value" lines are looked for in no longer ones: the time for a line of words grows with its square. */
const LONGEST_OF_WORDS = 1_500;

const TOO_LONG = remark(
  'text-too-long',
  'This text has more than 20,000 lines, or a line of more than 20,000 characters. It is kept; cut it into smaller texts.',
);
const EMPTY = remark('empty', 'There is no text here. Copy the results once more and paste them again.');
const BINARY = remark(
  'not-text',
  'This file is named as a text but holds no text. It is kept; save it again as text or upload the PDF.',
);

function resultsOf(reading: Reading): readonly ReadResult[] {
  return reading.samples.flatMap((sample) => sample.results);
}

/** How much a reading understood: its numbers, each by its confidence. A reading that says "not soil" stands for itself. */
function weight(reading: Reading): number {
  if (reading.kind === 'not-soil') return 0.5;
  return resultsOf(reading).reduce((sum, result) => sum + result.confidence, 0);
}

function byCells(fileName: string, text: string): Reading | null {
  return isDelimited(text) ? readTable({ fileName, text }) : null;
}

/** Lines parted by tabs in the midst of a letter: the letter's own lines are left empty, so that places stay true. */
function byTabs(fileName: string, text: string): Reading | null {
  const rows = text.split(/\r\n?|\n/);
  const tabbed = rows.filter((row) => (row.match(/\t/g)?.length ?? 0) >= 2);
  if (tabbed.length < 2 || isDelimited(text)) return null;
  const kept = rows.map((row) =>
    (row.match(/\t/g)?.length ?? 0) >= 2 ? row.split('\t').map((cell) => cell.trim()) : [''],
  );
  const around = rows.filter((row) => (row.match(/\t/g)?.length ?? 0) < 2).join('\n');
  const reading = readTable({ fileName, sheets: [{ number: 1, name: null, grid: kept, merges: [] }] });
  const other = readTable({ fileName, text: around });
  return { ...reading, lab: reading.lab.name === null ? other.lab : reading.lab };
}

function byColumns(fileName: string, lines: ReturnType<typeof linesOfText>): Reading {
  const aligned = alignedGrid(lines);
  const reading = readTable({ fileName, sheets: [{ number: 1, name: null, grid: aligned.grid, merges: [] }] });
  return {
    ...reading,
    samples: reading.samples.map((sample) => ({
      ...sample,
      results: sample.results.map((result) =>
        result.cell === null
          ? result
          : {
              ...result,
              cell: { ...result.cell, column: aligned.column(result.cell.row - 1, result.cell.column - 1) },
            },
      ),
    })),
  };
}

function byWords(fileName: string, lines: ReturnType<typeof linesOfText>): Reading | null {
  if (lines.some((line) => line.text.length > LONGEST_OF_WORDS)) return null;
  const page = pageOfLines(lines);
  return withTextPlaces(readPages({ fileName, pages: [page] }), lines, page);
}

/**
 * Reads text pasted from a mail or a web page, or a .txt file: cells parted by tabs, semicolons, strokes or commas; columns
 * set with blanks; "label: value" lines. Every way is tried and the one that understands most is taken. A number's place is
 * `cell`: sheet 1, its line, and the character (or, where cells are parted, the cell) at which it begins. Errors: none are
 * thrown for content.
 */
export function readPasted(input: { fileName: string } & ({ text: string } | { bytes: Uint8Array })): Reading {
  const file = input.fileName;
  const decoded = 'text' in input ? { ok: true as const, text: input.text } : decode(input.bytes);
  if (!decoded.ok) return refusedReading({ file, pages: 0, error: BINARY });
  if (decoded.text.trim() === '') return refusedReading({ file, pages: 0, error: EMPTY });
  const lines = linesOfText(decoded.text);
  if (lines.length > MAX_LINES || lines.some((line) => line.text.length > LONGEST_LINE))
    return refusedReading({ file, pages: 0, error: TOO_LONG });
  const ways = [
    byCells(file, decoded.text),
    byTabs(file, decoded.text),
    byColumns(file, lines),
    byWords(file, lines),
  ].filter((one) => one !== null);
  const [first, ...others] = ways;
  if (first === undefined) return refusedReading({ file, pages: 0, error: EMPTY });
  return others.reduce((best, one) => (weight(one) > weight(best) + 0.01 ? one : best), first);
}
