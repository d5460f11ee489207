import { analyte } from '@/lib/domain/analytes';
import type { IdentityField } from '../candidate';
import { onlyDescribes } from '../labels/described';
import { type Label, methodIn, readLabel, unitIn, unitOnly } from '../labels/label';
import { type CellLine, isUnitOf, type PageCell } from './cells';
import { fieldOf } from './identity';
import { type Phrase, phraseOf } from './lines';
import { repeatedGroups } from './repeated';
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
  /** Heading lines that the meaning left unexplained. */
  readonly unexplained: number;
};

type Span = { x0: number; x1: number };
/** `head` is where the column's own headings stand; numbers are often set to one side under them. */
type Stack = Span & { own: string[]; captions: string[]; over: boolean; head: Span | null };
type Caption = {
  x0: number;
  text: string;
  middle: number;
  first: number;
  last: number;
  blocked: ReadonlySet<number>;
  title: boolean;
};

/** Share of the narrower of two spans by which they must overlap to be one column. */
const SAME_COLUMN = 0.2;
/** A heading may stand this many type sizes beside its numbers. */
const REACH = 3;

function overlap(a: Span, b: Span): number {
  return Math.min(a.x1, b.x1) - Math.max(a.x0, b.x0);
}

/** The words of a row headed "Mean of all customers" may run over the columns of names and numbers. */
function liesOverSeveral(cell: PageCell, rows: readonly CellLine[]): boolean {
  if (cell.meaning.kind !== 'text' || cell.phrase.words.length < 2) return false;
  const covered = rows.filter(
    (row) =>
      row.line !== undefined &&
      row.cells.filter(
        (other) => other !== cell && overlap(other.phrase, cell.phrase) > 0.5 * (other.phrase.x1 - other.phrase.x0),
      ).length >= 2,
  );
  return covered.length >= 2;
}

/** Columns from the numbers and names of the data rows: cells that stand over one another; units of a list have columns of their own. */
export function spansOf(rows: readonly CellLine[], withUnits = false): Span[] {
  const cells = rows
    .flatMap((row) => row.cells.filter((cell, index) => withUnits || !isUnitOf(row.cells[index - 1], cell)))
    .filter((cell) => cell.meaning.kind !== 'rating' && !liesOverSeveral(cell, rows))
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

/** A unit or an extractant above names may be a caption over more columns than the one it stands over. */
function saysForSeveral(text: string): boolean {
  return (
    unitOnly(text) !== null ||
    (readLabel(text) === null &&
      fieldOf(text) === null &&
      /extract|saturation|exchangeable|acetate|dtpa|mehlich|olsen|morgan|bicarb/i.test(text))
  );
}

/** Columns under other phrases of the caption's line are not its own. */
function captionOf(
  phrase: Phrase,
  line: readonly Phrase[],
  stacks: readonly Stack[],
  first: number,
  last: number,
): Caption {
  const blocked = new Set<number>();
  for (const [index, stack] of stacks.entries())
    if (line.some((other) => other !== phrase && overlap(other, stack) > 0)) blocked.add(index);
  const title = line.length === 1 && saysForSeveral(phrase.text);
  return { x0: phrase.x0, text: phrase.text, middle: (phrase.x0 + phrase.x1) / 2, first, last, blocked, title };
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

const CHARGED = new Set(['potassium', 'calcium', 'magnesium', 'sodium', 'exchangeable_acidity', 'aluminium']);

/** "Phosphorus" over "M3" and "Bray 1": the caption is the name, the column's own words are its method or unit. */
function namedByCaption(own: string, caption: string): Label | null {
  const name = readLabel(caption);
  if (own === '' || name === null || name.strength < 0.93) return null;
  // "Found | Desired" under each name: the caption is the name, the column's own words its role.
  if (roleOf(own, false) !== null && roleOf(own, false) !== 'rating') return readLabel(caption);
  if (roleOf(own, false) !== null) return null;
  const joined = readLabel(`${caption} ${own}`) ?? (onlyDescribes(own) ? readLabel(caption, [own]) : null);
  return joined === null ? null : { ...joined, strength: Math.min(joined.strength, 0.94) };
}

/** Whether a caption has something to say to a column that it does not yet know. */
function takesCaption(stack: Stack | undefined, caption: string): boolean {
  if (stack === undefined || stack.captions.length > 0) return false;
  const label = readLabel(stack.own.join(' '));
  if (label === null) return namedByCaption(stack.own.join(' '), caption) !== null;
  const unit = unitIn(caption)?.unit;
  if (unit === 'meq/100g' || unit === '%' || /saturation/i.test(caption))
    return label.unit === null && CHARGED.has(label.analyte);
  if (unit !== undefined) return label.unit === null && analyte(label.analyte).unit === 'mg/kg';
  return label.method === null && methodIn(label.analyte, caption) !== null;
}

/** True when most headings begin where their columns begin: captions then begin at their first column. */
function setLeft(stacks: readonly Stack[]): boolean {
  const headed = stacks.flatMap((stack) => (stack.head === null ? [] : [{ head: stack.head, stack }]));
  const left = headed.filter(({ head, stack }) => Math.abs(head.x0 - stack.x0) < 1.5).length;
  const middle = headed.filter(({ head, stack }) => Math.abs(head.x0 + head.x1 - stack.x0 - stack.x1) < 3).length;
  return headed.length >= 4 && left >= 0.7 * headed.length && left > middle;
}

/** A caption at the left of its group: from the column where it begins to the next caption. */
function fromLeft(caption: Caption, stacks: readonly Stack[]): Caption {
  const first = stacks.findIndex((stack) => Math.abs(stack.x0 - caption.x0) < 3);
  if (first < 0 || caption.title) return caption;
  let last = Math.max(first, caption.last);
  while (!caption.blocked.has(last + 1) && takesCaption(stacks[last + 1], caption.text)) last += 1;
  const whole = stacks.slice(first, last + 1);
  const [from, to] = [whole[0], whole[whole.length - 1]];
  return { ...caption, first, last, middle: ((from?.x0 ?? 0) + (to?.x1 ?? 0)) / 2 };
}

/** Distance of a caption from the middle of some columns, in columns. */
function offCentre(left: Span, right: Span, count: number, caption: Caption): number {
  return (Math.abs((left.x0 + right.x1) / 2 - caption.middle) * count) / (right.x1 - left.x0 || 1);
}

/** How far off its middle a caption may be, in columns, for one more column under it. */
const WIDER = 0.12;

/** A caption is centred over its group: the widest run of columns that can take it and has it in the middle. */
function spreadCaption(caption: Caption, stacks: readonly Stack[]) {
  if (caption.title && caption.last - caption.first + 1 === stacks.length) {
    for (const stack of stacks) stack.captions.push(caption.text);
    return;
  }
  let [low, high] = [caption.first, caption.last];
  while (!caption.blocked.has(low - 1) && takesCaption(stacks[low - 1], caption.text)) low -= 1;
  while (!caption.blocked.has(high + 1) && takesCaption(stacks[high + 1], caption.text)) high += 1;
  let best = { first: caption.first, last: caption.last, cost: Number.POSITIVE_INFINITY };
  for (let first = low; first <= caption.first; first++) {
    for (let last = caption.last; last <= high; last++) {
      const [left, right] = [stacks[first], stacks[last]];
      if (left === undefined || right === undefined) continue;
      const off = caption.title
        ? 0
        : Math.min(
            offCentre(left, right, last - first + 1, caption),
            offCentre(left.head ?? left, right.head ?? right, last - first + 1, caption),
          );
      const cost = off - WIDER * (last - first + 1);
      if ((off < 0.75 || last - first === caption.last - caption.first) && cost < best.cost)
        best = { first, last, cost };
    }
  }
  for (const stack of stacks.slice(best.first, best.last + 1)) stack.captions.push(caption.text);
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

/** "Found, in pounds per acre          Mehlich 3": one or two phrases over a whole table, the first at its left edge. */
function isTitle(phrases: readonly Phrase[], stacks: readonly Stack[]): boolean {
  const [first] = phrases;
  const [left] = stacks;
  if (first === undefined || left === undefined || phrases.length > 2 || stacks.length < 4) return false;
  if (first.x0 > left.x0 + first.size || first.words.length < 2) return false;
  const numeric = stacks.slice(1).filter((stack) => overlap(stack, first) > 0);
  return (
    numeric.length <= 1 &&
    phrases.every((phrase) => readLabel(phrase.text) === null && fieldOf(phrase.text) === null) &&
    phrases.some((phrase) => saysAll(phrase.text))
  );
}

/** A heading over the names of a table that gives a unit or a method and is no field or analyte itself. */
function saysAll(text: string): boolean {
  return (
    text.length > 6 &&
    fieldOf(text) === null &&
    readLabel(text) === null &&
    (unitIn(text) !== null || /mehlich|morgan|olsen|bray|dtpa|acetate|saturation/i.test(text))
  );
}

/** Captions over groups of columns that repeat one another, one caption a group; the phrases that were given away. */
function overGroups(phrases: readonly Phrase[], stacks: readonly Stack[]): ReadonlySet<Phrase> {
  const groups = repeatedGroups(stacks, (stack) => stack.own.join(' '));
  const none = new Set<Phrase>();
  if (groups.length === 0) return none;
  const homes = groups.map((group) => {
    const span = { x0: Math.min(...group.map((one) => one.x0)), x1: Math.max(...group.map((one) => one.x1)) };
    return { group, over: group.length < 2 ? [] : phrases.filter((phrase) => overlap(span, phrase) > 0) };
  });
  if (homes.some(({ over }) => over.length > 1) || homes.filter(({ over }) => over.length === 1).length < 2)
    return none;
  if (new Set(homes.flatMap(({ over }) => over)).size < homes.flatMap(({ over }) => over).length) return none;
  for (const { group, over } of homes)
    for (const stack of group) for (const phrase of over) stack.captions.push(phrase.text);
  return new Set(homes.flatMap(({ over }) => over));
}

/** Stage 5. Columns with the meaning of their stacked headings; captions that stretch over several are given to each. */
export function columnsOf(header: readonly CellLine[], rows: readonly CellLine[]): Column[] {
  const spans = spansOf(rows);
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
