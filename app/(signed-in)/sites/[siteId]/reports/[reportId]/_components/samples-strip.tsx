'use client';

import Link from 'next/link';
import type { Report } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';
import type { DepthUnit } from './depth-units';
import { LaboratoryField } from './laboratory-field';
import { SAMPLE_ROW, SampleCard } from './sample-card';
import { SampleFacts } from './sample-facts';
import type { LiveReport } from './use-report';

type StripProps = {
  path: string;
  review: Review;
  report: Report;
  live: LiveReport;
  readOnly: boolean;
  unit: DepthUnit;
  today: string;
  separate: ReadonlySet<string>;
  onSeparate: (sampleId: string, on: boolean) => void;
};

const MOST_IN_SIGHT = 8;

/** Each sample of the report: which plot, which day, how deep. */
export function SamplesStrip(props: StripProps) {
  const { path, review, report, live, readOnly, unit, today, separate, onSeparate } = props;
  const { send, busy, problem } = useSubmit();
  // Many samples scroll in a frame of their own, so that the values stay within reach.
  const long = review.samples.length > MOST_IN_SIGHT;
  const siteId = path.split('/')[2] ?? '';
  const add = async () => {
    if ((await send(`${path}/samples`, { body: {} })).ok) await live.refresh();
  };
  return (
    <section aria-labelledby="samples-title" className="border-t border-horizon-5 py-4">
      <div className="page-wrap max-w-[110rem]!">
        <LaboratoryField {...{ path, review, live, readOnly, report }} />
        <div className="mt-3 flex flex-wrap items-center justify-between gap-x-6 gap-y-1">
          <h2 id="samples-title" className="text-xl">
            {review.samples.length === 1 ? 'The sample' : `${review.samples.length} samples`}
          </h2>
          {readOnly ? null : (
            <Button look="quiet" size="small" className="min-h-(--target)!" busy={busy} onClick={() => void add()}>
              Add a sample
            </Button>
          )}
        </div>
        <ProblemNotice problem={problem} />
        {review.plots.length === 0 && !readOnly ? (
          <p className="mt-2">
            There is no plot on this site yet.{' '}
            <Link className="text-link inline-block py-1 font-semibold" href={`/sites/${siteId}`}>
              Draw one on the ground
            </Link>
            ; this review waits.
          </p>
        ) : null}
        {readOnly ? null : (
          <div aria-hidden="true" className={`${SAMPLE_ROW} mt-2 text-xs font-semibold text-clay max-lg:hidden`}>
            <span>{report.origin === 'typed' ? 'Sample' : 'As printed'}</span>
            <span>Plot</span>
            <span>Taken on</span>
            <span>Depth, {unit}</span>
            <span>Cores</span>
            <span>Bag</span>
          </div>
        )}
        <ul
          {...(long ? { tabIndex: 0, 'aria-labelledby': 'samples-title' } : {})}
          className={long ? 'max-h-[60vh] overflow-y-auto border-y border-fallow px-2' : undefined}
        >
          {review.samples.map((sample) =>
            readOnly ? (
              <SampleFacts key={sample.id} sample={sample} review={review} unit={unit} />
            ) : (
              <SampleCard
                key={sample.id}
                {...{ path, sample, review, live, unit, today }}
                separate={separate.has(sample.id)}
                onSeparate={(on) => onSeparate(sample.id, on)}
              />
            ),
          )}
        </ul>
      </div>
    </section>
  );
}
