import { assemble } from './assemble';
import { type Candidate, type Identity, remark, type SamplePart } from './candidate';
import { legendOf } from './labels/legend';
import { cardRows } from './stages/cards';
import { type CellLine, cellsOf } from './stages/cells';
import { type Context, contextAt, contextsOf, withShared } from './stages/contexts';
import { ANY_DATE } from './stages/dates';
import type { Edge } from './stages/edges';
import { type IdentityHit, identityHits } from './stages/identity';
import { type Line, linesOf } from './stages/lines';
import { type ListRow, listRows } from './stages/list';
import { notSoil, SOIL_WORDS } from './stages/matter';
import type { NotTaken } from './stages/notTaken';
import { edgesOf } from './stages/panels';
import { type ProseRefusal, paragraphsOf, proseRows } from './stages/prose';
import { adviceOfLines, adviceOfTable, withSampleNames } from './stages/recommendations';
import type { Run } from './stages/runs';
import { laboratoryName, type Statements, statementsOf, type ZoneBox, zoneAt, zonesOf } from './stages/sections';
import { rowsOfTable, type TableRow } from './stages/tableRows';
import { type Table, tablesOf } from './stages/tables';
import { type NumberStyle, numberStyle } from './stages/values';
import { type Upright, uprightWords } from './stages/words';
import { type Page, type Reading, type Remark, refusedReading } from './types';

/** What each stage saw, kept so that a person can see why a number was read. */
export type Trace = {
  readonly pages: readonly Upright[];
  readonly lines: readonly CellLine[];
  /** Upright edges between parts of a page that have lines of their own. */
  readonly edges: readonly (Edge & { readonly page: number })[];
  readonly zones: readonly ZoneBox[];
  readonly tables: readonly Table[];
  readonly listRows: readonly ListRow[];
  readonly runs: readonly Run[];
  readonly notTaken: readonly NotTaken[];
  readonly proseRefused: readonly ProseRefusal[];
  readonly identity: readonly IdentityHit[];
  readonly contexts: readonly Context[];
  readonly statements: Statements;
};

/** A letter tells its numbers in sentences; a report with tables repeats them there, or speaks of soils in general. */
const ENOUGH_WITHOUT_SENTENCES = 4;

/** A page whose parts were told apart by position alone. */
const PARTED = 0.95;

const NO_TEXT = remark(
  'no-text-layer',
  'This file holds only pictures, and no print could be made out in them. It is kept; type the numbers in beside the page.',
);
export const NO_RESULTS = remark(
  'no-results',
  'No soil-test results were found in this file. It is kept; if it is a report, type the numbers in beside the page.',
);

/** Lines restricted to the phrases that stand in results; advice and notes go their own way. */
function split(lines: readonly CellLine[], zones: readonly ZoneBox[]): { results: CellLine[]; advice: CellLine[] } {
  const results: CellLine[] = [];
  const advice: CellLine[] = [];
  for (const line of lines) {
    const zoneOf = (cell: CellLine['cells'][number]) =>
      zoneAt(zones, cell.phrase.page.number, cell.phrase.x0, cell.phrase.y0);
    const pick = (zone: 'results' | 'recommendation') => {
      const cells = line.cells.filter((cell) => zoneOf(cell) === zone);
      return { ...line, cells, values: cells.filter((cell) => cell.meaning.kind === 'value').length };
    };
    if (line.cells.every((cell) => zoneOf(cell) === 'results')) results.push(line);
    else {
      const [kept, given] = [pick('results'), pick('recommendation')];
      if (kept.cells.length > 0) results.push(kept);
      if (given.cells.length > 0) advice.push(given);
    }
  }
  return { results, advice };
}

function isContext(from: Context | Identity): from is Context {
  return 'identity' in from;
}

function identityFrom(from: Context | Identity | null, shared: Identity): Identity {
  if (from === null) return {};
  return isContext(from) ? from.identity : withShared(from, shared);
}

function partsOf(tables: readonly TableRow[], list: readonly ListRow[], contexts: readonly Context[]): SamplePart[] {
  const shared = contexts[0]?.identity ?? {};
  const placed: { page: number; y: number; part: SamplePart }[] = tables.map((row) => {
    const [page, y] = [row.line.line.page.number, row.line.line.y0];
    const own =
      row.identity.sampleId !== undefined ||
      row.identity.labNumber !== undefined ||
      row.identity.fieldName !== undefined;
    const identity = own
      ? withShared(row.identity, shared)
      : { ...row.identity, ...contextAt(contexts, page, y, row.line.cells[0]?.phrase.x0)?.identity };
    return { page, y, part: { identity, candidates: row.candidates } };
  });
  const byContext = new Map<Context | Identity | null, { page: number; y: number; candidates: Candidate[] }>();
  for (const row of list) {
    const [page, y] = [row.line.line.page.number, row.line.line.y0];
    const context = row.identity ?? contextAt(contexts, page, y, row.x0);
    const group = byContext.get(context) ?? { page, y, candidates: [] };
    group.candidates.push(row.candidate);
    byContext.set(context, group);
  }
  for (const [context, group] of byContext) {
    placed.push({
      page: group.page,
      y: group.y,
      part: { identity: identityFrom(context, shared), candidates: group.candidates },
    });
  }
  return placed.sort((a, b) => a.page - b.page || a.y - b.y).map((one) => one.part);
}

/** Numbers of pages that were parted, and of samples without a name beside named ones, are given with less confidence. */
function unsureOfPlace(parts: readonly SamplePart[], edges: Seen['edges']): SamplePart[] {
  const parted = new Set(edges.map((edge) => edge.page));
  const named = parts.filter((part) => part.identity.sampleId !== undefined || part.identity.labNumber !== undefined);
  return parts.map((part) => {
    const nameless = named.length > 0 && !named.includes(part);
    const candidates = part.candidates.map((one) => ({
      ...one,
      position: one.position * (one.page !== null && parted.has(one.page) ? PARTED : 1),
      doubts: nameless
        ? [
            ...one.doubts,
            remark('sample-unclear', 'The page does not say clearly which sample this number belongs to.'),
          ]
        : one.doubts,
    }));
    return { ...part, candidates };
  });
}

/** Pages that are about soil, and what the others are. A page that does not say goes with the page before it. */
function soilPages(
  lines: readonly CellLine[],
  pages: readonly Upright[],
): { soil: ReadonlySet<number>; other: string | null } {
  const soil = new Set<number>();
  let other: string | null = null;
  let before: string | null = null;
  for (const page of pages) {
    const own = lines.filter((line) => line.line.page === page);
    const titled = own.some((line) => SOIL_WORDS.test(line.line.text));
    before = notSoil(own) ?? (titled ? null : before);
    if (before === null) soil.add(page.number);
    else other ??= before;
  }
  return { soil, other };
}

type Seen = { lines: CellLine[]; texts: string[]; style: NumberStyle; edges: (Edge & { page: number })[] };

function traced(pages: readonly Upright[]): Seen {
  const whole: Line[] = pages.flatMap((page) => linesOf(page));
  const style = numberStyle(pages.flatMap((page) => page.words.map((word) => word.text)));
  const legend = legendOf(whole.map((line) => line.text));
  const first = cellsOf(whole, style, legend);
  const edges = new Map(pages.map((page) => [page, edgesOf(page, first)]));
  const parted = pages.some((page) => (edges.get(page)?.length ?? 0) > 0);
  const lines = parted
    ? cellsOf(
        pages.flatMap((page) => linesOf(page, edges.get(page))),
        style,
        legend,
      )
    : first;
  const texts = lines.map((line) => line.line.text);
  return {
    lines,
    texts,
    style,
    edges: [...edges].flatMap(([page, list]) => list.map((edge) => ({ ...edge, page: page.number }))),
  };
}

/**
 * Reads a report given as pages of placed words. Pure: the same pages give the same reading.
 * Stages: words, lines, cells, sections and identity, columns and headings, rows, samples, checks; each stage's output
 * is in the trace. Errors: none are thrown for content; a file with nothing to read is a refused reading.
 */
export function readPagesTraced(input: { fileName: string; pages: readonly Page[] }): {
  reading: Reading;
  trace: Trace | null;
} {
  const file = input.fileName;
  const count = input.pages.length;
  const upright = input.pages.map((page) => uprightWords(page));
  const bare = upright.filter((page) => page.words.length < 3);
  if (bare.length === upright.length)
    return { reading: refusedReading({ file, pages: count, error: NO_TEXT }), trace: null };
  const { lines, texts, style, edges } = traced(upright);
  const { soil, other } = soilPages(lines, upright);
  const warnings: Remark[] = [];
  if (bare.length > 0)
    warnings.push(
      remark('page-without-text', `${bare.length} of ${count} pages hold only a picture and were not read.`),
    );
  if (other !== null)
    warnings.push(
      remark(
        'not-soil',
        `This looks like ${other}, not a soil test; ${soil.size === 0 ? 'nothing' : 'only the soil pages'} of it was taken.`,
      ),
    );
  const lab = { name: laboratoryName(lines) };
  if (soil.size === 0) {
    return {
      reading: { file, kind: 'not-soil', error: null, pages: count, warnings, lab, samples: [], recommendations: [] },
      trace: null,
    };
  }
  const ofSoil = lines.filter((line) => soil.has(line.line.page.number));
  const zones = zonesOf(ofSoil);
  const { results, advice } = split(ofSoil, zones);
  const tables = tablesOf(results);
  const taken = new Set(tables.flatMap((table) => [...table.header, ...table.rows]));
  const notTaken: NotTaken[] = [];
  const tableRows = tables.flatMap((table) => rowsOfTable(table, notTaken));
  const list = listRows(results, taken);
  for (const run of list.runs) for (const line of run.sampleLines) taken.add(line);
  const structured = list.rows.length + tableRows.reduce((sum, row) => sum + row.candidates.length, 0);
  const cards = structured < ENOUGH_WITHOUT_SENTENCES ? cardRows(results, taken) : [];
  const prose =
    structured < ENOUGH_WITHOUT_SENTENCES && cards.length < ENOUGH_WITHOUT_SENTENCES
      ? proseRows(paragraphsOf(results, taken), style)
      : { rows: [], refused: [] };
  const toldAlready = new Set(list.rows.map((row) => row.candidate.label.analyte));
  const apart = cards.length >= ENOUGH_WITHOUT_SENTENCES ? cards : [];
  const rows = [
    ...list.rows,
    ...apart.filter((row) => !toldAlready.has(row.candidate.label.analyte)),
    ...prose.rows.filter((row) => !toldAlready.has(row.candidate.label.analyte)),
  ];
  const hits = identityHits(ofSoil, taken);
  const contexts = contextsOf(hits);
  const statements = statementsOf(texts);
  const parts = unsureOfPlace(partsOf(tableRows, rows, contexts), edges);
  const dateTexts = texts.filter((text) => ANY_DATE.test(text));
  const { samples, warnings: found } = assemble({ parts, statements, dateTexts });
  const trace: Trace = {
    pages: upright,
    lines,
    edges,
    zones,
    tables,
    listRows: rows,
    proseRefused: prose.refused,
    runs: list.runs,
    notTaken: [...notTaken, ...list.notTaken],
    identity: hits,
    contexts,
    statements,
  };
  if (samples.length === 0) return { reading: refusedReading({ file, pages: count, error: NO_RESULTS }), trace };
  const sampleAt = (line: CellLine) =>
    contextAt(contexts, line.line.page.number, line.line.y0)?.identity.sampleId ?? null;
  const names = samples.flatMap((sample) => sample.sampleId ?? []);
  const recommendations = withSampleNames(
    [...adviceOfTable(tableRows), ...adviceOfLines(advice, zones, sampleAt)],
    names,
  );
  return {
    reading: {
      file,
      kind: 'soil',
      error: null,
      pages: count,
      warnings: [...warnings, ...found],
      lab,
      samples,
      recommendations,
    },
    trace,
  };
}

/** The reading alone; see readPagesTraced. */
export function readPages(input: { fileName: string; pages: readonly Page[] }): Reading {
  return readPagesTraced(input).reading;
}
