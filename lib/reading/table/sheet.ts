import type { Candidate, Identity, SamplePart } from '../candidate';
import { methodIn, unitIn } from '../labels/label';
import type { Statements } from '../stages/sections';
import type { NumberStyle } from '../stages/values';
import type { ReadRecommendation, Remark } from '../types';
import { analytesDown } from './analytesDown';
import { blocksOf } from './blocks';
import { type Facts, factsOf } from './facts';
import { sampleList } from './sampleList';
import { samplesDown } from './samplesDown';
import { spoken } from './spoken';
import { withStackedHeads } from './stacked';
import { laboratoryColumn, laboratoryOf, legendOf, titleIdentity, titleStatements } from './titles';
import { keyOf, type Ledger, type Sheet } from './types';

export type SheetReading = {
  readonly facts: Facts;
  readonly parts: readonly SamplePart[];
  readonly recommendations: readonly ReadRecommendation[];
  readonly shared: Identity;
  readonly statements: Statements;
  readonly laboratory: string | null;
  /** Lines that belong to no table: titles, notes, headings of columns. */
  readonly texts: readonly string[];
  readonly ledger: Ledger | null;
  readonly remarks: readonly Remark[];
  readonly other: string | null;
};

/** "P1" in the list of codes gives the unit and the method that the column's heading leaves out. */
function withLegend(candidate: Candidate, legend: ReadonlyMap<string, string>): Candidate {
  const said = legend.get(candidate.label.text.toLowerCase());
  if (said === undefined) return candidate;
  const unit = candidate.unit === null ? unitIn(spoken(said)) : null;
  const method = candidate.method === null ? methodIn(candidate.label.analyte, spoken(said)) : null;
  return {
    ...candidate,
    unit: unit?.unit ?? candidate.unit,
    unitPrinted: unit?.printed ?? candidate.unitPrinted,
    method: method?.method ?? candidate.method,
    methodPrinted: method?.printed ?? candidate.methodPrinted,
  };
}

/** One sheet: its tables of samples, then what stands outside them as lists of analytes, then the lines around. */
export function readSheet(sheet: Sheet, style: NumberStyle, traced: boolean): SheetReading {
  const facts = factsOf({ ...sheet, grid: withStackedHeads(sheet.grid) }, style);
  const ledger: Ledger | null = traced ? new Map() : null;
  const blocks = blocksOf(facts);
  const shapes = blocks.map((block) => samplesDown(facts, block, ledger));
  const used = new Set<number>(shapes.flatMap((shape) => [...shape.rows]));
  const free = facts.grid.flatMap((_, row) => (used.has(row) ? [] : [row]));
  const list = analytesDown(facts, free, ledger);
  const all = list === null ? shapes : [...shapes, list];
  for (const row of list?.rows ?? []) used.add(row);
  const listed = sampleList(
    facts,
    free.filter((row) => !used.has(row)),
  );
  const around = facts.grid.flatMap((_, row) => (used.has(row) || (facts.rows[row]?.filled ?? 0) === 0 ? [] : [row]));
  const headings = new Set(
    all.flatMap((shape) => shape.parts.flatMap((part) => part.candidates.map((one) => one.label.text.toLowerCase()))),
  );
  const legend = legendOf(facts, around, headings);
  const top = around.filter((row) => row < (blocks[0]?.from ?? 40));
  const over = facts.grid.flatMap((_, row) => (row < (blocks[0]?.base ?? 40) ? [row] : []));
  const heads = blocks.flatMap((block) => [...block.captionRows, block.base, ...block.underRows]);
  return {
    facts,
    parts: [
      ...listed,
      ...all.flatMap((shape) =>
        shape.parts.map((part) => ({ ...part, candidates: part.candidates.map((one) => withLegend(one, legend)) })),
      ),
    ],
    recommendations: all.flatMap((shape) => shape.recommendations),
    shared: titleIdentity(facts, top),
    statements: titleStatements(facts, around),
    laboratory: laboratoryColumn(facts) ?? laboratoryOf(facts, over),
    texts: [...around, ...heads].map((row) => (facts.grid[row] ?? []).filter((cell) => cell !== '').join(' ')),
    ledger,
    remarks: all.flatMap((shape) => shape.remarks),
    other: all.find((shape) => shape.other !== null)?.other ?? null,
  };
}

export type Untaken = {
  readonly sheet: number;
  readonly row: number;
  readonly column: number;
  readonly text: string;
  readonly why: string;
};

/** Every number of the sheet that is no result, with the reason. Rows and columns from 1. */
export function untakenOf(reading: SheetReading): Untaken[] {
  const { facts, ledger } = reading;
  const list: Untaken[] = [];
  for (const [row, cells] of facts.grid.entries()) {
    if ((facts.rows[row]?.values ?? 0) === 0) continue;
    for (const [column, text] of cells.entries()) {
      if (text === '' || facts.meaning(row, column).kind !== 'value') continue;
      const what = ledger?.get(keyOf(row, column));
      if (what !== 'taken')
        list.push({ sheet: facts.sheet.number, row: row + 1, column: column + 1, text, why: what ?? 'outside-table' });
    }
  }
  return list;
}
