import type { Candidate, Identity } from '../candidate';
import { methodInAny, readLabel, unitOnly } from '../labels/label';
import { type CellLine, numberBox, type PageCell } from './cells';
import { choose, isAdvice, NOT_RESULTS, unitUnder, valuesOf } from './chosen';
import type { NotTaken } from './notTaken';
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

/** Units in which one amount is said twice; a unit of any other kind in a label is the row's own. */
const AMOUNTS: ReadonlySet<string> = new Set(['mg/kg', 'lb/acre', 'kg/ha', 'mg/L', 'mg/dm3', 'mg/100g']);

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
  const plain = underSection(segment, run);
  // "pH value | 0.01 M CaCl2": the column of methods says which pH it is.
  const salt =
    plain.analyte === 'soil_ph_water' && /cacl ?2|calcium chloride|\bkcl\b/i.test(words)
      ? (readLabel(`pH ${words.trim()}`) ?? readLabel(/kcl/i.test(words) ? 'pH KCl' : 'pH CaCl2'))
      : null;
  const label = salt?.analyte === 'soil_ph_salt' ? { ...salt, text: plain.text } : plain;
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
          one.unitFrom === 'heading' && label.unit !== null && (!severalUnits(run) || !AMOUNTS.has(label.unit))
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

/** "1, 2, 3 …" before the names of a list count its rows. */
function withoutSerials(lines: readonly CellLine[]): CellLine[] {
  const serial = (line: CellLine) => {
    const [first, next] = line.cells;
    const whole = first?.meaning.kind === 'value' && /^\d{1,2}\.?$/.test(first.phrase.text) && next !== undefined;
    return whole ? Number.parseInt(first.phrase.text, 10) : null;
  };
  const counted = new Set<CellLine>();
  let run: { line: CellLine; number: number }[] = [];
  for (const line of lines) {
    const number = serial(line);
    if (number === null) continue;
    const last = run[run.length - 1];
    const follows =
      last !== undefined &&
      number === last.number + 1 &&
      Math.abs((last.line.cells[0]?.phrase.x1 ?? 0) - (line.cells[0]?.phrase.x1 ?? 0)) < 8;
    run = follows ? [...run, { line, number }] : [{ line, number }];
    if (run.length >= 4) for (const one of run) counted.add(one.line);
  }
  if (counted.size === 0) return [...lines];
  return lines.map((line) =>
    counted.has(line) ? { ...line, cells: line.cells.slice(1), values: line.values - 1 } : line,
  );
}

/**
 * A number set in the middle of the height of its row, half a line off its name, is put on the name's line: a line of
 * nothing but numbers, units and ratings that overlaps in height with a line of words that has no number.
 */
function withSlipped(lines: readonly CellLine[], taken: ReadonlySet<CellLine>): CellLine[] {
  const gone = new Set<CellLine>();
  const merged = new Map<CellLine, CellLine>();
  const bare = (line: CellLine) =>
    line.values > 0 && line.cells.every((cell) => cell.meaning.kind !== 'text' || unitOnly(cell.phrase.text) !== null);
  for (const [at, line] of lines.entries()) {
    if (taken.has(line) || !bare(line) || line.values > 2) continue;
    const home = [lines[at + 1], lines[at - 1]].find((other) => {
      if (
        other === undefined ||
        taken.has(other) ||
        other.values > 0 ||
        other.line.page !== line.line.page ||
        merged.has(other)
      )
        return false;
      const shared = Math.min(other.line.y1, line.line.y1) - Math.max(other.line.y0, line.line.y0);
      const first = other.cells[0];
      return (
        shared > 0.2 * line.line.size &&
        first !== undefined &&
        first.meaning.kind === 'text' &&
        first.phrase.x0 < (line.cells[0]?.phrase.x0 ?? 0) &&
        readLabel(first.phrase.text) !== null
      );
    });
    if (home === undefined) continue;
    gone.add(line);
    merged.set(home, {
      ...home,
      cells: [...home.cells, ...line.cells].sort((a, b) => a.phrase.x0 - b.phrase.x0),
      values: line.values,
    });
  }
  return lines.flatMap((line) => (gone.has(line) ? [] : [merged.get(line) ?? line]));
}

/**
 * Stage 6b. Analytes down the side, their numbers to the right: labels (wrapped ones put together), rows in runs, the
 * columns of each run with what their headings say, and of each row the numbers that are results. What is not taken is
 * kept with the evidence.
 */
export function listRows(
  all: readonly CellLine[],
  taken: ReadonlySet<CellLine>,
): { rows: ListRow[]; runs: Run[]; notTaken: NotTaken[] } {
  const lines = withSlipped(withoutSerials(all), taken);
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
