import type { Candidate, Identity } from '../candidate';
import { methodInAny, readLabel } from '../labels/label';
import { type CellLine, numberBox, type PageCell } from './cells';
import { choose, isAdvice, NOT_RESULTS, unitUnder, valuesOf } from './chosen';
import type { NotTaken } from './roles';
import type { Segment } from './rowLabels';
import { overlapping, type Run, runsOf, underSection } from './runs';
import { segmentsOf } from './segments';
import { storedBox } from './words';

/** A number of a list with the line it stands on, so that the right sample can be found. */
export type ListRow = {
  readonly candidate: Candidate;
  readonly line: CellLine;
  readonly x0: number;
  /** The sample over the number's column, when samples stand side by side. */
  readonly identity: Identity | null;
};

/** Columns of one amount in several units: there the heading of the column decides, not the label. */
function severalUnits(run: Run): boolean {
  return new Set(run.columns.flatMap((column) => column.unit?.unit ?? [])).size > 1;
}

function rowsOf(segment: Segment, run: Run, not: NotTaken[], lines: readonly CellLine[], at: number): ListRow[] {
  const { found, words } = valuesOf(segment, run);
  for (const one of found) {
    const under = one.unit === null && segment.label.unit === null ? unitUnder(lines, at, one.cell) : null;
    if (under !== null) [one.unit, one.unitPrinted] = [under.unit, under.printed];
  }
  if (segment.rowRole !== null && NOT_RESULTS.has(segment.rowRole)) {
    for (const one of found)
      not.push({ cell: one.cell, role: segment.rowRole, why: `its row says ${segment.rowRole}` });
    return [];
  }
  const advised = found.filter((one) => isAdvice(segment, one.unit ?? segment.label.unit, run));
  if (advised.length > 0) {
    for (const one of found)
      not.push({ cell: one.cell, role: 'recommendation', why: `"${segment.label.text}" is an amount to spread` });
    return [];
  }
  const choice = choose(found, run);
  not.push(...choice.not);
  const label = underSection(segment, run);
  const wrappedWords = segment.wrapped.flatMap((line) => line.cells.map((cell) => cell.phrase.text)).join(' ');
  const method = label.method === null ? methodInAny(label.analyte, `${words} ${wrappedWords} ${segment.tail}`) : null;
  return choice.taken.map(({ one, identity }): ListRow => {
    const share =
      (one.unit === '%' || label.unit === '%') && !label.analyte.startsWith('sat_')
        ? readLabel(`${label.text} %`)
        : null;
    const better = share?.analyte.startsWith('sat_') && label.unit === null ? share : label;
    const headMethod = one.column === null ? null : methodInAny(label.analyte, one.column.heading);
    const taken = label.method ?? method?.method ?? headMethod?.method ?? null;
    return {
      line: segment.line,
      x0: segment.x0,
      identity,
      candidate: {
        label: { ...better, text: label.text },
        value: one.value,
        rating: one.rating,
        unit:
          one.unitFrom === 'heading' && label.unit !== null && !severalUnits(run)
            ? label.unit
            : (one.unit ?? label.unit),
        unitPrinted: one.unit === null ? label.unitPrinted : one.unitPrinted,
        method: taken,
        methodPrinted: label.methodPrinted ?? method?.printed ?? headMethod?.printed ?? null,
        page: segment.line.line.page.number,
        box: storedBox(segment.line.line.page, numberBox(one.cell.phrase, one.value.span)),
        cell: null,
        position: choice.position,
        doubts: choice.doubts,
      },
    };
  });
}

/**
 * Stage 6b. Analytes down the side, their numbers to the right: labels (wrapped ones put together), rows in runs, the
 * columns of each run with what their headings say, and of each row the numbers that are results. What is not taken is
 * kept with the evidence.
 */
export function listRows(
  lines: readonly CellLine[],
  taken: ReadonlySet<CellLine>,
): { rows: ListRow[]; runs: Run[]; notTaken: NotTaken[] } {
  const first = runsOf(
    lines,
    segmentsOf(lines, taken, () => false),
    taken,
  );
  // Columns of methods, units and ratings hold words that can look like labels; with them known, labels are found anew.
  const silent = first.flatMap((run) =>
    run.columns
      .filter((column) => column.role === 'method' || column.role === 'unit' || column.role === 'rating')
      .map((column) => ({ run, column })),
  );
  const notLabel = (cell: PageCell) =>
    silent.some(
      ({ run, column }) =>
        overlapping(column, cell.phrase) &&
        run.segments.some(
          (segment) =>
            segment.line.line.page === cell.phrase.page && Math.abs(segment.line.line.y0 - cell.phrase.y0) < 2,
        ),
    );
  const runs = silent.length === 0 ? first : runsOf(lines, segmentsOf(lines, taken, notLabel), taken);
  const notTaken: NotTaken[] = [];
  const index = new Map(lines.map((line, at) => [line, at]));
  const rows = runs.flatMap((run) =>
    run.segments.flatMap((segment) => rowsOf(segment, run, notTaken, lines, index.get(segment.line) ?? 0)),
  );
  return { rows, runs, notTaken };
}
