import type { Hemisphere } from '@/lib/domain/sampling';
import type { CompareAnswer } from '@/lib/schemas/effects';
import { formatDay, formatNumber, withUnit } from '@/lib/ui/charts/numbers';
import type { ChartAnalyte, CompareStripProps, CompareTest } from '@/lib/ui/charts/types';
import type { RefusalBoxProps } from '@/lib/ui/verdict/types';
import { helpFor } from '../../../../effects/_components/refusal-help';
import { shortLabel } from '../../_components/history-props';
import { seasonWords } from './choice';

/** From the comparison's answer to what is drawn or refused. */

type Side = CompareAnswer['a'];

export const shownUnit = (unit: string): string => (unit === 'pH' ? '' : unit);

export function printedValue(test: Pick<Side, 'value' | 'qualifier'>, decimals: number): string {
  const number = formatNumber(test.value, decimals);
  if (test.qualifier === 'below') return `< ${number}`;
  if (test.qualifier === 'above') return `> ${number}`;
  return test.qualifier === 'below-unknown' ? 'none found' : number;
}

const bound = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);

export function compareAnalyte(answer: CompareAnswer): ChartAnalyte {
  const unit = shownUnit(answer.a.unit);
  return {
    label: shortLabel(answer.analyte, answer.analyteLabel),
    unit,
    isPh: answer.a.unit === 'pH',
    decimals: answer.decimals,
  };
}

function side(answer: CompareAnswer, test: Side, hemisphere: Hemisphere): CompareTest {
  const samePlot = answer.a.plotId === answer.b.plotId;
  return {
    label: samePlot ? seasonWords(test.takenOn, hemisphere) : test.plotName,
    takenOn: test.takenOn,
    value: test.value,
    printed: printedValue(test, answer.decimals),
    low: test.low,
    high: test.high,
    note: [test.method, test.laboratory].filter(Boolean).join(', '),
  };
}

/** null where the two may not be compared: then both values stand side by side without a common scale. */
export function compareProps(answer: CompareAnswer, hemisphere: Hemisphere): CompareStripProps | null {
  const { outcome } = answer;
  if (!outcome.ok) return null;
  return {
    analyte: compareAnalyte(answer),
    earlier: side(answer, answer.a, hemisphere),
    later: side(answer, answer.b, hemisphere),
    outcome: {
      kind: 'difference',
      difference: { estimate: outcome.difference, low: bound(outcome.lo), high: bound(outcome.hi) },
      moreThanNoise: outcome.moreThanNoise,
      widenedBy: outcome.widenedBy.map((why) => `another ${why}`),
    },
    zeroWord: answer.a.plotId === answer.b.plotId ? 'no change' : 'no difference',
  };
}

export function refusalProps(answer: CompareAnswer): RefusalBoxProps | null {
  const { outcome } = answer;
  if (outcome.ok) return null;
  const value = (test: Side) => ({
    label: `${test.plotName}, ${formatDay(test.takenOn)}`,
    printed: withUnit(printedValue(test, answer.decimals), shownUnit(test.unit)),
    note: [test.method ?? 'method not stated', test.laboratory ?? 'laboratory not stated'].join(', '),
  });
  return {
    refusal: 'not comparable',
    reason: outcome.sentence,
    help: helpFor({ reason: outcome.reason }),
    values: [value(answer.a), value(answer.b)],
  };
}
