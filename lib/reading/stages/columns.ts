import type { IdentityField } from '../candidate';
import { type Label, readLabel, unitIn, unitOnly } from '../labels/label';
import {
  type Caption,
  captionOf,
  fromLeft,
  isTitle,
  namedByCaption,
  overGroups,
  saysAll,
  saysForSeveral,
  setLeft,
  spreadCaption,
  takesCaption,
} from './captions';
import type { CellLine, PageCell } from './cells';
import { fieldOf } from './identity';
import { type Phrase, phraseOf } from './lines';
import { type Role, roleOf } from './roles';
import { overlap, type Span, type Stack } from './spans';

export type Column = {
  readonly x0: number;
  readonly x1: number;
  readonly heading: string;
  readonly label: Label | null;
  readonly field: IdentityField | null;
  readonly role: Role | null;
  /** 1 when the heading stands over its numbers, less when it had to be reached for. */
  readonly position: number;
  /** Heading lines that the meaning left unexplained. */
  readonly unexplained: number;
};

/** A heading may stand this many type sizes beside its numbers. */
const REACH = 3;

/** A heading set so tight that two headings became one phrase is parted when each word has a column and a meaning. */
function partHeading(phrase: Phrase, spans: readonly Span[]): Phrase[] {
  if (phrase.words.length < 2) return [phrase];
  const homes = phrase.words.map((word) => spans.findIndex((span) => overlap(span, word) > 0));
  const distinct = new Set(homes.filter((home) => home >= 0));
  if (distinct.size < 2) return [phrase];
  // "Phosphorus, ppm P" over three columns is one caption.
  const whole = readLabel(phrase.text);
  if (whole !== null && (whole.strength >= 0.99 || (/,/.test(phrase.text) && whole.unit !== null))) return [phrase];
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
  // "Depth water": a field's heading beside a word that only a caption explains.
  const beside =
    parts.length === 2 && parts.some((part) => fieldOf(part.text) !== null) && fieldOf(phrase.text) === null;
  return meant || beside ? parts : [phrase];
}

function widened(span: Span | null, by: Span): Span {
  return span === null ? { x0: by.x0, x1: by.x1 } : { x0: Math.min(span.x0, by.x0), x1: Math.max(span.x1, by.x1) };
}

function place(phrase: Phrase, line: readonly Phrase[], stacks: Stack[], captions: Caption[]) {
  const over = stacks.filter((stack) => overlap(stack, phrase) > 0);
  const wide = over.filter((stack) => {
    const middle = (stack.x0 + stack.x1) / 2;
    return middle > phrase.x0 && middle < phrase.x1;
  });
  if (wide.length >= 2) {
    const at = wide.map((stack) => stacks.indexOf(stack));
    captions.push(captionOf(phrase, line, stacks, Math.min(...at), Math.max(...at)));
    return;
  }
  const best = over.sort((a, b) => overlap(b, phrase) - overlap(a, phrase))[0];
  if (best !== undefined) {
    const at = stacks.indexOf(best);
    const below = best.own.join(' ');
    // A name over one column is that column's own, unless the next column stands bare and could take it too.
    const bare = [stacks[at - 1], stacks[at + 1]].some(
      (other) =>
        other !== undefined &&
        !line.some((one) => overlap(one, other) > 0) &&
        readLabel(other.own.join(' ')) === null &&
        namedByCaption(other.own.join(' '), phrase.text) !== null,
    );
    const names = bare && readLabel(phrase.text) !== null && readLabel(below) === null;
    const narrow = below !== '' && line.length < stacks.length && (names || saysForSeveral(phrase.text));
    if (narrow) captions.push(captionOf(phrase, line, stacks, at, at));
    else {
      best.own.unshift(phrase.text);
      best.head = widened(best.head, phrase);
    }
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
  near.own.unshift(phrase.text);
  near.head = widened(near.head, phrase);
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
  const heading = stack.own.join(' ').replace(/(\p{L})- (\p{Ll})/gu, '$1$2');
  const span = { x0: stack.x0, x1: stack.x1, heading };
  let label: Label | null = null;
  let unexplained = 0;
  for (let drop = 0; drop < Math.max(stack.own.length, 1) && label === null; drop++) {
    label = readLabel(drop === 0 ? heading : stack.own.slice(drop).join(' '), [
      ...stack.own.slice(0, drop),
      ...stack.captions,
    ]);
    unexplained = drop;
  }
  // A last line that is no unit we know ("mval/100 g") must not hide the analyte: the unit is then missing, and doubted.
  if (label === null && stack.own.length > 1) {
    label = readLabel(
      stack.own
        .slice(0, -1)
        .join(' ')
        .replace(/(\p{L})- (\p{Ll})/gu, '$1$2'),
      [stack.own[stack.own.length - 1] ?? '', ...stack.captions],
    );
    unexplained = 1;
    if (label !== null) label = { ...label, strength: Math.min(label.strength, 0.9) };
  }
  let said = heading;
  for (const caption of [...stack.captions].reverse()) {
    if (label !== null) break;
    label = namedByCaption(heading, caption);
    if (label !== null) said = `${caption} ${heading}`;
  }
  // A unit or method that only a caption gives is a little less sure than one in the column's own heading.
  if (label !== null && label.unit !== null && stack.captions.length > 0 && unitIn(heading) === null)
    label = { ...label, strength: Math.min(label.strength, 0.95) };
  const fields = stack.own.map((_, drop) => fieldOf(stack.own.slice(drop).join(' ')));
  const field = fields.find((found) => found !== null) ?? null;
  const all = [...stack.captions, heading].join(' ');
  const advice =
    /\b(recommend|to apply|apply|needed|requirement)/i.test(all) ||
    (label?.unit != null && ADVICE_UNITS.has(label.unit));
  let role: Role | null = advice ? 'recommendation' : roleOf(heading, first);
  if (label !== null && !advice) {
    role = /\b(desired|optimum|target|ideal|wanted)\b/i.test(all)
      ? 'desired'
      : /\b(previous|last|prior)\b/i.test(all)
        ? 'previous'
        : null;
  }
  return {
    ...span,
    heading: said,
    label,
    field: label === null ? field : null,
    role,
    position: stack.over ? 1 : 0.96,
    unexplained,
  };
}

/**
 * A column whose own words are only a method or a unit ("CaCl2", "lb/A") takes the nearest name above it that makes a
 * meaning with them and that no column between them says otherwise.
 */
function nameBare(stacks: readonly Stack[], header: readonly CellLine[]) {
  const names = header
    .flatMap((line) => line.cells)
    .filter((cell) => (readLabel(cell.phrase.text)?.strength ?? 0) >= 0.93);
  const steps = stacks.slice(1).map((stack, index) => middle(stack) - middle(stacks[index] ?? stack));
  const pitch = [...steps].sort((a, b) => a - b)[Math.floor(steps.length / 2)] ?? 0;
  for (const [index, stack] of stacks.entries()) {
    const column = meaningOf(stack, index === 0);
    const own = stack.own.join(' ');
    if (own === '' || column.label !== null || column.field !== null || column.role !== null) continue;
    const near = names
      .filter(
        (cell) => Math.abs(middle(cell.phrase) - middle(stack)) < 1.8 * pitch && !stack.own.includes(cell.phrase.text),
      )
      .sort((a, b) => Math.abs(middle(a.phrase) - middle(stack)) - Math.abs(middle(b.phrase) - middle(stack)))
      .find((cell) => namedByCaption(own, cell.phrase.text) !== null);
    if (near !== undefined) stack.captions.push(near.phrase.text);
  }
}

function middle(span: Span): number {
  return (span.x0 + span.x1) / 2;
}

/** Stage 5. Columns with the meaning of their stacked headings; captions that stretch over several are given to each. */
export function columnsOf(header: readonly CellLine[], spans: readonly Span[], whole = true): Column[] {
  const stacks: Stack[] = spans.map((span) => ({ ...span, own: [], captions: [], over: false, head: null }));
  const captions: Caption[] = [];
  for (const line of [...header].reverse()) {
    const phrases = line.cells.flatMap((cell: PageCell) => partHeading(cell.phrase, spans));
    if (isTitle(phrases, stacks)) {
      for (const phrase of phrases)
        captions.push({ ...captionOf(phrase, [phrase], stacks, 0, stacks.length - 1), title: true });
      continue;
    }
    const grouped = overGroups(phrases, stacks);
    for (const phrase of phrases) if (!grouped.has(phrase)) place(phrase, phrases, stacks, captions);
  }
  const left = setLeft(stacks);
  for (const caption of captions.reverse()) spreadCaption(left ? fromLeft(caption, stacks) : caption, stacks);
  // "Main nutrients, lb/acre (Mehlich 3)" over the names speaks for every column.
  const [names, ...others] = stacks;
  const title = names?.own.join(' ') ?? '';
  if (names !== undefined && saysAll(title))
    for (const stack of others) if (takesCaption(stack, title)) stack.captions.push(title);
  if (whole) nameBare(stacks, header);
  return stacks.map((stack, index) => meaningOf(stack, index === 0));
}

/** How much a reading of the header explains; heading lines that explain nothing count against it. */
export function headerScore(columns: readonly Column[]): number {
  let score = 0;
  for (const column of columns) {
    if (column.label !== null) {
      score +=
        column.label.strength + (column.label.unit === null ? 0 : 0.2) + (column.label.method === null ? 0 : 0.1);
      score -= 0.05 * column.unexplained;
    } else if (column.field !== null) score += 0.3;
  }
  return score;
}
