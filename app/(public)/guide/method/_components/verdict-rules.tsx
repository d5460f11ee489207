import { VERDICTS, type Verdict } from '@/lib/domain/effects';
import { VerdictGlyph } from '@/lib/ui/verdict/glyph';

const RULES: Record<Verdict, string> = {
  'as intended':
    'The whole interval lies between half and one and a half times the planned change, and the best estimate between two thirds and four thirds of it.',
  'short of it': 'The interval ends before the planned change is reached.',
  'beyond it': 'The interval begins past the planned change.',
  'no change seen': 'The interval holds no change at all, and ends before half of the planned change.',
  'went the other way': 'The whole interval lies on the other side of no change.',
  'right way, size not settled': 'A change in the right direction is sure; whether it is enough or too much is not.',
  'cannot tell yet': 'The interval holds both no change and at least half of the planned one.',
};

export function VerdictRules() {
  return (
    <dl className="border-y border-horizon-5">
      {VERDICTS.map((verdict) => (
        <div
          key={verdict}
          className="grid gap-x-5 gap-y-1 border-b border-horizon-5 py-3 last:border-0 md:grid-cols-[18rem_1fr] md:items-center"
        >
          <dt className="flex items-center gap-5 font-display text-lg leading-tight font-semibold">
            <VerdictGlyph verdict={verdict} />
            {verdict}
          </dt>
          <dd className="max-w-measure max-md:pl-17">{RULES[verdict]}</dd>
        </div>
      ))}
    </dl>
  );
}
