import { analyte, isAnalyteKey } from '@/lib/domain/analytes';
import type { EffectOutcome, Reading, TestPoint } from '@/lib/domain/effects';
import type { EffectCheckAnswer } from '@/lib/schemas/effects';
import { type JudgedEffect, stripOfEffect } from '@/lib/ui/charts/from-effect';
import { formatDay, formatNumber, formatSigned, withUnit } from '@/lib/ui/charts/numbers';
import type { ChartAnalyte, DumbbellEnd, DumbbellProps, IntervalStripProps, TargetBand } from '@/lib/ui/charts/types';
import type { RefusalBoxProps, VerdictLineProps } from '@/lib/ui/verdict/types';
import { shortLabel } from '../../plots/[plotId]/_components/history-props';
import { helpFor } from './refusal-help';

/** From an effect check's answer to what is said and drawn of it. */

export type Judged = Extract<EffectOutcome, { ok: true }>;
export type Refused = Extract<EffectOutcome, { ok: false }>;
type Check = EffectCheckAnswer;

export const COMPARED = 'compared with the untreated plots';

export const checkLabel = (check: Pick<Check, 'analyte' | 'analyteLabel'>): string =>
  shortLabel(check.analyte, check.analyteLabel);

/** "Elemental sulfur, 9 lb on 20 Apr 2025; Gypsum, 4 lb on 2 May 2025". */
export const spreadWords = (check: Pick<Check, 'applications'>): string =>
  check.applications.map((one) => `${one.material}, ${one.amountPrinted}, on ${formatDay(one.appliedOn)}`).join('; ');

export function checkAnalyte(check: Pick<Check, 'analyte' | 'analyteLabel' | 'decimals'>, unit: string): ChartAnalyte {
  const isPh = unit === 'pH';
  return { label: checkLabel(check), unit: isPh ? '' : unit, isPh, decimals: check.decimals };
}

export function verdictProps(outcome: Judged): VerdictLineProps {
  const [first] = outcome.settle;
  return {
    verdict: outcome.verdict,
    sentence: outcome.sentences[0] ?? outcome.reading.sentence,
    ...(outcome.reading.withControls ? { comparedWith: COMPARED } : {}),
    ...(first === undefined ? {} : { settledBy: first.text }),
  };
}

/** The same change read without the untreated plots, with the words that lead to it. */
export function secondReading(outcome: Judged): { lead: string; line: VerdictLineProps; reading: Reading } | null {
  const reading = outcome.withoutControls;
  if (reading === undefined) return null;
  const note = outcome.sentences.slice(1).find((sentence) => sentence.endsWith(reading.sentence));
  const lead = note?.slice(0, -reading.sentence.length).trim();
  return {
    lead: lead || 'The same change, read without the untreated plots:',
    line: { verdict: reading.verdict, sentence: reading.sentence, size: 'small' },
    reading,
  };
}

/** What stands under the verdict, without what has a place of its own: the remedy and the second reading. */
export function notesOf(outcome: Judged): string[] {
  const elsewhere = new Set(outcome.settle.map((remedy) => remedy.text));
  const second = outcome.withoutControls?.sentence;
  return outcome.sentences
    .slice(1)
    .filter((sentence) => !elsewhere.has(sentence) && !(second !== undefined && sentence.endsWith(second)));
}

/** The sentences name both figures from a tenth of the plan on; so does the drawing. */
const DIFFERS_BY = 0.1;

export function stripProps(
  outcome: JudgedEffect & Pick<Judged, 'planned'>,
  analyte: ChartAnalyte,
  reading?: Reading,
): IntervalStripProps {
  const differs = Math.abs(outcome.intended - outcome.planned) > DIFFERS_BY * Math.abs(outcome.planned);
  return { ...stripOfEffect(outcome, analyte, reading), ...(differs ? { plannedWord: 'due' } : {}) };
}

export function printedTest(test: Pick<TestPoint, 'value' | 'qualifier' | 'unit'>, decimals: number): string {
  const number = formatNumber(test.value, decimals);
  const unit = test.unit === 'pH' ? '' : test.unit;
  if (test.qualifier === 'below-unknown') return 'none found';
  return withUnit(
    test.qualifier === 'below' ? `< ${number}` : test.qualifier === 'above' ? `> ${number}` : number,
    unit,
  );
}

/** 95 % range of each test, by its id, as the plot's history knows it. */
export type Ranges = ReadonlyMap<string, { low: number | null; high: number | null }>;

const heaviest = (outcome: Judged) =>
  outcome.before.reduce<Judged['before'][number] | undefined>(
    (best, row) => (best === undefined || row.weight > best.weight ? row : best),
    undefined,
  );

/** null where a value is only known against a limit: there is no point to draw. */
export function dumbbellProps(
  outcome: Judged,
  analyte: ChartAnalyte,
  ranges: Ranges,
  target: TargetBand | null,
): DumbbellProps | null {
  const before = heaviest(outcome)?.test;
  const { after, reading, intended } = outcome;
  if (before === undefined || before.qualifier !== 'exact' || after.qualifier !== 'exact') return null;
  const end = (test: TestPoint): DumbbellEnd => ({
    takenOn: test.day,
    value: test.value,
    printed: formatNumber(test.value, analyte.decimals),
    low: ranges.get(test.resultId)?.low ?? null,
    high: ranges.get(test.resultId)?.high ?? null,
  });
  const aims = [reading.correctedBefore + 0.5 * intended, reading.correctedBefore + 1.5 * intended];
  const low = Math.min(...aims);
  return {
    analyte,
    before: end(before),
    after: end(after),
    intended: { low: analyte.isPh ? low : Math.max(0, low), high: Math.max(...aims) },
    target,
    changeIsClear: reading.changeLo > 0 || reading.changeHi < 0,
  };
}

export function refusalBoxProps(outcome: Refused, decimals: number): RefusalBoxProps {
  const tests = [
    { word: 'Before', test: outcome.before },
    { word: 'After', test: outcome.after },
  ];
  return {
    refusal: outcome.answer,
    reason: outcome.sentence,
    help: helpFor({ reason: outcome.reason, from: outcome.from, until: outcome.until }),
    values: tests.flatMap(({ word, test }) =>
      test === undefined ? [] : [{ label: `${word}, ${formatDay(test.day)}`, printed: printedTest(test, decimals) }],
    ),
  };
}

/** What was meant, in a line: "Meant: −0.50 once all has reacted". */
export function meantWords(check: Pick<Check, 'analyte' | 'applications' | 'decimals'>): string {
  const total = check.applications.reduce((sum, one) => sum + one.fullChange, 0);
  const unit = isAnalyteKey(check.analyte) ? analyte(check.analyte).unit : '';
  const isPh = unit === 'pH';
  const size = formatSigned(total, isPh ? check.decimals + 1 : check.decimals);
  return `Meant: ${withUnit(size, isPh ? '' : unit)} once all has reacted`;
}
