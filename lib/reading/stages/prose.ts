import { type Candidate, remark } from '../candidate';
import { type Label, readLabel, unitOnly } from '../labels/label';
import { type CellLine, numberBox } from './cells';
import { type Phrase, phraseOf } from './lines';
import type { ListRow } from './list';
import { type NumberStyle, ratingIn, readCell, type Value } from './values';
import { type Placed, storedBox } from './words';

/** Running text: the words of lines that go on under one another, with the line each word stands on. */
export type Paragraph = { readonly words: readonly { readonly word: Placed; readonly line: CellLine }[] };

/** A number of running text that was not taken, and why. */
export type ProseRefusal = {
  readonly text: string;
  readonly why: string;
  readonly line: CellLine;
  readonly word: Placed;
};

const MOST_NAME_WORDS = 6;
/** Words that say a sentence is about soils in general, or about what should be. */
const GENERAL =
  /\b(most|many|generally|usually|typically|plants?|crops? (prefer|need)|if|when|whenever|above which|values? (of|below|above|over|under|between)|levels? (of|below|above|over|under|between) \d|considered|means|ranges?|scale|for example)\b/i;
const WANTED =
  /\b(should|ideal(ly)?|optimum|optimal|target(ed)?|desired?|desirable|aim(ing)?|goal|recommend(ed|ation|s)?|maintain|raise|raised|bring|reach|needs?|required?|want(ed)?|sufficient|sufficiency|guideline|normal(ly)?|acceptable|preferred|prefers?|at least|no more than|up to|between|critical|threshold|limit)\b/i;
const BEFORE =
  /\b(last (year|time|season|spring|fall|autumn|test|sampling|report)|previous(ly)?|earlier|prior|in (19|20)\d\d|used to be|up from|down from|compared (with|to)|from)\b/i;
const APPLY =
  /\b(apply|add|spread|broadcast|work in|incorporate|use|per (1,?000|100)|\/ ?(1,?000|100) ?(sq|ft)|bags?|pounds? of|lbs? of|tons? of|ounces? of|oz of)\b/i;

function isText(line: CellLine): boolean {
  const widest = line.cells.reduce((most, cell) => Math.max(most, cell.phrase.words.length), 0);
  return widest >= 4;
}

/** Lines of running text put together: the same left edge or a short last line, no wider gap than between lines. */
export function paragraphsOf(lines: readonly CellLine[], taken: ReadonlySet<CellLine>): Paragraph[] {
  const found: { words: { word: Placed; line: CellLine }[]; last: Phrase }[] = [];
  // What a reply quotes is an earlier letter.
  let quoted = 0;
  for (const line of lines) {
    if (/\bwrote:\s*$/.test(line.line.text)) quoted = line.line.page.number;
    if (taken.has(line) || quoted === line.line.page.number || /^\s*>/.test(line.line.text)) continue;
    for (const phrase of wide(line)) {
      const words = phrase.words.map((word) => ({ word, line }));
      const home = found.find(
        ({ last }) =>
          last.page === phrase.page &&
          phrase.y0 >= last.y0 &&
          phrase.y0 - last.y1 < 0.9 * last.size &&
          Math.abs(phrase.x0 - last.x0) < 3 * last.size &&
          Math.abs(phrase.size - last.size) < 0.2 * last.size,
      );
      if (home !== undefined) {
        home.words.push(...words);
        home.last = phrase;
      } else if (isText(line)) found.push({ words, last: phrase });
    }
  }
  return found.map(({ words }) => ({ words }));
}

/** Phrases of a line as they stood before labels and values were parted. */
function wide(line: CellLine): Phrase[] {
  return line.line.phrases.filter((phrase) =>
    line.cells.some((cell) => cell.phrase.x0 < phrase.x1 && cell.phrase.x1 > phrase.x0),
  );
}

type Piece = { from: number; to: number };

/** Sentences, and inside them the parts between semicolons. */
function sentencesOf(words: readonly Placed[]): Piece[] {
  const pieces: Piece[] = [];
  let from = 0;
  for (const [at, word] of words.entries()) {
    const next = words[at + 1]?.text ?? '';
    const ends =
      /[.!?][)"']?$/.test(word.text) &&
      !/^(no|lab|approx|avg|est|e\.g|i\.e|vs|sq|ft|lbs?|oz)\.$/i.test(word.text) &&
      /^[A-Z("•-]/.test(next);
    if (ends || /;$/.test(word.text) || at === words.length - 1) {
      pieces.push({ from, to: at + 1 });
      from = at + 1;
    }
  }
  return pieces;
}

type Name = Piece & { label: Label };
type Number_ = Piece & { value: Value; unit: Value['unit']; unitPrinted: string | null };

function bare(text: string): string {
  return text.replace(/^[("'[]+/, '').replace(/[)"'\],.;:=]+$/, '');
}

function textOf(words: readonly Placed[], from: number, to: number): string {
  return words
    .slice(from, to)
    .map((word) => word.text)
    .join(' ')
    .replace(/(\p{L})- (\p{Ll})/gu, '$1$2');
}

/** A short symbol in running text counts only beside a number or in brackets: "P 45", "(K)". */
function symbolHere(words: readonly Placed[], from: number, to: number): boolean {
  const text = textOf(words, from, to);
  if (bare(text).length > 2 || /^(pH|EC|OM)$/.test(bare(text))) return true;
  return (
    /^\(.*\)[,.;:]?$/.test(text) ||
    /\d/.test(words[to]?.text ?? '') ||
    /^[=:]$/.test(words[to]?.text ?? '') ||
    /[:=]$/.test(text)
  );
}

function namesIn(words: readonly Placed[], piece: Piece): Name[] {
  const names: Name[] = [];
  let at = piece.from;
  while (at < piece.to) {
    let best: Name | null = null;
    for (let to = Math.min(piece.to, at + MOST_NAME_WORDS); to > at && best === null; to--) {
      const text = bare(textOf(words, at, to));
      if (text === '' || /^\d/.test(text) || /[,;:.] /.test(text)) continue;
      const label = readLabel(text);
      if (label !== null && label.strength >= 0.97 && symbolHere(words, at, to)) best = { from: at, to, label };
    }
    if (best !== null) names.push(best);
    at = best?.to ?? at + 1;
  }
  return names;
}

function numbersIn(words: readonly Placed[], piece: Piece, style: NumberStyle): Number_[] {
  const numbers: Number_[] = [];
  for (let at = piece.from; at < piece.to; at++) {
    const text = bare(words[at]?.text ?? '').replace(/%$/, '');
    const meaning = /\d/.test(text) || /^[<>]$/.test(text) ? readCell(text, style) : null;
    if (meaning?.kind !== 'value') continue;
    const before = words[at - 1]?.text ?? '';
    const after = words[at + 1]?.text ?? '';
    // "6.2 to 6.8" and "between 6 and 7" are ranges; "March 4" and "1 of 2" are no amounts.
    if (
      /^(years?|months?|weeks?|days?|times?|inch(es)?|feet|gallons?|bags?|beds?|plots?|samples?|seasons?|pounds?|lbs?|oz|ounces?|tons?)\b/i.test(
        after,
      ) &&
      !/\//.test(after)
    )
      continue;
    const ranged = /^(to|-|–|—)$/.test(after) && /^\d/.test(words[at + 2]?.text ?? '');
    const rangeEnd = /^(to|-|–|—)$/.test(before) && /\d/.test(words[at - 2]?.text ?? '');
    if (ranged || rangeEnd) continue;
    if (/^(jan|feb|mar|apr|may|june?|july?|aug|sep|oct|nov|dec)[a-z]*\.?$/i.test(before)) continue;
    if (/^\(?(mehlich|bray|olsen|morgan|method|grade|table|form|step)-?$/i.test(before)) continue;
    if (/^(no\.?|number|#|page|sample|lab|of)$/i.test(before) && /^(of|page)$/i.test(after)) continue;
    let unit: { unit: NonNullable<Value['unit']>; printed: string } | null = null;
    for (let to = Math.min(piece.to, at + 6); to > at + 1 && unit === null; to--)
      unit = unitOnly(bare(textOf(words, at + 1, to)));
    if (/%[,.;)]*$/.test(words[at]?.text ?? '')) unit = { unit: '%', printed: '%' };
    const below =
      /^(<|below|under)$/i.test(before) || (/^than$/i.test(before) && /^less$/i.test(words[at - 2]?.text ?? ''));
    const above =
      /^(>|over)$/i.test(before) || (/^than$/i.test(before) && /^(more|greater)$/i.test(words[at - 2]?.text ?? ''));
    const value: Value = { ...meaning, qualifier: below ? '<' : above ? '>' : meaning.qualifier };
    numbers.push({
      from: at,
      to: at + 1,
      value,
      unit: meaning.unit ?? unit?.unit ?? null,
      unitPrinted: meaning.unitPrinted ?? unit?.printed ?? null,
    });
  }
  return numbers;
}

/** Why a number of a sentence is no result of this sample; null when it can be one. */
function refusalOf(words: readonly Placed[], sentence: Piece, name: Name, number: Number_): string | null {
  const start = Math.min(name.from, number.from);
  const clauseFrom = Math.max(sentence.from, start - 5);
  const end = Math.max(name.to, number.to);
  const between = textOf(words, Math.min(name.to, number.to), Math.max(name.from, number.from));
  const before = textOf(words, clauseFrom, start);
  const near = `${before} ${between}`;
  const after = textOf(words, end, Math.min(sentence.to, end + 8));
  if (number.unit !== null && /ft2|yd2|g\/m2|ton\/|cwt/.test(number.unit)) return 'unit of an amount to spread';
  if (APPLY.test(`${before} ${between} ${after.split(/[,;.]/)[0] ?? ''}`)) return 'an amount to spread';
  if (
    /\b(in (19|20)\d\d|last (year|time|season|spring|fall|autumn|test)|previously|a year ago|years ago)\b/i.test(
      textOf(words, sentence.from, end),
    )
  )
    return 'an earlier value';
  if (BEFORE.test(between) || BEFORE.test(before.split(/[,;]/).pop() ?? '')) return 'an earlier value';
  if (WANTED.test(between)) return 'a wanted value';
  if (/^(19|20)\d\d$/.test(number.value.printed) && number.unit === null) return 'a year';
  if (GENERAL.test(near)) return 'a sentence about soils in general';
  return null;
}

function pairsOf(words: readonly Placed[], piece: Piece, style: NumberStyle) {
  const names = namesIn(words, piece);
  const numbers = numbersIn(words, piece, style);
  const pairs: { name: Name; number: Number_ }[] = [];
  const used = new Set<Number_>();
  for (const [order, name] of names.entries()) {
    const stop = names[order + 1]?.from ?? piece.to;
    const after = numbers.filter((one) => one.from >= name.to && one.from < stop && !used.has(one));
    // "45 ppm phosphorus": the number stands before its name, with nothing but its unit and "of" between.
    const ahead = numbers.find((one) => {
      const gap = textOf(words, one.to, name.from)
        .replace(/\b(of|available|extractable)\b/g, ' ')
        .trim();
      return (
        !used.has(one) &&
        one.to <= name.from &&
        name.from - one.to <= 5 &&
        one.unit !== null &&
        (gap === '' || unitOnly(bare(gap)) !== null)
      );
    });
    const chosen = ahead !== undefined ? [ahead] : secondUnit(words, after);
    for (const number of chosen) {
      used.add(number);
      pairs.push({ name, number });
    }
  }
  return { pairs, names };
}

/** A second number counts only as the same amount in another unit: "45 ppm (90 lb/acre)". */
function secondUnit(words: readonly Placed[], after: readonly Number_[]): Number_[] {
  const [first, second] = after;
  if (first === undefined) return [];
  if (second === undefined || first.unit === null || second.unit === null || second.unit === first.unit) return [first];
  const link = words.slice(first.to, second.from).map((word) => word.text);
  const opens = /^\(/.test(words[second.from]?.text ?? '');
  return second.from - first.to <= 5 && (opens || link.some((word) => /^(or|equals?|equivalent|\/|=)$/.test(word)))
    ? [first, second]
    : [first];
}

/** The rating that a sentence gives behind a number, before it goes on to another name. */
function ratingNear(words: readonly Placed[], number: Number_, stop: number): string | null {
  for (let at = number.to; at < number.to + 8 && at < stop; at++) {
    const text = words[at]?.text ?? '';
    const inBrackets = /^\(/.test(text);
    const rating = ratingIn(bare(text));
    const two = ratingIn(bare(textOf(words, at, at + 2)));
    if (two !== null && (inBrackets || /^(rated|is|which|,)$/i.test(words[at - 1]?.text ?? ''))) return two;
    if (rating !== null && (inBrackets || (rating.length > 2 && !/^(below|above)$/i.test(rating)))) return rating;
    if (/[.;]$/.test(text)) return null;
  }
  return null;
}

/**
 * Stage 6d. Results told in sentences: "Your soil pH is 6.3 and phosphorus tested at 45 ppm (high)". Only what a
 * sentence says of this sample is taken; wanted values, earlier years, amounts to spread and remarks about soils in
 * general are set aside with the reason.
 */
export function proseRows(
  paragraphs: readonly Paragraph[],
  style: NumberStyle,
): { rows: ListRow[]; refused: ProseRefusal[] } {
  const rows: ListRow[] = [];
  const refused: ProseRefusal[] = [];
  for (const paragraph of paragraphs) {
    const words = paragraph.words.map((one) => one.word);
    for (const piece of sentencesOf(words)) {
      const { pairs, names } = pairsOf(words, piece, style);
      const seen = new Set<string>();
      for (const { name, number } of pairs) {
        const at = paragraph.words[number.from];
        if (at === undefined) continue;
        const key = `${name.label.analyte}|${number.unit}`;
        const why =
          refusalOf(words, piece, name, number) ?? (seen.has(key) ? 'a second number for the same name' : null);
        if (why !== null) {
          refused.push({ text: `${name.label.text} ${number.value.printed}`, why, line: at.line, word: at.word });
          continue;
        }
        seen.add(key);
        const next = names.find((other) => other !== name && other.from >= number.to);
        const phrase = phraseOf(at.line.line.page, at.line.line.index, [at.word]);
        const share = number.unit === '%' ? readLabel(`${name.label.text} %`) : null;
        const label = share?.analyte.startsWith('sat_') ? share : name.label;
        const lead = at.word.text.length - at.word.text.replace(/^[("'[]+/, '').length;
        const candidate: Candidate = {
          label: { ...label, text: name.label.text },
          value: number.value,
          rating: number.value.rating ?? ratingNear(words, number, next?.from ?? piece.to),
          unit: number.unit ?? name.label.unit,
          unitPrinted: number.unitPrinted ?? name.label.unitPrinted,
          method: name.label.method,
          methodPrinted: name.label.methodPrinted,
          page: at.line.line.page.number,
          box: storedBox(
            at.line.line.page,
            numberBox(phrase, [lead + number.value.span[0], lead + number.value.span[1]]),
          ),
          cell: null,
          position: 0.93,
          doubts: [
            remark('from-a-sentence', 'This number was read from a sentence; check that it is this sample’s own.'),
          ],
        };
        rows.push({ candidate, line: at.line, x0: at.word.x0, identity: null });
      }
    }
  }
  return { rows, refused };
}
