import { analyte, methodLabel, unitOf } from '@/lib/domain/analytes';
import { asDay, dayInWords } from '@/lib/domain/days';
import { remark } from '../candidate';
import { plausibleDoubt } from '../checks/plausible';
import type { Reading, ReadResult, ReadSample, Remark } from '../types';
import { layoutOf, plainLabel } from './layout';
import { columnOf, type Lesson, type Memory } from './lessons';

/** On which confirmation a row leans, and which of its cells the page left open and that confirmation answers. */
export type Learnt = {
  readonly on: string;
  readonly filled: readonly ('analyte' | 'form' | 'unit' | 'method')[];
  /** The row as the page alone gave it, so that what was filled can be taken back. */
  readonly before: Pick<ReadResult, 'analyte' | 'form' | 'unit' | 'method'>;
};
export type LearntResult = ReadResult & { readonly learnt?: Learnt | null };
export type LearntSample = Omit<ReadSample, 'results'> & { readonly results: readonly LearntResult[] };
export type LearntReading = Omit<Reading, 'samples'> & { readonly samples: readonly LearntSample[] };

export const LEARNT_OTHERWISE = 'learnt-otherwise';
/** A row that contradicts what a person confirmed is never given as sure. */
const CONTRADICTED = 0.6;
const NAME_OPEN: ReadonlySet<string> = new Set(['name-ambiguous', 'ph-method-missing']);
/** A little more than the roundings of two places: fractions of the page's width. */
const SAME_COLUMN = 0.04;

/** The page names the analyte in a way that can mean another one as well. */
const nameIsOpen = (row: ReadResult) => row.doubts.some((doubt) => NAME_OPEN.has(doubt.code));

const agrees = <T>(read: T | null, learnt: T | null) => read === null || learnt === null || read === learnt;

const fits = (row: ReadResult, lesson: Lesson) =>
  row.analyte === lesson.analyte && agrees(row.unit, lesson.unit) && agrees(row.method, lesson.method);

function standsIn(row: ReadResult, lesson: Lesson): boolean {
  const place = columnOf(row);
  if (place === null || lesson.columns.length === 0) return true;
  return lesson.columns.some((column) => Math.abs(column - place) <= (row.box === null ? 0 : SAME_COLUMN));
}

/** The only one, or the only one whose column this is. */
function single(row: ReadResult, among: readonly Lesson[]): Lesson | null {
  const [first] = among.length === 1 ? among : among.filter((lesson) => standsIn(row, lesson));
  const alone = among.length === 1 || among.filter((lesson) => standsIn(row, lesson)).length === 1;
  return alone ? (first ?? null) : null;
}

/** The lesson this row is about; null when several could be meant: the memory does not guess either. */
function lessonFor(row: ReadResult, lessons: readonly Lesson[]): Lesson | null {
  const fitting = lessons.filter((lesson) => fits(row, lesson));
  const full = fitting.filter((lesson) => lesson.unit === row.unit && lesson.method === row.method);
  if (full.length > 0) return single(row, full);
  if (fitting.length > 0) return single(row, fitting);
  // Nothing that was confirmed fits what is read now; whichever is meant, it is another one.
  return single(row, lessons) ?? (nameIsOpen(row) ? null : (lessons[0] ?? null));
}

function words(one: Pick<Lesson, 'analyte' | 'unit' | 'method' | 'form'>): string {
  const method = one.method === null ? '' : ` (${methodLabel(one.method)})`;
  const form = one.form === null || one.form === 'element' ? '' : ` as ${one.form}`;
  const unit = one.unit === null ? '' : ` in ${unitOf(one.unit)?.label ?? one.unit}`;
  return `${analyte(one.analyte).label}${form}${method}${unit}`;
}

const doubted = (row: LearntResult, doubt: Remark): LearntResult => ({
  ...row,
  doubts: row.doubts.some((one) => one.code === doubt.code) ? row.doubts : [...row.doubts, doubt],
  confidence: Math.min(row.confidence, CONTRADICTED),
});

const onDay = (on: string) => dayInWords(asDay(on));

function contradiction(row: ReadResult, lesson: Lesson, on: string): Remark | null {
  const otherName = row.analyte !== lesson.analyte && !nameIsOpen(row);
  const otherForm = row.analyte === lesson.analyte && !nameIsOpen(row) && !agrees(row.form, lesson.form);
  if (!otherName && !otherForm && agrees(row.unit, lesson.unit) && agrees(row.method, lesson.method)) return null;
  const sentence = `On ${onDay(on)} you confirmed "${lesson.labelPrinted}" in this layout as ${words(lesson)}; this page reads as ${words(row)}.`;
  return remark(LEARNT_OTHERWISE, sentence);
}

function filled(row: ReadResult, lesson: Lesson, on: string): LearntResult {
  const names: Learnt['filled'][number][] = [];
  let next: ReadResult = row;
  if (row.analyte !== lesson.analyte) {
    next = { ...next, analyte: lesson.analyte, form: lesson.form };
    names.push('analyte');
  } else if (lesson.form !== null && row.form !== lesson.form) {
    next = { ...next, form: lesson.form };
    names.push('form');
  }
  if (row.unit === null && lesson.unit !== null) {
    next = { ...next, unit: lesson.unit };
    names.push('unit');
  }
  if (row.method === null && lesson.method !== null) {
    next = { ...next, method: lesson.method };
    names.push('method');
  }
  const { analyte: named, form, unit, method } = row;
  const learnt = { on, filled: names, before: { analyte: named, form, unit, method } };
  const odd = names.length === 0 || row.doubts.some((one) => one.code === 'implausible') ? null : plausibleDoubt(next);
  if (odd === null) return { ...next, learnt };
  return { ...doubted(next, odd), learnt };
}

function applyToRow(row: LearntResult, memory: Memory): LearntResult {
  const known = memory.get(plainLabel(row.label));
  if (known === undefined) return row;
  const lesson = lessonFor(row, known.lessons);
  if (lesson === null) return row;
  const against = contradiction(row, lesson, known.on);
  return against === null ? filled(row, lesson, known.on) : doubted(row, against);
}

/**
 * The results of a list stand in one column. When the reader took its numbers from another one than the person
 * confirmed, that may be last year's or the wanted ones. Samples side by side have a column each, so a report with
 * several samples is not judged.
 */
function doubtColumn(row: LearntResult, memory: Memory): LearntResult {
  const known = memory.get(plainLabel(row.label));
  const everyOne = known?.lessons.every((lesson) => lesson.columns.length === 1) ?? false;
  if (known === undefined || !everyOne || known.lessons.some((lesson) => standsIn(row, lesson))) return row;
  const sentence = `In the report you confirmed on ${onDay(known.on)} the result of "${row.label}" stood in another column of this layout.`;
  return doubted(row, remark(LEARNT_OTHERWISE, sentence));
}

/** A row without what was learnt: as the page alone gave it. */
export function withoutMemory(row: LearntResult): LearntResult {
  const doubts = row.doubts.filter((doubt) => doubt.code !== LEARNT_OTHERWISE);
  return { ...row, ...row.learnt?.before, doubts, learnt: null };
}

/**
 * A reading with what earlier confirmations of its layout taught. Where the page leaves unit, method or the meaning of a
 * name open, the cell is filled and the row says so; where the page says something else than was confirmed, a doubt is
 * added. No doubt is ever taken away, no row added or dropped, no number touched and no confidence raised. Pure.
 */
export function applyMemory(reading: Reading, memory: Memory): LearntReading {
  if (memory.size === 0) return reading;
  const layout = layoutOf({ laboratory: reading.lab.name, samples: reading.samples.map((sample) => sample.results) });
  const one = reading.samples.length === 1 && (layout?.shape.endsWith('-down') ?? false);
  return {
    ...reading,
    samples: reading.samples.map((sample) => ({
      ...sample,
      results: sample.results.map((row) => {
        const read = applyToRow(row, memory);
        return one ? doubtColumn(read, memory) : read;
      }),
    })),
  };
}
