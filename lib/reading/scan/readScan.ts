import { readPagesTraced, type Trace } from '../readPages';
import type { Page, Reading, ReadResult } from '../types';
import { checkInk } from './ink';
import { leftover } from './leftover';
import { mendWords } from './mend';
import { mergeViews } from './merge';
import { pageOf } from './pages';
import { covers, foundLater, isStray, isUnsure, withThirdLook } from './third';
import { figuresOf, judge, pointDoubts, type Spot, spotOf } from './trust';
import type { Merged, ScannedPage } from './types';
import { wholeWords, withoutTypedRules } from './whole';

export type AnyPage = Page | ScannedPage;
type Words = ReadonlyMap<number, readonly Merged[]>;

function isScan(page: AnyPage): page is ScannedPage {
  return 'views' in page;
}

/** Words looked at a third time on one page at most; more mean a page that cannot be read anyway. */
const MOST_LOOKS = 80;

/** Words of a scanned page: the views put together, compared with the ink, usual confusions undone. */
export async function wordsOf(page: ScannedPage, lookAgain: LookAgain): Promise<Merged[]> {
  const merged = mergeViews(page.views, page.letter);
  const unsure = merged.filter((word) => isUnsure(word, page.letter)).slice(0, MOST_LOOKS);
  const sure = new Set(merged.filter((word) => !unsure.includes(word) || word.certainty >= 0.55));
  const free = leftover(page.pieces, [...sure], page.letter);
  const room = 0.3 * page.letter;
  const spots = [...unsure, ...free].map(({ x0, y0, x1, y1 }) => ({
    x0: x0 - room,
    y0: y0 - room,
    x1: x1 + room,
    y1: y1 + room,
  }));
  const texts = spots.length === 0 ? [] : await lookAgain(page.number, spots, 'word');
  const looked = new Map(unsure.map((word, index) => [word, withThirdLook(word, texts[index] ?? '')]));
  const found = free.flatMap((box, index) => foundLater(box, texts[unsure.length + index] ?? '', page.views.length));
  const kept = merged
    .map((word) => looked.get(word) ?? word)
    .filter((word) => !isStray(word) && !found.some((later) => covers(later, word)));
  return mendWords(checkInk(wholeWords(withoutTypedRules([...kept, ...found], page.letter)), page.pieces, page.letter));
}

function readWords(input: { fileName: string; pages: readonly AnyPage[] }, words: Words) {
  const pages = input.pages.map((page) => (isScan(page) ? pageOf(page, words.get(page.number) ?? []) : page));
  return readPagesTraced({ fileName: input.fileName, pages });
}

function spotsOf(reading: Reading, pages: readonly AnyPage[], words: Words): Map<ReadResult, Spot> {
  const spots = new Map<ReadResult, Spot>();
  for (const result of reading.samples.flatMap((sample) => sample.results)) {
    const page = pages.find((one) => one.number === result.page);
    if (page === undefined || !isScan(page)) continue;
    const spot = spotOf(result, page, words.get(page.number) ?? []);
    if (spot !== null) spots.set(result, spot);
  }
  return spots;
}

/** The words with a number exchanged where both other looks say the same and only one look said what was taken. */
function corrected(words: Words, spots: Iterable<Spot>, looks: ReadonlyMap<string, string>): Words {
  const changed = new Map(words);
  for (const spot of spots) {
    const [word] = spot.words;
    const again = looks.get(keyOf(spot)) ?? '';
    if (spot.words.length !== 1 || word === undefined || figuresOf(again) === '') continue;
    const [own, second] = [figuresOf(word.text), figuresOf(again)];
    if (own === second || word.support > 1 || word.point === 'added') continue;
    if (!word.others.some((other) => figuresOf(other) === second)) continue;
    const tail = /[A-Z+*]*$/.exec(word.text)?.[0] ?? '';
    const next: Merged = { ...word, text: again + tail, support: 1, others: [word.text] };
    changed.set(
      spot.page,
      (changed.get(spot.page) ?? []).map((one) => (one === word ? next : one)),
    );
  }
  return changed;
}

function keyOf(spot: Spot): string {
  return `${spot.page}:${Math.round(spot.box.x0)},${Math.round(spot.box.y0)}`;
}

/** The result's words with a little room, where a second look is taken. */
function frameOf(spot: Spot, page: ScannedPage): Spot['box'] {
  const boxes = spot.words.length > 0 ? spot.words : [spot.box];
  const room = 0.3 * page.letter;
  return {
    x0: Math.min(...boxes.map((box) => box.x0), spot.box.x0) - room,
    y0: Math.min(...boxes.map((box) => box.y0)) - room,
    x1: Math.min(Math.max(...boxes.map((box) => box.x1)), spot.box.x1 + page.letter) + room,
    y1: Math.max(...boxes.map((box) => box.y1)) + room,
  };
}

function storedResult(result: ReadResult, page: ScannedPage): ReadResult {
  if (result.box === null) return result;
  const [x0, y0, x1, y1] = result.box;
  const { width: w, height: h } = page;
  return { ...result, box: page.stored({ x0: x0 * w, y0: y0 * h, x1: x1 * w, y1: y1 * h }) };
}

export type TracedScan = {
  readonly reading: Reading;
  readonly trace: Trace | null;
  /** The same with the boxes of scanned pages still on the level page, for drawing over what the stages saw. */
  readonly level: Reading;
};

/** Looks again at spots of one scanned page, each alone; the text seen at each, '' for nothing. */
export type LookAgain = (
  page: number,
  spots: readonly Spot['box'][],
  as: 'number' | 'word',
) => Promise<readonly string[]>;

async function lookAt(
  spots: Iterable<Spot>,
  pages: readonly AnyPage[],
  lookAgain: LookAgain,
  known: ReadonlyMap<string, string>,
): Promise<Map<string, string>> {
  const seen = new Map(known);
  const wanted = [...spots].filter((spot) => !seen.has(keyOf(spot)));
  for (const page of pages) {
    if (!isScan(page)) continue;
    const here = wanted.filter((spot) => spot.page === page.number);
    if (here.length === 0) continue;
    const texts = await lookAgain(
      page.number,
      here.map((spot) => frameOf(spot, page)),
      'number',
    );
    for (const [index, spot] of here.entries()) seen.set(keyOf(spot), texts[index] ?? '');
  }
  return seen;
}

/**
 * Reads a report of which some pages are pictures. The words of each picture, as several looks saw them, are put
 * together and read by the same stages as words of a text layer; then every number is looked at once more by itself, and
 * its confidence is held to what the looks and the ink agree on. Boxes are given on the pages as stored.
 * Errors: none for content; a picture without type is a page without words.
 */
export async function readScanTraced(input: {
  fileName: string;
  pages: readonly AnyPage[];
  lookAgain: LookAgain;
}): Promise<TracedScan> {
  const first = new Map<number, readonly Merged[]>();
  for (const page of input.pages.filter(isScan)) first.set(page.number, await wordsOf(page, input.lookAgain));
  let words: Words = first;
  let { reading, trace } = readWords(input, words);
  let spots = spotsOf(reading, input.pages, words);
  let looks = await lookAt(spots.values(), input.pages, input.lookAgain, new Map());
  const better = corrected(words, spots.values(), looks);
  if ([...better].some(([page, list]) => list !== words.get(page))) {
    words = better;
    ({ reading, trace } = readWords(input, words));
    spots = spotsOf(reading, input.pages, words);
    looks = await lookAt(spots.values(), input.pages, input.lookAgain, looks);
  }
  const points = pointDoubts(reading);
  const judged = (result: ReadResult): ReadResult => {
    const page = input.pages.find((one) => one.number === result.page);
    const spot = spots.get(result);
    if (page === undefined || !isScan(page) || spot === undefined) return result;
    const { ceiling, doubts } = judge(result, spot, looks.get(keyOf(spot)) ?? null);
    const point = points.get(result);
    const all = [...result.doubts, ...doubts, ...(point === undefined ? [] : [point])];
    const confidence = Math.min(result.confidence, ceiling, point === undefined ? 1 : 0.6);
    return storedResult({ ...result, confidence: Math.round(confidence * 100) / 100, doubts: all }, page);
  };
  const samples = reading.samples.map((sample) => ({ ...sample, results: sample.results.map(judged) }));
  const recommendations = reading.recommendations.map((one) => {
    const page = input.pages.find((other) => other.number === one.page);
    if (page === undefined || !isScan(page) || one.box === null) return one;
    const [x0, y0, x1, y1] = one.box;
    const { width: w, height: h } = page;
    return { ...one, box: page.stored({ x0: x0 * w, y0: y0 * h, x1: x1 * w, y1: y1 * h }) };
  });
  return { reading: { ...reading, samples, recommendations }, trace, level: reading };
}
