import type { UnitKey } from '@/lib/domain/analytes';
import { unitIn } from '../labels/label';
import type { ReadRecommendation } from '../types';
import type { CellLine } from './cells';
import type { ZoneBox } from './sections';
import type { TableRow } from './tableRows';
import { storedBox } from './words';

const AMOUNT = /(?<![\d.,/])(\d{1,3}(?:,\d{3})+|\d*\.?\d+)(?:\s*(?:-|–|to)\s*\d*\.?\d+)?\s*/;
const UNIT = /^(?:of [\w ]{1,30}? )?((?:lbs?\.?|pounds?|oz\.?|ounces?|tons?|t|kg|g|cwt)\b[^;,]{0,40})/i;
const FILLER =
  /\b(apply|add|use|spread|broadcast|of|per|in|the|a|at|to|each|rate|about|and|work|incorporate|recommended|recommendation|suggested)\b/gi;

function tidyItem(text: string): string {
  return text
    .replace(FILLER, ' ')
    .replace(/[^\p{L}\p{N}\s()-]/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim()
    .slice(0, 80);
}

function fromText(
  text: string,
  unitAbove: UnitKey | null,
): { item: string; amount: number; unit: string | null; printed: string } | null {
  for (const match of text.matchAll(new RegExp(AMOUNT, 'g'))) {
    const after = text.slice((match.index ?? 0) + match[0].length);
    const unitText = UNIT.exec(after)?.[1];
    if (unitText === undefined) {
      const bare = tidyItem(text.slice(0, match.index));
      if (unitAbove === null || bare === '' || after.trim() !== '') continue;
      return { item: bare, amount: Number((match[1] ?? '').replace(/,/g, '')), unit: unitAbove, printed: text };
    }
    const unit = unitIn(after)?.unit ?? null;
    const before = tidyItem(text.slice(0, match.index));
    const rest = tidyItem(
      after
        .replace(/\b(lbs?|pounds?|oz|ounces?|tons?|kg|cwt)\b\.?/gi, ' ')
        .replace(/[\d,]*\s*(sq(uare)?\.? ?(ft|feet|yd)|acre|ha|m2)\b\.?/gi, ' '),
    );
    const item = before !== '' ? before : rest;
    if (item === '') continue;
    const amount = Number((match[1] ?? '').replace(/,/g, ''));
    return { item, amount, unit: unit ?? unitText.trim(), printed: text };
  }
  return null;
}

/** Advice in words and lists ("Elemental sulfur: 10 lb per 1,000 sq ft"), with the box of the whole line. */
export function adviceOfLines(
  lines: readonly CellLine[],
  zones: readonly ZoneBox[],
  sampleId: (line: CellLine) => string | null,
): ReadRecommendation[] {
  let header: CellLine | null = null;
  return lines.flatMap((line) => {
    if (header !== null && header.line.page !== line.line.page) header = null;
    const unit = zoneOf(line, zones)?.unit ?? null;
    if (line.values === 0 && line.cells.length >= 3) header = line;
    const table = header === null ? [] : adviceOfRow(line, header, unit, sampleId(line));
    if (table.length > 0) return table;
    const text = line.cells.map((cell) => cell.phrase.text).join(' ');
    const found = fromText(text, line.cells.length <= 2 ? unit : null);
    if (found === null) return [];
    const box = {
      x0: Math.min(...line.cells.map((cell) => cell.phrase.x0)),
      y0: line.line.y0,
      x1: Math.max(...line.cells.map((cell) => cell.phrase.x1)),
      y1: line.line.y1,
    };
    return [{ sampleId: sampleId(line), ...found, page: line.line.page.number, box: storedBox(line.line.page, box) }];
  });
}

function zoneOf(line: CellLine, zones: readonly ZoneBox[]): ZoneBox | undefined {
  const first = line.cells[0]?.phrase;
  if (first === undefined) return undefined;
  const page = line.line.page.number;
  const advice = zones.filter((one) => one.zone === 'recommendation' && one.page === page);
  return advice.find((one) => first.x0 >= one.x0 && first.x0 < one.x1 && first.y0 > one.y0 && first.y0 < one.y1);
}

/** A row of a table of advice: each number goes with the heading it stands under. */
function adviceOfRow(
  line: CellLine,
  header: CellLine,
  unit: UnitKey | null,
  sampleId: string | null,
): ReadRecommendation[] {
  const numbers = line.cells.filter((cell) => cell.meaning.kind === 'value');
  const [first] = line.cells;
  if (numbers.length < 2 || first === undefined) return [];
  const name = first.meaning.kind === 'value' ? sampleId : first.phrase.text;
  return numbers.flatMap((cell) => {
    const over = header.cells.find((one) => one.phrase.x0 < cell.phrase.x1 && one.phrase.x1 > cell.phrase.x0);
    if (over === undefined || cell.meaning.kind !== 'value') return [];
    return [
      {
        sampleId: name,
        item: over.phrase.text,
        amount: cell.meaning.value,
        printed: cell.phrase.text,
        unit: cell.meaning.unit ?? unitIn(over.phrase.text)?.unit ?? unit,
        page: line.line.page.number,
        box: storedBox(line.line.page, cell.phrase),
      },
    ];
  });
}

/** Advice that stands in columns of a results table. */
export function adviceOfTable(rows: readonly TableRow[]): ReadRecommendation[] {
  return rows.flatMap((row) =>
    row.advice.flatMap(({ column, cell, sampleKey }) => {
      if (cell.meaning.kind !== 'value') return [];
      const unit = unitIn(column.heading);
      return [
        {
          sampleId: sampleKey.sampleId ?? null,
          item: column.heading,
          amount: cell.meaning.value,
          printed: cell.phrase.text,
          unit: unit?.unit ?? cell.meaning.unit,
          page: row.line.line.page.number,
          box: storedBox(row.line.line.page, cell.phrase),
        },
      ];
    }),
  );
}

/** "Top bed: elemental sulfur" names the sample first; it is told apart when that name is one of the report's. */
export function withSampleNames(advice: readonly ReadRecommendation[], names: readonly string[]): ReadRecommendation[] {
  return advice.map((one) => {
    const name = names.find((sample) => one.item.toLowerCase().startsWith(`${sample.toLowerCase()} `));
    return name === undefined ? one : { ...one, sampleId: name, item: one.item.slice(name.length).trim() };
  });
}
