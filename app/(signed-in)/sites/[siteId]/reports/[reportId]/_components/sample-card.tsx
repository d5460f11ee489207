'use client';

import type { Review, ReviewSample } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { ChoiceField } from './choice-field';
import { DepthFields } from './depth-fields';
import type { DepthUnit } from './depth-units';
import { DraftField } from './draft-field';
import { OtherForms } from './other-forms';
import { plotOptions } from './plot-options';
import { ReasonButton } from './reason-button';
import { onDay } from './report-words';
import { sampleLabel, twinOf } from './review-rows';
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
  { value: '2', label: 'Second bag' },
];

/** The heads of the columns stand above; below their width each field has its own label. */
const FIELD = 'content-start max-lg:text-sm lg:[&>label]:sr-only';

export const SAMPLE_ROW =
  'grid grid-cols-2 gap-x-4 gap-y-3 lg:grid-cols-[minmax(11rem,1.5fr)_minmax(10rem,1.4fr)_10rem_9rem_4.5rem_minmax(8rem,1fr)_6.5rem]';

/** One sample as the report prints it, and what it is to this site: plot, day, depth, bag. */
export function SampleCard(props: SampleCardProps) {
  const { path, sample, review, live, unit, today, separate, onSeparate } = props;
  const saves = useSampleSaves(path, sample, live);
  const name = sampleLabel(sample);
  const out = sample.leftOutReason !== null;
  const twin = twinOf(sample, review.samples);
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
            <ChoiceField
              id={sampleFieldId(sample.id, 'plot')}
              name={`plot-${sample.id}`}
              label="Plot"
              aria-label={`Plot of ${name}`}
              prompt="Choose a plot"
              className={`max-sm:col-span-2 ${FIELD}`}
              options={plotOptions(review.plots, review.report.droppedOnPlotId)}
              value={sample.plotId ?? ''}
              onSave={(id) => saves.save({ plotId: id || null })}
            />
            <DraftField
              id={sampleFieldId(sample.id, 'day')}
              name={`day-${sample.id}`}
              type="date"
              label="Taken on"
              aria-label={`Day ${name} was taken`}
              max={today}
              className={FIELD}
              value={sample.takenOn ?? ''}
              onSave={(text) => saves.save({ takenOn: text || null })}
            />
            <DepthFields sample={sample} name={name} unit={unit} saves={saves} />
            <DraftField
              name={`cores-${sample.id}`}
              label="Cores"
              aria-label={`Cores of ${name}`}
              inputMode="numeric"
              className={FIELD}
              value={sample.cores === null ? '' : String(sample.cores)}
              onSave={(text) => {
                if (text !== '' && !/^\d{1,3}$/.test(text)) return { refused: 'Write a number, like 12.' };
                return saves.save({ cores: text === '' ? null : Number(text) });
              }}
            />
            <ChoiceField
              name={`bag-${sample.id}`}
              label="Bag"
              aria-label={`Bag of ${name}`}
              className={FIELD}
              options={
                sample.composite > 2
                  ? [...BAGS, { value: String(sample.composite), label: `Bag ${sample.composite}` }]
                  : BAGS
              }
              value={String(sample.composite)}
              onSave={(bag) => saves.save({ composite: Number(bag) })}
            />
            <div className="self-start max-lg:self-end lg:pt-1">
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
      {twin && !out ? (
        <p className="text-sm text-ochre">
          {sampleLabel(twin)} has the same plot, day and bag: the two would count as two analyses of one bag. If {name}{' '}
          is from another bag, choose it under Bag.
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
    sample.sampledPrinted ? `sampled ${sample.sampledPrinted}` : null,
    sample.reportedOn ? `reported ${onDay(sample.reportedOn)}` : sample.reportedPrinted,
  ].filter((one) => one !== null);
  return (
    <div className="min-w-0 max-lg:col-span-2">
      <h3 className="text-base leading-tight break-words">
        {name}
        {sample.labNumber && sample.labNumber !== name ? (
          <span className="ml-2 inline-block font-text text-sm font-normal tracking-normal text-clay">
            no. {sample.labNumber}
          </span>
        ) : null}
      </h3>
      {facts.length > 0 ? (
        <p className="text-sm text-clay">
          {facts.map((fact, at) => (
            <span key={fact}>
              <span className="inline-block">
                {fact}
                {at < facts.length - 1 ? ',' : ''}
              </span>{' '}
            </span>
          ))}
        </p>
      ) : null}
    </div>
  );
}

function LeftOut({ sample, name, onTake }: { sample: ReviewSample; name: string; onTake: () => void }) {
  return (
    <div className="col-span-2 flex flex-wrap items-center gap-x-4 gap-y-1 lg:col-span-6">
      <p className="min-w-0 flex-1">
        <span className="font-semibold">Left out:</span> {sample.leftOutReason}
      </p>
      <Button look="quiet" size="small" className="min-h-(--target)!" onClick={onTake}>
        Take in again<span className="sr-only"> {name}</span>
      </Button>
    </div>
  );
}
