import type { EffectOutcome, Reading } from '../../domain/effects/types';
import type { ChartAnalyte, IntervalStripProps } from './types';

/** What the strip needs of a judged effect. */
export type JudgedEffect = Pick<Extract<EffectOutcome, { ok: true }>, 'intended' | 'reading' | 'controls'>;

const bound = (value: number): number | null => (Number.isFinite(value) ? value : null);

/**
 * What the strip draws of an effect check. In natural units half and one and a half times the plan lie at 0.5 and 1.5 times
 * the intended change on every working scale; on logs a fall by more than the before value has no end, so that side is open.
 */
export function stripOfEffect(
  outcome: JudgedEffect,
  analyte: ChartAnalyte,
  reading: Reading = outcome.reading,
): IntervalStripProps {
  const { intended } = outcome;
  const end = 1.5 * intended;
  const endless = reading.scale === 'log' && intended < 0 && reading.correctedBefore + end <= 0;
  const used = outcome.controls.filter((c) => c.used).length;
  const controls = reading.withControls && used > 0;
  return {
    analyte,
    planned: intended,
    change: { estimate: reading.change, low: bound(reading.changeLo), high: bound(reading.changeHi) },
    half: 0.5 * intended,
    oneAndHalf: endless ? null : end,
    ...(controls ? { comparedWith: `compared with ${used} untreated ${used === 1 ? 'plot' : 'plots'}` } : {}),
  };
}
