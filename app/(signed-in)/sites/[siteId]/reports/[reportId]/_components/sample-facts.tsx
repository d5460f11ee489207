import type { Review, ReviewSample } from '@/lib/schemas/review';
import { type DepthUnit, shownDepth } from './depth-units';
import { counted, onDay } from './report-words';
import { SampleIdentity } from './sample-card';

/** A sample that does not change any more, in words. */
export function SampleFacts({ sample, review, unit }: { sample: ReviewSample; review: Review; unit: DepthUnit }) {
  const plot = review.plots.find((one) => one.id === sample.plotId);
  const from = shownDepth(sample.depthFromCm, unit);
  const to = shownDepth(sample.depthToCm, unit);
  const facts = [
    plot?.name ?? (sample.plotId === null ? 'no plot' : 'a plot that is archived'),
    sample.takenOn === null ? 'no day' : onDay(sample.takenOn),
    from || to ? `${from || '0'}–${to || '?'} ${unit}` : null,
    sample.cores === null ? null : counted(sample.cores, 'core'),
    sample.composite > 1 ? `bag ${sample.composite} of the plot` : null,
  ].filter((one) => one !== null);
  return (
    <li className="grid gap-x-4 gap-y-1 border-b border-horizon-5 py-3 last:border-0 lg:grid-cols-[minmax(9rem,1fr)_3fr]">
      <SampleIdentity sample={sample} />
      <p>
        {sample.leftOutReason === null ? facts.join(', ') : `Left out: ${sample.leftOutReason}`}
        {sample.sameAs ? (
          <span className="block text-sm text-clay">
            The same analysis as in {sample.sameAs.fileName ?? 'another report'}; it counts once, through that one.
          </span>
        ) : null}
      </p>
    </li>
  );
}
