import { assemble } from './assemble';
import { remark } from './candidate';
import { decode } from './csv/decode';
import { type Grid, gridOf } from './csv/grid';
import { headerRow } from './csv/headings';
import { listShape, longShape, matrixShape, type Shape, titleIdentity } from './csv/shapes';
import { NO_RESULTS } from './readPages';
import { withShared } from './stages/contexts';
import { ANY_DATE } from './stages/dates';
import { SOIL_WORDS, statementsOf } from './stages/sections';
import { numberStyle } from './stages/values';
import { type Reading, type Remark, refusedReading } from './types';

export const MAX_ROWS = 20_000;
export const MAX_COLUMNS = 1_000;

const TOO_LARGE = (what: string) =>
  remark('table-too-large', `This file has more than ${what}. It is kept; cut it into smaller files and upload those.`);
const BINARY = remark(
  'not-text',
  'This file is named as a data file but holds no text. It is kept; save it again as CSV or upload the PDF.',
);
const EMPTY = remark('empty', 'This file is empty. Save it again at the laboratory page and upload it once more.');

const OTHER_MATERIAL: readonly (readonly [string, RegExp])[] = [
  ['a plant tissue test', /\b(plant tissue|tissue (test|analysis)|petiole|leaf (analysis|tissue)|plant analysis)\b/i],
  ['a water test', /\b(water (analysis|test|quality)|irrigation water)\b/i],
  ['a compost or manure test', /\b(compost|manure) (analysis|test)\b/i],
];

function shapeOf(grid: Grid, style: { decimalComma: boolean }): { shape: Shape; titleRows: number } | null {
  const long = longShape(grid, style);
  if (long !== null) return { shape: long.shape, titleRows: long.header };
  const header = headerRow(grid);
  const matrix = header === null ? null : matrixShape(grid, header, style);
  const list = listShape(grid, style);
  const count = (shape: Shape | null) => shape?.parts.reduce((sum, part) => sum + part.candidates.length, 0) ?? 0;
  if (matrix !== null && header !== null && count(matrix) >= count(list))
    return { shape: matrix, titleRows: header.row };
  return list === null ? null : { shape: list, titleRows: grid.length };
}

function laboratory(grid: Grid, rows: number): string | null {
  const titles = grid.slice(0, Math.min(rows, 12)).flat();
  const found = titles.find(
    (cell) => /\b(laborator(y|ies)|labs?|soil testing)\b/i.test(cell) && !/\b(no|number|id)\b|#/i.test(cell),
  );
  return found?.replace(/^lab(oratory)?\s*:\s*/i, '') ?? null;
}

/**
 * Reads a laboratory's data file: samples down and analytes across, one number a row, or analytes down. Each number
 * carries its cell (row and column from 1). Errors: none are thrown for content; see the refusal codes.
 */
export function readTable(input: { fileName: string; bytes?: Uint8Array; text?: string }): Reading {
  const file = input.fileName;
  const refuse = (error: Remark) => refusedReading({ file, pages: 0, error });
  const decoded =
    input.text === undefined ? decode(input.bytes ?? new Uint8Array()) : { ok: true as const, text: input.text };
  if (!decoded.ok) return refuse(BINARY);
  if (decoded.text.replace(/^\ufeff/, '').trim() === '') return refuse(EMPTY);
  const grid = gridOf(decoded.text);
  if (grid.length > MAX_ROWS + 1) return refuse(TOO_LARGE('20,000 rows'));
  if (grid.some((row) => row.length > MAX_COLUMNS)) return refuse(TOO_LARGE('1,000 columns'));
  const style = numberStyle(grid.flat());
  const found = shapeOf(grid, style);
  const titles = grid.slice(0, Math.min(found?.titleRows ?? 5, 20)).map((row) => row.join(' '));
  const lab = { name: laboratory(grid, found?.titleRows ?? 5) };
  const other = OTHER_MATERIAL.find(([, pattern]) => pattern.test(titles.join(' ')))?.[0];
  if (other !== undefined && !SOIL_WORDS.test(titles.join(' '))) {
    const warning = remark('not-soil', `This looks like ${other}, not a soil test; nothing of it was taken.`);
    return {
      file,
      kind: 'not-soil',
      error: null,
      pages: 0,
      warnings: [warning],
      lab,
      samples: [],
      recommendations: [],
    };
  }
  if (found === null) return refuse(NO_RESULTS);
  const shared = titleIdentity(grid, found.titleRows);
  const nameless = found.shape.parts.every(
    (part) => part.identity.sampleId === undefined && part.identity.labNumber === undefined,
  );
  const parts = found.shape.parts.map((part) => ({
    ...part,
    identity: nameless ? { ...shared, ...part.identity } : withShared(part.identity, shared),
  }));
  const statements = statementsOf(grid.slice(0, found.titleRows).map((row) => row.join(' ')));
  const { samples, warnings } = assemble({
    parts,
    statements,
    dateTexts: grid.flat().filter((cell) => ANY_DATE.test(cell)),
  });
  if (samples.length === 0) return refuse(NO_RESULTS);
  return {
    file,
    kind: 'soil',
    error: null,
    pages: 0,
    warnings,
    lab,
    samples,
    recommendations: found.shape.recommendations,
  };
}
