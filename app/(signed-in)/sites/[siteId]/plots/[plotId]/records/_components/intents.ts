import { ANALYTES, analyte, isAnalyteKey } from '@/lib/domain/analytes';
import { noiseClassOf } from '@/lib/domain/effects';
import type { SuggestChangeAnswer } from '@/lib/schemas/applications';
import { formatRange, formatSigned, withUnit } from '@/lib/ui/charts/numbers';
import { shortLabel } from '../../_components/history-props';
import { type Intent, readNumber } from './application-body';

/** The changes an application is meant to make: what stands in the fields, and what a published rule suggests. */

export type Suggestion = SuggestChangeAnswer['suggestions'][number];
export type IntentRow = { key: number; analyte: string; typed: string; from: Suggestion | null };

const TYPED = 'typed by the grower';

/** Only analytes whose noise is known can be checked later, so only those are offered. */
export const INTENT_OPTIONS = ANALYTES.filter(({ key }) => noiseClassOf(key).ok).map(({ key, label }) => ({
  value: key as string,
  label: shortLabel(key, label),
}));

export const unitOfAnalyte = (key: string): string => (isAnalyteKey(key) ? analyte(key).unit : '');
const digitsOf = (key: string): number => {
  if (!isAnalyteKey(key)) return 2;
  const { unit, decimals } = analyte(key);
  return unit === 'pH' ? 2 : decimals;
};

/** The likely change as it goes into the field: "-0.54". */
export const typedSuggestion = (one: Suggestion): string => one.likely.toFixed(digitsOf(one.analyte));

export function suggestionWords(one: Suggestion): { label: string; range: string } {
  const digits = digitsOf(one.analyte);
  const [low, high] = [one.low, one.high].sort((x, y) => x - y);
  const unit = one.unit === 'pH' ? '' : one.unit;
  const label = isAnalyteKey(one.analyte) ? shortLabel(one.analyte, analyte(one.analyte).label) : one.analyte;
  const span = withUnit(formatRange(low ?? null, high ?? null, digits, true), unit);
  return { label, range: `${span}, middle ${withUnit(formatSigned(one.likely, digits), unit)}` };
}

/**
 * A row without an analyte or a number says nothing and is left out; a half-filled one is asked about. `keys` says which row
 * each intent came from, because the API counts only what was sent.
 */
export function readIntents(
  rows: readonly IntentRow[],
): { ok: true; intents: Intent[]; keys: number[] } | { ok: false; errors: Record<string, string> } {
  const errors: Record<string, string> = {};
  const intents: Intent[] = [];
  const keys: number[] = [];
  for (const row of rows) {
    const name = `intents.${row.key}.fullChange`;
    const read = readNumber(row.typed);
    if (row.analyte === '' && row.typed.trim() === '') continue;
    if (row.analyte === '') errors[`intents.${row.key}.analyte`] = 'Which analyte is this change of?';
    else if (read.error !== undefined) errors[name] = read.error;
    else if (read.value === undefined) errors[name] = 'Give the change meant, or choose no analyte.';
    else {
      const suggested =
        row.from !== null && row.from.analyte === row.analyte && typedSuggestion(row.from) === row.typed;
      keys.push(row.key);
      intents.push({
        analyte: row.analyte,
        unit: unitOfAnalyte(row.analyte),
        fullChange: read.value,
        low: suggested ? (row.from?.low ?? null) : null,
        high: suggested ? (row.from?.high ?? null) : null,
        source: suggested ? (row.from?.source ?? TYPED).slice(0, 300) : TYPED,
      });
    }
  }
  return Object.keys(errors).length === 0 ? { ok: true, intents, keys } : { ok: false, errors };
}
