import type { IdentityField } from '../candidate';
import { type Label, readLabel, unitOnly } from '../labels/label';
import type { CellLine, PageCell } from './cells';
import { fieldOf } from './identity';
import { type Phrase, phraseOf } from './lines';
import { type Role, roleOf } from './roles';

export type Column = {
  readonly x0: number;
  readonly x1: number;
  readonly heading: string;
  readonly label: Label | null;
  readonly field: IdentityField | null;
  readonly role: Role | null;
  /** 1 when the heading stands over its numbers, less when it had to be reached for. */
  readonly position: number;
};

type Span = { x0: number; x1: number };
type Stack = Span & { own: string[]; captions: string[]; over: boolean };

/** Share of the narrower of two spans by which they must overlap to be one column. */
const SAME_COLUMN = 0.2;
/** A heading may stand this many type sizes beside its numbers. */
const REACH = 3;

function overlap(a: Span, b: Span): number {
  return Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0);
}

/** Columns from the numbers and names of the data rows: cells that stand over one another. */
export function spansOf(rows: readonly CellLine[]): Span[] {
  const cells = rows
    .flatMap((row) => row.cells)
    .filter((cell) => cell.meaning.kind !== 'rating')
    .map((cell) => ({ x0: cell.phrase.x0, x1: cell.phrase.x1 }))
    .sort((a, b) => a.x0 - b.x0);
  const spans: Span[] = [];
  for (const cell of cells) {
    const home = spans.find(
      (span) => overlap(span, cell) > SAME_COLUMN * Math.min(span.x1 - span.x0, cell.x1 - cell.x0),
    );
    if (home === undefined) spans.push({ ...cell });
    else {
      home.x0 = Math.min(home.x0, cell.x0);
      home.x1 = Math.max(home.x1, cell.x1);
    }
  }
  return spans.sort((a, b) => a.x0 - b.x0);
}

/** A heading set so tight that two headings became one phrase is parted when each word has a column and a meaning. */
function partHeading(phrase: Phrase, spans: readonly Span[]): Phrase[] {
  if (phrase.words.length < 2) return [phrase];
  const homes = phrase.words.map((word) => spans.findIndex((span) => overlap(span, word) > 0));
  const distinct = new Set(homes.filter((home) => home >= 0));
  if (distinct.size < 2) return [phrase];
  const groups: { home: number; from: number; to: number }[] = [];
  for (const [index, home] of homes.entries()) {
    const last = groups[groups.length - 1];
    if (last !== undefined && (home === last.home || home < 0)) last.to = index + 1;
    else groups.push({ home, from: index, to: index + 1 });
  }
  const parts = groups.map((group) => phraseOf(phrase.page, phrase.line, phrase.words.slice(group.from, group.to)));
  const meant = parts.every(
    (part) => readLabel(part.text) !== null || unitOnly(part.text) !== null || fieldOf(part.text) !== null,
  );
  return meant ? parts : [phrase];
}

function place(phrase: Phrase, line: readonly Phrase[], stacks: Stack[]) {
  const over = stacks.filter((stack) => overlap(stack, phrase) > 0);
  const wide = over.filter((stack) => {
    const middle = (stack.x0 + stack.x1) / 2;
    return middle > phrase.x0 && middle < phrase.x1;
  });
  if (wide.length >= 2) {
    for (const stack of wide) stack.captions.push(phrase.text);
    return;
  }
  const best = over.sort((a, b) => overlap(b, phrase) - overlap(a, phrase))[0];
  if (best !== undefined) {
    best.own.push(phrase.text);
    best.over = true;
    return;
  }
  const gap = (stack: Stack) => Math.max(stack.x0 - phrase.x1, phrase.x0 - stack.x1);
  const blocked = (stack: Stack) =>
    line.some(
      (other) =>
        other !== phrase &&
        (overlap(other, stack) > 0 ||
          (other.x0 > Math.min(phrase.x1, stack.x1) - 1 && other.x1 < Math.max(phrase.x0, stack.x0) + 1)),
    );
  const near = stacks
    .filter((stack) => gap(stack) < REACH * phrase.size && !blocked(stack))
    .sort((a, b) => gap(a) - gap(b))[0];
  if (near === undefined) return;
  near.own.push(phrase.text);
}

const ADVICE_UNITS = new Set([
  'lb/1000ft2',
  'lb/100ft2',
  'oz/1000ft2',
  'oz/100ft2',
  'oz/yd2',
  'g/m2',
  'ton/acre',
  'cwt/acre',
]);

function meaningOf(stack: Stack, first: boolean): Column {
  const heading = stack.own.join(' ');
  const span = { x0: stack.x0, x1: stack.x1, heading };
  let label: Label | null = null;
  for (let drop = 0; drop < Math.max(stack.own.length, 1) && label === null; drop++) {
    label = readLabel(stack.own.slice(drop).join(' '), [...stack.own.slice(0, drop), ...stack.captions]);
  }
  const fields = stack.own.map((_, drop) => fieldOf(stack.own.slice(drop).join(' ')));
  const field = fields.find((found) => found !== null) ?? null;
  const all = [...stack.captions, heading].join(' ');
  const advice =
    /\b(recommend|to apply|apply|needed|requirement)/i.test(all) ||
    (label?.unit != null && ADVICE_UNITS.has(label.unit));
  let role: Role | null = advice ? 'recommendation' : roleOf(heading, first);
  if (label !== null && !advice) {
    role = /\b(desired|optimum|target|ideal)\b/i.test(all)
      ? 'desired'
      : /\b(previous|last|prior)\b/i.test(all)
        ? 'previous'
        : null;
  }
  return { ...span, label, field: label === null ? field : null, role, position: stack.over ? 1 : 0.96 };
}

/** Stage 5. Columns with the meaning of their stacked headings; captions that stretch over several are given to each. */
export function columnsOf(header: readonly CellLine[], rows: readonly CellLine[]): Column[] {
  const spans = spansOf(rows);
  const stacks: Stack[] = spans.map((span) => ({ ...span, own: [], captions: [], over: false }));
  for (const line of header) {
    const phrases = line.cells.flatMap((cell: PageCell) => partHeading(cell.phrase, spans));
    for (const phrase of phrases) place(phrase, phrases, stacks);
  }
  return stacks.map((stack, index) => meaningOf(stack, index === 0));
}

/** How much a reading of the header explains; more lines must earn their place. */
export function headerScore(columns: readonly Column[], lines: number): number {
  let score = -0.05 * lines;
  for (const column of columns) {
    if (column.label !== null)
      score +=
        column.label.strength + (column.label.unit === null ? 0 : 0.2) + (column.label.method === null ? 0 : 0.1);
    else if (column.field !== null) score += 0.3;
  }
  return score;
}
