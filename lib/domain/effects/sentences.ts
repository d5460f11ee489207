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

const DIFFERS_BY = 0.1;

/** "0.62 was planned", or both figures when the day of the test or a short spreading make the plan and its due part differ. */
function intentionWords(intended: number, planned: number, sameWay: boolean, speaker: Speaker) {
  const full = speaker.size(planned);
  const differs = Math.abs(intended - planned) > DIFFERS_BY * Math.abs(planned);
  const due = speaker.size(intended);
  const what = sameWay ? due : `a ${nounFor(intended)} of ${due}`;
  return differs
    ? { was: `${what} was due by then (${full} in full)`, the: `the ${due} due by then (${full} in full)` }
    : { was: `${what} was planned`, the: `the ${due} planned` };
}

export function verdictSentence(
  reading: Pick<Reading, 'verdict' | 'change' | 'changeLo' | 'changeHi' | 'withControls'>,
  intention: { readonly byThen: number; readonly planned: number },
  speaker: Speaker,
): string {
  const { verdict, change, changeLo, changeHi, withControls } = reading;
  const { byThen, planned } = intention;
  const direction = Math.sign(byThen);
  const moved = `${speaker.name} ${verbFor(change)} by ${speaker.size(change)}${withControls ? ' against the untreated plots' : ''}`;
  const span = intervalInWords(changeLo, changeHi, direction, speaker);
  const start = `${moved} (${span})`;
  const words = intentionWords(byThen, planned, Math.sign(change) === direction, speaker);
  const mayBeNothing = changeLo <= 0 && changeHi >= 0;
  if (verdict === 'short of it') return `${start}, less than ${words.the}.${mayBeNothing ? ' It may be nothing.' : ''}`;
  if (verdict === 'beyond it') return `${start}, more than ${words.the}.`;
  if (verdict === 'right way, size not settled') {
    return `${moved}; ${words.was}. ${ENDS[verdict](withControls)} Anywhere from ${span} fits these samples.`;
  }
  return `${start}; ${words.was}. ${ENDS[verdict](withControls)}`;
}
