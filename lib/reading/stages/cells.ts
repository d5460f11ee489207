import { readLabel, unitOnly } from '../labels/label';
import { spelledOut } from '../labels/legend';
import { type Line, type Phrase, phraseOf } from './lines';
import { roleOf } from './roles';
import { type CellMeaning, type NumberStyle, readCell } from './values';

export type PageCell = { readonly phrase: Phrase; readonly meaning: CellMeaning };
export type CellLine = { readonly line: Line; readonly cells: readonly PageCell[]; readonly values: number };

function cut(phrase: Phrase, at: number): [Phrase, Phrase] {
  return [
    phraseOf(phrase.page, phrase.line, phrase.words.slice(0, at)),
    phraseOf(phrase.page, phrase.line, phrase.words.slice(at)),
  ];
}

function wordsText(phrase: Phrase, from: number, to?: number): string {
  return phrase.words
    .slice(from, to)
    .map((word) => word.text)
    .join(' ');
}

/** "pH in 0.01 M", "Mehlich 3", "Bray 1": the number is a part of the name. */
function belongsToName(left: string, number: string, whole: string): boolean {
  if (/[:=]$/.test(left)) return false;
  if (/\b(in|with|by|at|of|to|per|no\.?|page|(at|to|of) pH)$/i.test(left)) return true;
  if (/^\d*\.?\d+ ?[MN]( |$)/.test(number)) return true;
  return (
    /\b(mehlich|bray|p|m|morgan|method|olsen)-?$/i.test(left) &&
    /^[-]?(1|2|3|i{1,3})\b(?!\.)/i.test(number) &&
    readLabel(whole) !== null
  );
}

/** "Found 34", "Desired: 50": a word for the number and nothing else. */
function saysRole(left: string): boolean {
  const role = roleOf(left, false);
  return role === 'result' || role === 'desired' || role === 'previous' || role === 'difference';
}

/** "Soil pH: 6.4" set with one blank is a label and a value; several numbers set close together are several cells. */
function parts(phrase: Phrase, style: NumberStyle): Phrase[] {
  const count = phrase.words.length;
  if (count < 2) return [phrase];
  // "27 ppm (54 lb/A)": one amount in two units is two numbers.
  const second = phrase.words.findIndex((word, index) => index > 0 && /^\([<>]?\d/.test(word.text));
  if (second > 0) {
    const [first, other] = [readCell(wordsText(phrase, 0, second), style), readCell(wordsText(phrase, second), style)];
    if (first.kind === 'value' && other.kind === 'value' && other.unit !== null) return cut(phrase, second);
  }
  if (readCell(phrase.text, style).kind !== 'text') return [phrase];
  const each = phrase.words.map((word) => readCell(word.text, style));
  const numbers = each.filter((cell) => cell.kind === 'value').length;
  if (numbers >= 2 && each.every((cell) => cell.kind !== 'text' && cell.kind !== 'range')) {
    return phrase.words.map((word) => phraseOf(phrase.page, phrase.line, [word]));
  }
  // "6.9 Zinc, DTPA": the number of one list so near the next list's label that they became one phrase.
  const [firstWord] = phrase.words;
  const rest = wordsText(phrase, 1);
  if (
    each[0]?.kind === 'value' &&
    firstWord !== undefined &&
    each[0].unit === null &&
    readLabel(rest) !== null &&
    unitOnly(rest) === null
  ) {
    const [head, tail] = cut(phrase, 1);
    return [head, ...parts(tail, style)];
  }
  for (let at = count - 1; at >= 1; at--) {
    const right = readCell(wordsText(phrase, at), style).kind;
    if (right !== 'value' && right !== 'none' && right !== 'range') continue;
    const left = wordsText(phrase, 0, at).replace(/[:=]$/, '');
    const number = wordsText(phrase, at);
    if (belongsToName(left, number, phrase.text)) continue;
    if (readLabel(left) !== null || (right === 'value' && saysRole(left))) return cut(phrase, at);
  }
  return [phrase];
}

/** A unit set right behind its number belongs to it, wherever the columns part. */
export function isUnitOf(value: PageCell | undefined, cell: PageCell): boolean {
  return (
    value?.meaning.kind === 'value' &&
    value.meaning.unit === null &&
    unitOnly(cell.phrase.text) !== null &&
    cell.phrase.x0 - value.phrase.x1 < 1.1 * value.phrase.size
  );
}

/** A row of a list: words first, then a unit, a number or a blank. */
function inRow(before: readonly Phrase[], style: NumberStyle): boolean {
  const [first, ...rest] = before;
  if (first === undefined || readCell(first.text, style).kind !== 'text') return false;
  return (
    readLabel(first.text) !== null ||
    rest.some((phrase) => unitOnly(phrase.text) !== null || readCell(phrase.text, style).kind !== 'text')
  );
}

/** "6.7 not acc." in a row that begins with a label: the number, then a remark set too near. */
function valueAndRemark(phrase: Phrase, style: NumberStyle): Phrase[] {
  const [first] = phrase.words;
  if (first === undefined || phrase.words.length < 2 || !/^[<>]?\d[\d.,]*$/.test(first.text)) return [phrase];
  if (readCell(phrase.text, style).kind !== 'text' || readCell(first.text, style).kind !== 'value') return [phrase];
  if (!/\p{L}{3}/u.test(wordsText(phrase, 1))) return [phrase];
  return cut(phrase, 1);
}

/** Stage 3. Phrases to cells, each with what it can be when nothing around it is known. */
export function cellsOf(lines: readonly Line[], style: NumberStyle, legend: ReadonlyMap<string, string>): CellLine[] {
  return lines.map((line) => {
    const cells = line.phrases
      .flatMap((phrase) => parts(phrase, style))
      .flatMap((phrase, index, all) => (inRow(all.slice(0, index), style) ? valueAndRemark(phrase, style) : [phrase]))
      .map((phrase) => ({
        phrase: { ...phrase, text: spelledOut(phrase.text, legend) },
        meaning: readCell(phrase.text, style),
      }));
    return { line, cells, values: cells.filter((cell) => cell.meaning.kind === 'value').length };
  });
}

/** The box of the number inside its phrase: the words of the span, the first and last cut by their share of letters. */
export function numberBox(phrase: Phrase, span: readonly [number, number]) {
  let at = 0;
  let box: { x0: number; y0: number; x1: number; y1: number } | null = null;
  for (const word of phrase.words) {
    const from = Math.max(span[0] - at, 0);
    const to = Math.min(span[1] - at, word.text.length);
    if (to > from) {
      const step = (word.x1 - word.x0) / (word.text.length || 1);
      const x0 = word.x0 + from * step;
      const x1 = word.x0 + to * step;
      box =
        box === null
          ? { x0, y0: word.y0, x1, y1: word.y1 }
          : { x0: box.x0, y0: Math.min(box.y0, word.y0), x1, y1: Math.max(box.y1, word.y1) };
    }
    at += word.text.length + 1;
  }
  return box ?? { x0: phrase.x0, y0: phrase.y0, x1: phrase.x1, y1: phrase.y1 };
}
