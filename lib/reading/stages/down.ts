import { type Candidate, type Identity, remark } from '../candidate';
import { type Label, methodIn, methodInAny, readLabel, unitIn, unitOnly } from '../labels/label';
import type { Remark } from '../types';
import { type CellLine, numberBox, type PageCell } from './cells';
import { fieldOf, fieldWithValue, isCode } from './identity';
import { type NotTaken, type Role, roleOf } from './roles';
import { isRatingHere, labelText, rowRoleOf, type Segment, wrappedLabel } from './rowLabels';
import { headingsOver, isFieldLine, isHeadingLine, type RunColumn, runColumns } from './runColumns';
import type { Value } from './values';
import { storedBox } from './words';

/** A number of a list with the line it stands on, so that the right sample can be found. */
export type ListRow = {
  readonly candidate: Candidate;
  readonly line: CellLine;
  readonly x0: number;
  /** The sample over the number's column, when samples stand side by side. */
  readonly identity: Identity | null;
};

export type Run = {
  readonly segments: readonly Segment[];
  readonly headings: readonly CellLine[];
  readonly columns: readonly RunColumn[];
  /** Heading lines that name the samples side by side; they speak of no other sample. */
  readonly sampleLines: readonly CellLine[];
  readonly sections: readonly { readonly page: number; readonly y0: number; readonly text: string }[];
};

const NUMBERLIKE = new Set(['value', 'none', 'range']);

function hasNumberAfter(line: CellLine, index: number): boolean {
  return line.cells
    .slice(index + 1)
    .some((cell) => cell.meaning.kind === 'value' || cell.meaning.kind === 'none' || cell.meaning.kind === 'range');
}

type Start = { index: number; label: Label; cell: PageCell; wrapped: readonly CellLine[]; x1: number; tail: string };

/** Labels of one line. A second label begins only after a number of the first. */
function startsOf(lines: readonly CellLine[], at: number, notLabel: (cell: PageCell) => boolean): Start[] {
  const line = lines[at];
  if (line === undefined) return [];
  const starts: Start[] = [];
  for (const [index, cell] of line.cells.entries()) {
    if (NUMBERLIKE.has(cell.meaning.kind) || cell.meaning.kind === 'date' || isRatingHere(line, index)) continue;
    if (!hasNumberAfter(line, index) || notLabel(cell)) continue;
    if (fieldOf(cell.phrase.text) !== null && cell.phrase.text.trim().endsWith(':')) continue;
    const last = starts[starts.length - 1];
    const filled =
      last !== undefined && line.cells.slice(last.index + 1, index).some((one) => NUMBERLIKE.has(one.meaning.kind));
    const next = line.cells.slice(index + 1).find((one) => NUMBERLIKE.has(one.meaning.kind));
    const end = next?.phrase.x0 ?? cell.phrase.x1;
    const valued = line.cells
      .slice(index + 1)
      .some((one) => one.meaning.kind === 'value' || one.meaning.kind === 'none');
    if (last !== undefined && filled && !valued) continue;
    const found = wrappedLabel(lines, at, cell, end);
    if (found === null || (fieldOf(cell.phrase.text) !== null && found.lines.length === 0)) continue;
    if (last !== undefined && !filled) {
      const joined = readLabel(`${labelText(last.cell.phrase.text)} ${labelText(cell.phrase.text)}`);
      if (joined !== null && joined.analyte === last.label.analyte) continue;
      const share = readLabel(labelText(cell.phrase.text), [last.cell.phrase.text]);
      if (found.label.analyte === last.label.analyte) continue;
      starts[starts.length - 1] = {
        index,
        label: joined ?? share ?? found.label,
        cell,
        wrapped: found.lines,
        x1: found.x1,
        tail: found.tail,
      };
      continue;
    }
    starts.push({ index, label: found.label, cell, wrapped: found.lines, x1: found.x1, tail: found.tail });
  }
  return starts;
}

type Group = { readonly label: Label; readonly line: CellLine; readonly cell: PageCell };

/** An analyte alone on its line, over rows that say "ppm", "Mehlich-3" or "Value found". */
function groupOn(line: CellLine): Group | null {
  const [first, ...rest] = line.cells;
  if (
    first === undefined ||
    rest.some((cell) => NUMBERLIKE.has(cell.meaning.kind)) ||
    NUMBERLIKE.has(first.meaning.kind)
  )
    return null;
  const label = readLabel(labelText(first.phrase.text));
  return label === null || label.strength < 0.96 ? null : { label, line, cell: first };
}

/** A row under a group heading: its own words give the role, the unit or the method. */
function rowOfGroup(line: CellLine, group: Group | null): Segment | null {
  const first = line.cells[0];
  if (group === null || first === undefined || first.meaning.kind !== 'text') return null;
  if (!line.cells.slice(1).some((cell) => NUMBERLIKE.has(cell.meaning.kind))) return null;
  if (first.phrase.x0 < group.cell.phrase.x0 - 1 || fieldWithValue(first.phrase.text) !== null) return null;
  const text = labelText(first.phrase.text);
  const rowRole = rowRoleOf(text);
  const tells = rowRole !== null || unitOnly(text) !== null || methodIn(group.label.analyte, text) !== null;
  const label = readLabel(`${group.label.text} ${text}`, []) ?? group.label;
  if (!tells && readLabel(`${group.label.text} ${text}`) === null) return null;
  const unit = unitIn(text);
  return {
    line,
    label: {
      ...(label.analyte === group.label.analyte ? label : group.label),
      text: `${group.label.text} ${text}`,
      unit: label.unit ?? group.label.unit ?? unit?.unit ?? null,
      unitPrinted: label.unitPrinted ?? group.label.unitPrinted ?? unit?.printed ?? null,
    },
    x0: group.cell.phrase.x0,
    x1: first.phrase.x1,
    cells: line.cells.slice(1),
    wrapped: [],
    rowRole: rowRole === 'result' ? null : rowRole,
    tail: '',
  };
}

/** Label set over and under a line that holds only its numbers. */
function labelAround(lines: readonly CellLine[], at: number): Segment | null {
  const [above, line, under] = [lines[at - 1], lines[at], lines[at + 1]];
  const [first, over, below] = [line?.cells[0], above?.cells[0], under?.cells[0]];
  if (line === undefined || first?.meaning.kind !== 'value' || above === undefined || under === undefined) return null;
  if (over === undefined || below === undefined || above.values !== 0 || under.values !== 0) return null;
  if (
    Math.abs(over.phrase.x0 - below.phrase.x0) > over.phrase.size ||
    over.phrase.x1 > first.phrase.x0 + over.phrase.size
  )
    return null;
  if (
    first.phrase.y0 - over.phrase.y1 > 0.3 * first.phrase.size ||
    below.phrase.y0 - first.phrase.y1 > 0.3 * first.phrase.size
  )
    return null;
  const label = readLabel(labelText(`${over.phrase.text} ${below.phrase.text}`));
  if (label === null) return null;
  return {
    line,
    label: { ...label, strength: Math.min(label.strength, 0.96) },
    x0: over.phrase.x0,
    x1: Math.max(over.phrase.x1, below.phrase.x1),
    cells: line.cells,
    wrapped: [above, under],
    rowRole: null,
    tail: '',
  };
}

function segmentsOf(
  lines: readonly CellLine[],
  taken: ReadonlySet<CellLine>,
  notLabel: (cell: PageCell) => boolean,
): Segment[] {
  const segments: Segment[] = [];
  let group: Group | null = null;
  for (const [at, line] of lines.entries()) {
    if (taken.has(line)) continue;
    if (
      group !== null &&
      (group.line.line.page !== line.line.page || line.line.y0 - group.line.line.y1 > 9 * line.line.size)
    )
      group = null;
    if (!line.cells.some((cell) => NUMBERLIKE.has(cell.meaning.kind))) {
      group = groupOn(line) ?? group;
      continue;
    }
    const starts = startsOf(lines, at, notLabel);
    if (starts.length === 0) {
      const one = labelAround(lines, at) ?? rowOfGroup(line, group);
      if (one !== null) segments.push(one);
      continue;
    }
    for (const [order, start] of starts.entries()) {
      const end = starts[order + 1]?.index ?? line.cells.length;
      segments.push({
        line,
        label: start.label,
        x0: start.cell.phrase.x0,
        x1: start.x1,
        cells: line.cells.slice(start.index + 1, end),
        wrapped: start.wrapped,
        rowRole: null,
        tail: start.tail,
      });
    }
    const first = starts[0];
    if (group !== null && first !== undefined && first.cell.phrase.x0 <= group.cell.phrase.x0 + 1) group = null;
  }
  return segments;
}

type Span = { x0: number; x1: number };

function overlapping(a: Span, b: Span): boolean {
  return Math.min(a.x1, b.x1) > Math.max(a.x0, b.x0);
}

function extent(segment: Segment): Span {
  return { x0: segment.x0, x1: Math.max(segment.x1, ...segment.cells.map((cell) => cell.phrase.x1)) };
}

/** Rows under one another with their labels in one column, parted by headings and by pages. */
function runsOf(lines: readonly CellLine[], segments: readonly Segment[], taken: ReadonlySet<CellLine>): Run[] {
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
  return open.map((run) => {
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
}

const NOT_RESULTS = new Set<Role>([
  'desired',
  'previous',
  'limit',
  'difference',
  'recommendation',
  'rating',
  'method',
  'date',
]);

type Found = {
  value: Value;
  cell: PageCell;
  column: RunColumn | null;
  unit: Value['unit'];
  unitPrinted: string | null;
  rating: string | null;
  /** Words just before the number on its own line: "Found", "Desired". */
  said: Role | null;
};

function columnOf(columns: readonly RunColumn[], cell: PageCell): RunColumn | null {
  return columns.find((column) => overlapping(column, cell.phrase)) ?? null;
}

function valuesOf(segment: Segment, run: Run): { found: Found[]; words: string } {
  const found: Found[] = [];
  let words = '';
  let ahead: { unit: NonNullable<Value['unit']>; printed: string } | null = null;
  let said: Role | null = null;
  let before: PageCell | null = null;
  const headed = run.columns.some((column) => column.role !== null || column.unit !== null || column.free !== null);
  for (const cell of segment.cells) {
    const column = columnOf(run.columns, cell);
    const last = found[found.length - 1];
    const unit = unitOnly(cell.phrase.text);
    if (column?.role === 'rating' && isRatingText(cell)) {
      for (const one of ratedBy(found, run, column))
        one.rating ??= cell.meaning.kind === 'rating' ? cell.meaning.rating : cell.phrase.text;
      before = cell;
      continue;
    }
    if (cell.meaning.kind === 'value' && column?.role !== 'method' && column?.role !== 'unit') {
      found.push({
        value: cell.meaning,
        cell,
        column,
        unit: cell.meaning.unit ?? column?.unit?.unit ?? ahead?.unit ?? null,
        unitPrinted: cell.meaning.unitPrinted ?? column?.unit?.printed ?? ahead?.printed ?? null,
        rating: cell.meaning.rating,
        said,
      });
      said = null;
    } else if (
      unit !== null &&
      last !== undefined &&
      before === last.cell &&
      cell.phrase.x0 - last.cell.phrase.x1 < 3 * cell.phrase.size &&
      column?.role !== 'unit'
    ) {
      // A unit right behind its number outranks the unit over the column.
      [last.unit, last.unitPrinted] = [unit.unit, unit.printed];
    } else if (unit !== null) {
      for (const one of column?.role === 'unit'
        ? found.filter((other) => other.unit === null)
        : last === undefined
          ? []
          : [last])
        if (one.unit === null) [one.unit, one.unitPrinted] = [unit.unit, unit.printed];
      if (found.length === 0) ahead = unit;
    } else if (cell.meaning.kind === 'rating' && last !== undefined) {
      const owner =
        column?.role === 'rating' || column === null
          ? (found.find((one) => !NOT_RESULTS.has(one.column?.role ?? 'unknown') && one.said === null) ?? last)
          : last;
      const nearest = run.columns.filter((one) => one.role === 'rating').length > 1 ? last : owner;
      nearest.rating ??= cell.meaning.rating;
    } else if (cell.meaning.kind === 'text') {
      const role = roleOf(labelText(cell.phrase.text), false);
      if (role !== null && column?.role == null) said = role === 'result' ? null : role;
      else if (!headed && found.length > 0 && column === null) break;
      else words += ` ${cell.phrase.text}`;
    } else if (cell.meaning.kind === 'range') said = null;
    before = cell;
  }
  return { found, words };
}

/** Letters, words or Roman numerals that grade; a laboratory's own words are kept as printed. */
function isRatingText(cell: PageCell): boolean {
  return (
    cell.meaning.kind === 'rating' ||
    (cell.meaning.kind === 'text' &&
      cell.phrase.words.length <= 3 &&
      cell.phrase.text.length <= 24 &&
      /^[\p{L}+\- ]+$/u.test(cell.phrase.text))
  );
}

/** One rating column grades the whole row; of several, each grades the numbers since the one before. */
function ratedBy(found: readonly Found[], run: Run, column: RunColumn): readonly Found[] {
  const open = found.filter((one) => one.said === null && !NOT_RESULTS.has(one.column?.role ?? 'unknown'));
  const ratings = run.columns.filter((one) => one.role === 'rating').sort((a, b) => a.x0 - b.x0);
  if (ratings.length <= 1) return open;
  const before = ratings.findLast((one) => one.x0 < column.x0);
  return open.filter(
    (one) => one.cell.phrase.x0 < column.x0 && (before === undefined || one.cell.phrase.x0 > before.x0),
  );
}

function latest(columns: readonly RunColumn[]): string | null {
  const days = columns.flatMap((column) => (column.role === 'date' && column.day !== null ? [column.day] : []));
  const key = (day: string) => {
    const year = Number(/\b(19|20)\d\d\b/.exec(day)?.[0] ?? `20${/(\d\d)\s*$/.exec(day)?.[1] ?? '00'}`);
    const season = /spring|mar|apr|may/i.test(day)
      ? 1
      : /summer|jun|jul|aug/i.test(day)
        ? 2
        : /fall|autumn|sep|oct|nov/i.test(day)
          ? 3
          : 0;
    const month = Number(/^(\d{1,2})[/.-]/.exec(day)?.[1] ?? 0);
    return year * 100 + (month > 0 ? month : season * 3);
  };
  return days.sort((a, b) => key(b) - key(a))[0] ?? null;
}

type Choice = {
  taken: { one: Found; identity: Identity | null }[];
  not: NotTaken[];
  doubts: Remark[];
  position: number;
};

function nameOf(column: RunColumn | null): string | null {
  return column === null
    ? null
    : (column.identity.sampleId ?? column.identity.labNumber ?? column.identity.fieldName ?? column.free);
}

/** Samples side by side: at least two columns bear different names. */
function identityOver(column: RunColumn | null, samples: boolean): Identity | null {
  if (column === null || !samples) return null;
  const named = column.identity.sampleId ?? column.identity.labNumber ?? column.identity.fieldName;
  const day = column.day !== null && column.identity.dateSampled === undefined ? { dateSampled: column.day } : {};
  if (named !== undefined && (column.free === null || column.identity.sampleId !== undefined))
    return { ...column.identity, ...day };
  if (column.free === null) return null;
  // A code among the words over a column is the laboratory's number.
  const words = column.free.split(' ');
  const code = words.length > 1 ? words.find((word) => isCode(word)) : undefined;
  const sampleId = words.filter((word) => word !== code).join(' ');
  return { ...(code === undefined ? {} : { labNumber: code }), ...column.identity, sampleId, ...day };
}

function sideBySide(run: Run): boolean {
  const open = run.columns.filter(
    (column) => column.role === null || !NOT_RESULTS.has(column.role) || column.role === 'date',
  );
  const names = open.flatMap((column) => nameOf(column) ?? []);
  return (
    names.length >= 2 && new Set(names.map((name) => name.toLowerCase())).size >= 2 && names.length >= 0.5 * open.length
  );
}

function choose(found: readonly Found[], run: Run): Choice {
  const samples = sideBySide(run);
  const not: NotTaken[] = [];
  const last = samples ? null : latest(run.columns);
  const hasResult = run.columns.some((column) => column.role === 'result');
  const free: Found[] = [];
  for (const one of found) {
    const role = one.said ?? one.column?.role ?? null;
    const heading = one.column?.heading ?? '';
    if (role === 'date' && one.said === null) {
      if (!samples && (hasResult || one.column?.day !== last))
        not.push({ cell: one.cell, role: 'previous', why: `stands under "${heading}", an earlier day` });
      else free.push(one);
    } else if (role !== null && NOT_RESULTS.has(role))
      not.push({
        cell: one.cell,
        role,
        why: one.said !== null ? `the words before it say ${role}` : `stands under "${heading}"`,
      });
    else free.push(one);
  }
  if (samples) {
    const taken = free.flatMap((one) => {
      const identity = identityOver(one.column, true);
      if (identity === null) not.push({ cell: one.cell, role: 'several', why: 'no sample stands over it' });
      return identity === null ? [] : [{ one, identity }];
    });
    return { taken, not, doubts: [], position: 0.98 };
  }
  const alone = (list: readonly Found[]) => list.map((one) => ({ one, identity: null }));
  const named = free.filter((one) => one.column?.role === 'result');
  const open = named.length > 0 ? named : free;
  for (const one of free)
    if (!open.includes(one))
      not.push({ cell: one.cell, role: 'several', why: 'another column is headed as the result' });
  if (open.length <= 1) return { taken: alone(open), not, doubts: [], position: named.length === 1 ? 1 : 0.99 };
  const units = open.map((one) => one.unit);
  if (units.every((unit) => unit !== null) && new Set(units).size === units.length)
    return { taken: alone(open), not, doubts: [], position: 0.97 };
  for (const one of open.slice(1))
    not.push({ cell: one.cell, role: 'several', why: 'no heading says which number is the result' });
  const doubt = remark(
    'several-numbers',
    `The line holds ${open.length} numbers and no heading says which is the result; the first was taken.`,
  );
  return { taken: alone(open.slice(0, 1)), not, doubts: [doubt], position: 0.6 };
}

/** "Base saturation, %" or "Trace elements (DTPA), ppm" over the rows of a list adds what the rows leave open. */
function underSection(segment: Segment, run: Run): Label {
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

/** "26.4" over "mg/kg" in the column of numbers. */
function unitUnder(
  lines: readonly CellLine[],
  at: number,
  cell: PageCell,
): { unit: NonNullable<Value['unit']>; printed: string } | null {
  for (const line of lines.slice(at + 1, at + 4)) {
    if (line.line.page !== cell.phrase.page || line.line.y0 - cell.phrase.y1 > 0.8 * cell.phrase.size) return null;
    const under = line.cells.find((one) => overlapping(one.phrase, cell.phrase));
    if (under === undefined) continue;
    return unitOnly(under.phrase.text);
  }
  return null;
}

const ADVICE_UNIT = /^(lb\/acre|kg\/ha|ton\/acre|t\/ha|cwt\/acre|lb\/1000ft2|lb\/100ft2|oz\/|g\/m2)/;

/** P2O5, K2O or lime to spread, listed among the results: P or K was found in the same list in another unit. */
function isAdvice(segment: Segment, unit: Value['unit'], run: Run): boolean {
  const { label } = segment;
  const text = label.text;
  if (label.analyte === 'lime_requirement')
    return !/requirement|index|\blr\b/i.test(text) && (unit === null || ADVICE_UNIT.test(unit));
  if (label.form !== 'P2O5' && label.form !== 'K2O') return false;
  const found = run.segments.some(
    (other) => other !== segment && other.label.analyte === label.analyte && other.label.form === 'element',
  );
  return found && (unit === null || ADVICE_UNIT.test(unit));
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
        unit: one.unit ?? label.unit,
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
