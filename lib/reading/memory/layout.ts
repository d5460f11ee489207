import { unitIn } from '../labels/label';
import { normal } from '../labels/normal';
import type { Box, Cell } from '../types';

/** A row as far as its place and its printed label go. */
export type PlacedRow = {
  readonly label: string;
  readonly page: number | null;
  readonly box: Box | null;
  readonly cell: Cell | null;
};

/** On a page or in a data file; the numbers of one sample side by side, or one under the other. */
export type LayoutShape = 'page-across' | 'page-down' | 'data-across' | 'data-down';

/** What makes a laboratory's form the same form a year later. */
export type Layout = {
  /** The laboratory's name in plain words; '' when the report names none. */
  readonly laboratory: string;
  readonly shape: LayoutShape;
  /** The labels of the numbers in plain words, each once, in alphabetical order. */
  readonly headings: readonly string[];
  readonly fingerprint: string;
};

/** Fewer labels than this are no layout: pH alone stands on every report. */
const FEWEST_HEADINGS = 2;
/** Of the shorter list of labels so many must stand in the other one as well, and of the longer list so many. */
const SHARED_OF_SHORTER = 0.9;
const SHARED_OF_LONGER = 0.6;
/** Numbers nearer than this stand in one column, or on one line: fractions of the page. */
const SAME_COLUMN = 0.03;
const SAME_LINE = 0.006;

/** The laboratory's name without case, accents and marks, so that "Labs, Inc." and "labs inc" are one. */
export function plainLaboratory(name: string | null): string {
  return (name ?? '')
    .normalize('NFKD')
    .toLowerCase()
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
}

/** A label without what may change from year to year: its unit, a target range, a year. '' when nothing else is left: it names nothing. */
export function plainLabel(printed: string): string {
  const bare = printed
    .replace(/\(\s*[<>]?\d[\d.,]*\s*(?:-|–|to)\s*\d[\d.,]*[^)]*\)/g, ' ')
    .replace(/\b(19|20)\d\d\b/g, ' ');
  const unit = unitIn(bare);
  const rest = unit === null ? normal(bare) : unit.rest;
  return rest.replace(/\s+/g, ' ').trim();
}

/** How many groups the numbers fall into when neighbours within `near` are one group. */
function groups(values: readonly number[], near: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted.filter((value, at) => at === 0 || value - (sorted[at - 1] ?? value) > near).length;
}

const middle = (from: number, to: number) => (from + to) / 2;

function votesAcross(rows: readonly PlacedRow[]): number {
  const boxes = rows.flatMap((row) => (row.box === null ? [] : [row.box]));
  const cells = rows.flatMap((row) => (row.cell === null ? [] : [row.cell]));
  if (boxes.length > 1) {
    const lines = groups(
      boxes.map((box) => middle(box[1], box[3])),
      SAME_LINE,
    );
    const columns = groups(
      boxes.map((box) => middle(box[0], box[2])),
      SAME_COLUMN,
    );
    return Math.sign(columns - lines);
  }
  if (cells.length > 1) {
    return Math.sign(new Set(cells.map((cell) => cell.column)).size - new Set(cells.map((cell) => cell.row)).size);
  }
  return 0;
}

/** 16 hexadecimal figures of a text: two runs of the FNV-1a hash. It tells layouts of one site apart and guards nothing. */
export function hashOf(text: string): string {
  const run = (start: number) => {
    let hash = start;
    for (let at = 0; at < text.length; at += 1) hash = Math.imul(hash ^ text.charCodeAt(at), 0x01000193) >>> 0;
    return hash.toString(16).padStart(8, '0');
  };
  return run(0x811c9dc5) + run(0x9dc5811c);
}

/**
 * The layout of a reading: laboratory, labels and how the numbers lie, never the numbers themselves, the units, the years
 * or what wrote the file. Pure. Null when there are too few labels to tell one layout from another.
 * Worked example: "P (ppm)" of 2025 and "P (lb/A)" of 2026 at one place under one laboratory are one layout.
 */
export function layoutOf(input: {
  laboratory: string | null;
  samples: readonly (readonly PlacedRow[])[];
}): Layout | null {
  const rows = input.samples.flat();
  const headings = [...new Set(rows.map((row) => plainLabel(row.label)).filter((label) => label !== ''))].sort();
  if (headings.length < FEWEST_HEADINGS) return null;
  const onPage = rows.filter((row) => row.box !== null).length >= rows.filter((row) => row.cell !== null).length;
  const votes = input.samples.reduce((sum, sample) => sum + votesAcross(sample), 0);
  const shape: LayoutShape = `${onPage ? 'page' : 'data'}-${votes > 0 ? 'across' : 'down'}`;
  const laboratory = plainLaboratory(input.laboratory);
  return { laboratory, shape, headings, fingerprint: hashOf([laboratory, shape, ...headings].join('\n')) };
}

function shared(a: readonly string[], b: readonly string[]): number {
  const there = new Set(b);
  return a.filter((one) => there.has(one)).length;
}

/**
 * True for the same form with a blank cell or an extra analyte more or less. A report without a laboratory's name must
 * have exactly the same labels: nothing else says whose form it is.
 */
export function sameLayout(a: Omit<Layout, 'fingerprint'>, b: Omit<Layout, 'fingerprint'>): boolean {
  if (a.laboratory !== b.laboratory || a.shape !== b.shape) return false;
  const [shorter, longer] =
    a.headings.length <= b.headings.length ? [a.headings, b.headings] : [b.headings, a.headings];
  const both = shared(shorter, longer);
  if (a.laboratory === '') return both === longer.length;
  return both >= SHARED_OF_SHORTER * shorter.length && both >= SHARED_OF_LONGER * longer.length;
}

/** The known layout a new one is: by its fingerprint, else the one that shares most labels. */
export function findLayout<T extends Layout>(layout: Layout, known: readonly T[]): T | null {
  const exact = known.find((one) => one.fingerprint === layout.fingerprint);
  if (exact !== undefined) return exact;
  const near = known
    .filter((one) => sameLayout(layout, one))
    .sort((a, b) => shared(layout.headings, b.headings) - shared(layout.headings, a.headings));
  return near[0] ?? null;
}
