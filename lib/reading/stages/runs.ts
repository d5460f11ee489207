import { type Label, readLabel } from '../labels/label';
import type { CellLine } from './cells';
import type { Segment } from './rowLabels';
import { headingsOver, isFieldLine, isHeadingLine, type RunColumn, runColumns } from './runColumns';

export type Run = {
  readonly segments: readonly Segment[];
  readonly headings: readonly CellLine[];
  readonly columns: readonly RunColumn[];
  /** Heading lines that name the samples side by side; they speak of no other sample. */
  readonly sampleLines: readonly CellLine[];
  readonly sections: readonly { readonly page: number; readonly y0: number; readonly text: string }[];
};

type Span = { x0: number; x1: number };

/** True when two spans share some of their width. */
export function overlapping(a: Span, b: Span): boolean {
  return Math.min(a.x1, b.x1) > Math.max(a.x0, b.x0);
}

function extent(segment: Segment): Span {
  return { x0: segment.x0, x1: Math.max(segment.x1, ...segment.cells.map((cell) => cell.phrase.x1)) };
}

function middle(span: Span): number {
  return (span.x0 + span.x1) / 2;
}

/** The samples named once at the head of a page hold for the lists under it that have their columns in the same places. */
function namedFromAbove(run: Run, before: readonly Run[]): readonly RunColumn[] {
  const first = run.segments[0]?.line.line;
  const nameless = run.columns.every((column) => Object.keys(column.identity).length === 0 && column.free === null);
  const over = before.findLast(
    (other) =>
      other.segments[0]?.line.line.page === first?.page &&
      other.columns.filter(
        (column) =>
          column.identity.sampleId !== undefined || column.identity.labNumber !== undefined || column.free !== null,
      ).length >= 2,
  );
  if (!nameless || over === undefined || run.columns.length < 2) return run.columns;
  const named = over.columns.filter((column) => column.free !== null || Object.keys(column.identity).length > 0);
  const steps = named.slice(1).map((column, index) => middle(column) - middle(named[index] ?? column));
  const reach = Math.min(...steps) / 2;
  return run.columns.map((column) => {
    const home = [...named].sort(
      (a, b) => Math.abs(middle(a) - middle(column)) - Math.abs(middle(b) - middle(column)),
    )[0];
    if (home === undefined || Math.abs(middle(home) - middle(column)) > reach) return column;
    return { ...column, identity: home.identity, free: home.free };
  });
}

/** Rows under one another with their labels in one column, parted by headings and by pages. */
export function runsOf(lines: readonly CellLine[], segments: readonly Segment[], taken: ReadonlySet<CellLine>): Run[] {
  const open: { segments: Segment[]; span: Span; labels: Span }[] = [];
  const index = new Map(lines.map((line, at) => [line, at]));
  for (const segment of segments) {
    const span = extent(segment);
    const home = open.findLast((run) => {
      const last = run.segments[run.segments.length - 1];
      if (last === undefined || last.line.line.page !== segment.line.line.page || last.line === segment.line)
        return false;
      if (!overlapping(run.labels, segment)) return false;
      const between = lines.slice((index.get(last.line) ?? 0) + 1, index.get(segment.line));
      return (
        !between.some((line) => isHeadingLine(line, run.span)) &&
        segment.line.line.y0 >= last.line.line.y0 &&
        segment.line.line.y0 - last.line.line.y1 < 14 * segment.line.line.size
      );
    });
    if (home === undefined) open.push({ segments: [segment], span, labels: { x0: segment.x0, x1: segment.x1 } });
    else {
      home.segments.push(segment);
      home.span = { x0: Math.min(home.span.x0, span.x0), x1: Math.max(home.span.x1, span.x1) };
      home.labels = { x0: Math.min(home.labels.x0, segment.x0), x1: Math.max(home.labels.x1, segment.x1) };
    }
  }
  const busy = new Set([...taken, ...segments.map((segment) => segment.line)]);
  const runs = open.map((run) => {
    const first = run.segments[0];
    const size = first?.line.line.size ?? 10;
    // A heading of the last column may reach further right than its numbers, but not into the next list.
    const right = Math.min(
      ...open
        .filter((other) => other !== run && other.labels.x0 > run.span.x0 + size && other.labels.x0 >= run.labels.x1)
        .map((other) => other.labels.x0 - 0.5 * size),
      run.span.x1 + 6 * size,
    );
    const within = { x0: run.span.x0 - 1.5 * size, x1: Math.max(right, run.span.x1) };
    const headings = first === undefined ? [] : headingsOver(lines, first, within, busy);
    const columns = runColumns(run.segments, headings, within);
    const named = columns.filter((column) => Object.keys(column.identity).length > 0);
    const sampleLines = named.length >= 2 ? headings.filter((line) => isFieldLine(line, within)) : [];
    return {
      segments: run.segments,
      headings,
      columns,
      sampleLines,
      sections: sectionsOf(lines, run.segments, run.span),
    };
  });
  return runs.map((run, at) => ({ ...run, columns: namedFromAbove(run, runs.slice(0, at)) }));
}

/** "Base saturation, %" or "Trace elements (DTPA), ppm" over the rows of a list adds what the rows leave open. */
export function underSection(segment: Segment, run: Run): Label {
  const section = run.sections.findLast(
    (one) => one.y0 < segment.line.line.y0 && one.page === segment.line.line.page.number,
  );
  if (section === undefined) return segment.label;
  const named = readLabel(segment.label.text, [section.text]);
  if (named === null) return segment.label;
  const share = named.analyte.startsWith('sat_') && segment.label.unit === null;
  const same = named.analyte === segment.label.analyte;
  if (!share && !same) return segment.label;
  return {
    ...named,
    unit: segment.label.unit ?? named.unit,
    unitPrinted: segment.label.unitPrinted ?? named.unitPrinted,
    strength: segment.label.strength,
  };
}

/** Lines of one phrase between the rows, over them or among them, that speak of units, methods or shares. */
function sectionsOf(lines: readonly CellLine[], segments: readonly Segment[], span: Span): Run['sections'] {
  const [first, last] = [segments[0], segments[segments.length - 1]];
  if (first === undefined || last === undefined) return [];
  const from = Math.max(0, lines.indexOf(first.line) - 3);
  const wrapped = new Set(segments.flatMap((segment) => segment.wrapped));
  return lines.slice(from, lines.indexOf(last.line)).flatMap((line) => {
    const cells = line.cells.filter((cell) => overlapping(cell.phrase, span));
    const [cell] = cells;
    if (
      cell === undefined ||
      cells.length !== 1 ||
      line.values > 0 ||
      wrapped.has(line) ||
      cell.meaning.kind !== 'text'
    )
      return [];
    if (line.line.page !== first.line.line.page || cell.phrase.words.length > 8) return [];
    return [{ page: line.line.page.number, y0: line.line.y0, text: cell.phrase.text }];
  });
}
