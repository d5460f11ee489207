import { analyte } from '@/lib/domain/analytes';
import { onlyDescribes } from '../labels/described';
import { type Label, methodIn, readLabel, unitIn, unitOnly } from '../labels/label';
import { fieldOf } from './identity';
import type { Phrase } from './lines';
import { repeatedGroups } from './repeated';
import { roleOf } from './roles';
import { overlap, type Span, type Stack } from './spans';

export type Caption = {
  x0: number;
  text: string;
  middle: number;
  first: number;
  last: number;
  blocked: ReadonlySet<number>;
  title: boolean;
};

/** A unit or an extractant above names may be a caption over more columns than the one it stands over. */
export function saysForSeveral(text: string): boolean {
  return (
    unitOnly(text) !== null ||
    (readLabel(text) === null &&
      fieldOf(text) === null &&
      /extract|saturation|exchangeable|acetate|dtpa|mehlich|olsen|morgan|bicarb/i.test(text))
  );
}

/** Columns under other phrases of the caption's line are not its own. */
export function captionOf(
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

const CHARGED = new Set(['potassium', 'calcium', 'magnesium', 'sodium', 'exchangeable_acidity', 'aluminium']);

/** "Phosphorus" over "M3" and "Bray 1": the caption is the name, the column's own words are its method or unit. */
export function namedByCaption(own: string, caption: string): Label | null {
  const name = readLabel(caption);
  if (own === '' || name === null || name.strength < 0.93) return null;
  // "Found | Desired" under each name: the caption is the name, the column's own words its role.
  if (roleOf(own, false) !== null && roleOf(own, false) !== 'rating') return readLabel(caption);
  if (roleOf(own, false) !== null) return null;
  const joined = readLabel(`${caption} ${own}`) ?? (onlyDescribes(own) ? readLabel(caption, [own]) : null);
  return joined === null ? null : { ...joined, strength: Math.min(joined.strength, 0.94) };
}

/** Whether a caption has something to say to a column that it does not yet know. */
export function takesCaption(stack: Stack | undefined, caption: string): boolean {
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
export function setLeft(stacks: readonly Stack[]): boolean {
  const headed = stacks.flatMap((stack) => (stack.head === null ? [] : [{ head: stack.head, stack }]));
  const left = headed.filter(({ head, stack }) => Math.abs(head.x0 - stack.x0) < 1.5).length;
  const middle = headed.filter(({ head, stack }) => Math.abs(head.x0 + head.x1 - stack.x0 - stack.x1) < 3).length;
  return headed.length >= 4 && left >= 0.7 * headed.length && left > middle;
}

/** A caption at the left of its group: from the column where it begins to the next caption. */
export function fromLeft(caption: Caption, stacks: readonly Stack[]): Caption {
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
export function spreadCaption(caption: Caption, stacks: readonly Stack[]) {
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

/** "Found, in pounds per acre          Mehlich 3": one or two phrases over a whole table, the first at its left edge. */
export function isTitle(phrases: readonly Phrase[], stacks: readonly Stack[]): boolean {
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
export function saysAll(text: string): boolean {
  return (
    text.length > 6 &&
    fieldOf(text) === null &&
    readLabel(text) === null &&
    (unitIn(text) !== null || /mehlich|morgan|olsen|bray|dtpa|acetate|saturation/i.test(text))
  );
}

/** A word that stands squarely over one column of a group and names nothing is that column's own. */
function ownOnly(phrase: Phrase, group: readonly Stack[]): boolean {
  if (readLabel(phrase.text) !== null) return false;
  const middle = (phrase.x0 + phrase.x1) / 2;
  return group.some((stack) => middle > stack.x0 && middle < stack.x1);
}

/** Captions over groups of columns that repeat one another, one caption a group; the phrases that were given away. */
export function overGroups(phrases: readonly Phrase[], stacks: readonly Stack[]): ReadonlySet<Phrase> {
  const groups = repeatedGroups(stacks, (stack) => stack.own.join(' '));
  const none = new Set<Phrase>();
  if (groups.length === 0) return none;
  const homes = groups.map((group) => {
    const span = { x0: Math.min(...group.map((one) => one.x0)), x1: Math.max(...group.map((one) => one.x1)) };
    return {
      group,
      over: group.length < 2 ? [] : phrases.filter((phrase) => overlap(span, phrase) > 0 && !ownOnly(phrase, group)),
    };
  });
  if (homes.some(({ over }) => over.length > 1) || homes.filter(({ over }) => over.length === 1).length < 2)
    return none;
  if (new Set(homes.flatMap(({ over }) => over)).size < homes.flatMap(({ over }) => over).length) return none;
  for (const { group, over } of homes)
    for (const stack of group) for (const phrase of over) stack.captions.push(phrase.text);
  return new Set(homes.flatMap(({ over }) => over));
}
