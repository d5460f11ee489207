import type { Reading, Verdict } from './types';
import { intervalInWords, nounFor, type Speaker, verbFor } from './words';

/**
 * A verdict as a sentence: always the estimate, its 90 % interval and the intention; never "because of the amendment".
 * With untreated plots the change is said to be compared with them.
 */
const ENDS: Readonly<Record<Verdict, (compared: boolean) => string>> = {
  'as intended': (compared) =>
    compared ? 'It moved as intended, compared with the untreated plots.' : 'It moved as intended.',
  'short of it': () => '',
  'beyond it': () => '',
  'no change seen': () => 'No change is seen, and less than half of the plan is left as possible.',
  'went the other way': () => 'It went the other way.',
  'right way, size not settled': () => 'It moved the right way; how far is not settled.',
  'cannot tell yet': () => 'These samples cannot tell yet.',
};

export function verdictSentence(
  reading: Pick<Reading, 'verdict' | 'change' | 'changeLo' | 'changeHi' | 'lo' | 'hi' | 'withControls'>,
  intended: number,
  speaker: Speaker,
): string {
  const { verdict, change, changeLo, changeHi, withControls } = reading;
  const beside = withControls ? ' against the untreated plots' : '';
  const start = `${speaker.name} ${verbFor(change)} by ${speaker.size(change)}${beside} (${intervalInWords(changeLo, changeHi, Math.sign(intended), speaker)})`;
  const plan = speaker.size(intended);
  const mayBeNothing = changeLo <= 0 && changeHi >= 0;
  const planned =
    Math.sign(change) === Math.sign(intended) ? `${plan} was planned` : `a ${nounFor(intended)} of ${plan} was planned`;
  if (verdict === 'short of it')
    return `${start}, less than the ${plan} planned.${mayBeNothing ? ' It may be nothing.' : ''}`;
  if (verdict === 'beyond it') return `${start}, more than the ${plan} planned.`;
  if (verdict === 'right way, size not settled') {
    const span = intervalInWords(changeLo, changeHi, Math.sign(intended), speaker);
    return `${speaker.name} ${verbFor(change)} by ${speaker.size(change)}${beside}; ${planned}. ${ENDS[verdict](withControls)} Anywhere from ${span} fits these samples.`;
  }
  return `${start}; ${planned}. ${ENDS[verdict](withControls)}`;
}
