import { LONGEST_TEXT } from './labels/normal';
import type { Box, Reading, ReadRecommendation, ReadResult, ReadSample, Remark } from './types';

/**
 * Control characters (but for tab and line ends), marks that turn the direction of writing, and halves of letters. They
 * hide or reorder what a person sees, and a database does not take some of them.
 */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is looked for
const HIDDEN = /[\0-\x08\x0e-\x1f\x7f\u202a-\u202e\u2066-\u2069]|\p{Surrogate}/u;
const EVERY_HIDDEN = new RegExp(HIDDEN, 'gu');

/** True when a text holds characters that a person does not see or that change what they see. */
export function hasHidden(text: string): boolean {
  return HIDDEN.test(text);
}

/** The text as a person sees it, in the order in which it is stored; cut where it is longer than any word of a report. */
export function plainText(text: string): string {
  const short = text.length > LONGEST_TEXT ? text.slice(0, LONGEST_TEXT) : text;
  return hasHidden(short) ? short.replace(EVERY_HIDDEN, ' ').replace(/\s+/g, ' ').trim() : short;
}

export const HIDDEN_CHARACTERS: Remark = {
  code: 'hidden-characters',
  sentence:
    'This file holds characters that do not show or that turn the direction of writing. They were left out; compare names and numbers with the page.',
};

const orNull = (text: string | null) => (text === null ? null : plainText(text));
const finite = (value: number | null) => (value !== null && Number.isFinite(value) ? value : null);
const place = (box: Box | null) => (box?.every((side) => Number.isFinite(side)) ? box : null);
const remarks = (all: readonly Remark[]) => all.map(({ code, sentence }) => ({ code, sentence: plainText(sentence) }));

function plainResult(result: ReadResult): ReadResult {
  return {
    ...result,
    label: plainText(result.label),
    printed: plainText(result.printed),
    value: finite(result.value),
    unitPrinted: orNull(result.unitPrinted),
    methodPrinted: orNull(result.methodPrinted),
    rating: orNull(result.rating),
    box: place(result.box),
    confidence: finite(result.confidence) ?? 0,
    doubts: remarks(result.doubts),
  };
}

function plainSample(sample: ReadSample): ReadSample {
  const { depth } = sample;
  return {
    sampleId: orNull(sample.sampleId),
    labNumber: orNull(sample.labNumber),
    fieldName: orNull(sample.fieldName),
    depth: depth !== null && Number.isFinite(depth.top) && Number.isFinite(depth.bottom) ? depth : null,
    dateSampled: sample.dateSampled,
    dateSampledPrinted: orNull(sample.dateSampledPrinted),
    dateReported: sample.dateReported,
    dateReportedPrinted: orNull(sample.dateReportedPrinted),
    results: sample.results.map(plainResult),
  };
}

function plainAdvice(advice: ReadRecommendation): ReadRecommendation {
  return {
    ...advice,
    sampleId: orNull(advice.sampleId),
    item: plainText(advice.item),
    amount: finite(advice.amount),
    printed: plainText(advice.printed),
    unit: orNull(advice.unit),
    box: place(advice.box),
  };
}

/**
 * A reading fit to be stored and shown, whatever its file held: every text plain and of a bounded length, every number and
 * place finite. `hidden` says that the file held characters of the kind that is left out; the reading then says so.
 */
export function plainReading(reading: Reading, hidden: boolean): Reading {
  const warnings = remarks(reading.warnings);
  return {
    ...reading,
    warnings: hidden && reading.kind !== 'refused' ? [...warnings, HIDDEN_CHARACTERS] : warnings,
    lab: { name: orNull(reading.lab.name) },
    samples: reading.samples.map(plainSample),
    recommendations: reading.recommendations.map(plainAdvice),
  };
}
