'use client';

import type { Review, ReviewSample } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { DepthFields } from './depth-fields';
import type { DepthUnit } from './depth-units';
import { DraftField } from './draft-field';
import { OtherForms } from './other-forms';
import { plotOptions } from './plot-options';
import { ReasonButton } from './reason-button';
import { onDay } from './report-words';
import { sampleLabel } from './review-rows';
import type { LiveReport } from './use-report';
import { useSampleSaves } from './use-sample-saves';

export const sampleFieldId = (sampleId: string, field: 'plot' | 'day' | 'card') => `sample-${sampleId}-${field}`;

export type SampleCardProps = {
  path: string;
  sample: ReviewSample;
  review: Review;
  live: LiveReport;
  unit: DepthUnit;
  today: string;
  separate: boolean;
  onSeparate: (on: boolean) => void;
};

const BAGS = [
  { value: '1', label: 'First bag' },
  { value: '2', label: 'Second bag of the plot' },
];

export const SAMPLE_ROW =
  'grid gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-[minmax(9rem,1.3fr)_minmax(10rem,1.5fr)_10rem_9.5rem_5rem_minmax(8rem,1fr)_6.5rem]';

/** One sample as the report prints it, and what it is to this site: plot, day, depth, bag. */
export function SampleCard(props: SampleCardProps) {
  const { path, sample, review, live, unit, today, separate, onSeparate } = props;
  const saves = useSampleSaves(path, sample, live);
  const name = sampleLabel(sample);
  const out = sample.leftOutReason !== null;
  return (
    <li
      id={sampleFieldId(sample.id, 'card')}
      tabIndex={-1}
      className="grid gap-3 border-b border-horizon-5 py-3 last:border-0"
      aria-busy={saves.busy || undefined}
    >
      <div className={SAMPLE_ROW}>
        <SampleIdentity sample={sample} />
        {out ? (
          <LeftOut sample={sample} name={name} onTake={() => void saves.save({ leftOutReason: null })} />
        ) : (
          <>
            <SelectField
              id={sampleFieldId(sample.id, 'plot')}
              name={`plot-${sample.id}`}
              label="Plot"
              aria-label={`Plot of ${name}`}
              prompt="Choose a plot"
              className="max-lg:text-sm lg:[&>label]:sr-only"
              options={plotOptions(review.plots, review.report.droppedOnPlotId)}
              value={sample.plotId ?? ''}
              onChange={(event) => void saves.save({ plotId: event.currentTarget.value || null })}
            />
            <DraftField
              id={sampleFieldId(sample.id, 'day')}
              name={`day-${sample.id}`}
              type="date"
              label="Taken on"
              aria-label={`Day ${name} was taken`}
              max={today}
              className="max-lg:text-sm lg:[&>label]:sr-only"
              value={sample.takenOn ?? ''}
              onSave={(text) => saves.save({ takenOn: text || null })}
            />
            <DepthFields sample={sample} name={name} unit={unit} saves={saves} />
            <DraftField
              name={`cores-${sample.id}`}
              label="Cores"
              aria-label={`Cores of ${name}`}
              inputMode="numeric"
              className="max-lg:text-sm lg:[&>label]:sr-only"
              value={sample.cores === null ? '' : String(sample.cores)}
              onSave={(text) => {
                if (text !== '' && !/^\d{1,3}$/.test(text)) return { refused: 'Write a number, like 12.' };
                return saves.save({ cores: text === '' ? null : Number(text) });
              }}
            />
            <SelectField
              name={`bag-${sample.id}`}
              label="Bag"
              aria-label={`Bag of ${name}`}
              className="max-lg:text-sm lg:[&>label]:sr-only"
              options={
                sample.composite > 2
                  ? [...BAGS, { value: String(sample.composite), label: `Bag ${sample.composite}` }]
                  : BAGS
              }
              value={String(sample.composite)}
              onChange={(event) => void saves.save({ composite: Number(event.currentTarget.value) })}
            />
            <div className="content-center">
              <ReasonButton
                label="Leave out"
                about={name}
                title={`Leave ${name} out?`}
                sentence="None of its values count. They stay with the report, and it can be taken in again."
                reasonLabel="Why"
                hint="For instance: not our ground, or a bag that was mixed up."
                sendLabel="Leave it out"
                onSend={(reason) => saves.save({ leftOutReason: reason })}
              />
            </div>
          </>
        )}
      </div>
      {!out && sample.composite > 1 ? (
        <p className="text-sm text-clay">
          A second bag of the same plot and day shows how far two samples of one plot differ: a field duplicate.
        </p>
      ) : null}
      {saves.problem?.reason === 'stale-version' ? (
        <Notice tone="look" title="Somebody else changed this sample" live>
          What they saved is shown now. Set your own again where it differs.
        </Notice>
      ) : saves.problem && !saves.problem.fields ? (
        <ProblemNotice problem={saves.problem} />
      ) : null}
      {out ? null : (
        <OtherForms sample={sample} name={name} saves={saves} separate={separate} onSeparate={onSeparate} />
      )}
    </li>
  );
}

/** Who the page says it is. */
export function SampleIdentity({ sample }: { sample: ReviewSample }) {
  const name = sampleLabel(sample);
  const facts = [
    sample.printedName && sample.printedName !== name ? `sample ${sample.printedName}` : null,
    sample.labNumber && sample.labNumber !== name ? `no. ${sample.labNumber}` : null,
    sample.sampledPrinted ? `sampled ${sample.sampledPrinted}` : null,
    sample.reportedOn ? `reported ${onDay(sample.reportedOn)}` : sample.reportedPrinted,
  ].filter((one) => one !== null);
  return (
    <div className="min-w-0 sm:max-lg:col-span-2">
      <h3 className="text-base leading-tight break-words">{name}</h3>
      {facts.length > 0 ? <p className="text-sm text-clay">{facts.join(', ')}</p> : null}
    </div>
  );
}

function LeftOut({ sample, name, onTake }: { sample: ReviewSample; name: string; onTake: () => void }) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1 lg:col-span-6">
      <p className="min-w-0 flex-1">
        <span className="font-semibold">Left out:</span> {sample.leftOutReason}
      </p>
      <Button look="quiet" size="small" onClick={onTake}>
        Take in again<span className="sr-only"> {name}</span>
      </Button>
    </div>
  );
}
