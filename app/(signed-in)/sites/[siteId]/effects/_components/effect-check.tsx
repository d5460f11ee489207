import type { EffectCheckAnswer } from '@/lib/schemas/effects';
import { Dumbbell } from '@/lib/ui/charts/dumbbell';
import { IntervalStrip } from '@/lib/ui/charts/interval-strip';
import type { TargetBand } from '@/lib/ui/charts/types';
import { Layer, Layers } from '@/lib/ui/frame/layers';
import { RefusalBox } from '@/lib/ui/verdict/refusal-box';
import { VerdictLine } from '@/lib/ui/verdict/verdict-line';
import {
  checkAnalyte,
  checkLabel,
  dumbbellProps,
  type Judged,
  meantWords,
  notesOf,
  type Ranges,
  refusalBoxProps,
  secondReading,
  spreadWords,
  stripProps,
  verdictProps,
} from './effect-props';
import { Earlier, Why } from './why';

type EffectCheckProps = { check: EffectCheckAnswer; ranges: Ranges; target: TargetBand | null };

/** One question, answered from the top down: the verdict, the drawing, why. */
export function EffectCheck({ check, ranges, target }: EffectCheckProps) {
  const { outcome } = check;
  return (
    <article aria-label={`${checkLabel(check)} after ${spreadWords(check)}`}>
      <Layers>
        <Layer depth="verdict">
          <div className="grid gap-4">
            <div>
              <h2 className="text-lg">
                {checkLabel(check)} after {spreadWords(check)}
              </h2>
              <p className="text-sm text-clay">{meantWords(check)}</p>
            </div>
            {outcome.ok ? (
              <Verdict outcome={outcome} />
            ) : (
              <>
                <RefusalBox {...refusalBoxProps(outcome, check.decimals)} />
                <Earlier check={check} />
              </>
            )}
          </div>
        </Layer>
        {outcome.ok ? (
          <>
            <Layer depth="chart">
              <Drawn outcome={outcome} check={check} ranges={ranges} target={target} />
            </Layer>
            <Layer depth="numbers" title="Why" folded>
              <Why check={check} outcome={outcome} analyte={checkAnalyte(check, outcome.unit)} />
            </Layer>
          </>
        ) : null}
      </Layers>
    </article>
  );
}

function Verdict({ outcome }: { outcome: Judged }) {
  const second = secondReading(outcome);
  const more = outcome.settle.slice(1);
  return (
    <>
      <VerdictLine {...verdictProps(outcome)} />
      {more.length > 0 ? (
        <div className="max-w-measure">
          <p className="font-semibold">Or, with more work:</p>
          <ul className="list-disc pl-5">
            {more.map((remedy) => (
              <li key={remedy.text}>{remedy.text}</li>
            ))}
          </ul>
        </div>
      ) : null}
      {notesOf(outcome).map((note) => (
        <p key={note} className="max-w-measure">
          {note}
        </p>
      ))}
      {second === null ? null : (
        <div className="grid max-w-measure gap-2 border-t border-horizon-5 pt-3">
          <p className="text-sm text-clay">{second.lead}</p>
          <VerdictLine {...second.line} />
        </div>
      )}
    </>
  );
}

type DrawnProps = EffectCheckProps & { outcome: Judged };

function Drawn({ outcome, check, ranges, target }: DrawnProps) {
  const analyte = checkAnalyte(check, outcome.unit);
  const dumbbell = dumbbellProps(outcome, analyte, ranges, target);
  const second = secondReading(outcome);
  return (
    <div className="grid gap-7 print:block print:space-y-6">
      <div className={second === null ? 'max-w-3xl' : 'grid gap-7 lg:grid-cols-2 print:block print:space-y-6'}>
        <div className="grid break-inside-avoid content-start gap-2">
          <h3 className="text-base">
            {outcome.reading.withControls ? 'The change, compared with the untreated plots' : 'The change'}
          </h3>
          <IntervalStrip {...stripProps(outcome, analyte)} />
        </div>
        {second === null ? null : (
          <div className="grid break-inside-avoid content-start gap-2">
            <h3 className="text-base">The same without the untreated plots</h3>
            <IntervalStrip {...stripProps(outcome, analyte, second.reading)} />
          </div>
        )}
      </div>
      {dumbbell === null ? null : (
        <div className="grid max-w-3xl break-inside-avoid gap-2">
          <h3 className="text-base">The two tests themselves</h3>
          <Dumbbell {...dumbbell} />
        </div>
      )}
    </div>
  );
}
