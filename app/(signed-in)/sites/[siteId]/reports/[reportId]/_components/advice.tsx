import type { Review } from '@/lib/schemas/review';
import { sampleLabel } from './review-rows';

/** What the laboratory advises: kept apart, never among the results. */
export function Advice({ review }: { review: Review }) {
  if (review.recommendations.length === 0) return null;
  const groups = [
    ...review.samples.map((sample) => ({ id: sample.id as string | null, name: sampleLabel(sample) })),
    { id: null, name: 'For all samples' },
  ].flatMap((group) => {
    const items = review.recommendations.filter((one) => one.reportSampleId === group.id);
    return items.length > 0 ? [{ ...group, items }] : [];
  });
  return (
    <section className="border-t border-horizon-5 bg-silt py-5">
      <div className="page-wrap max-w-[110rem]!">
        <h2 className="text-xl">The laboratory advises</h2>
        <p className="mb-3 max-w-measure text-sm text-clay">
          Kept with the report as the laboratory's own words. None of this is a result, and none of it is confirmed.
        </p>
        <div className="grid gap-x-10 gap-y-4 md:grid-cols-2 xl:grid-cols-3">
          {groups.map((group) => (
            <div key={group.id ?? 'all'}>
              <h3 className="text-base">{group.name}</h3>
              <ul className="mt-1 border-t border-horizon-5">
                {group.items.map((one) => (
                  <li key={one.id} className="flex flex-wrap justify-between gap-x-4 border-b border-horizon-5 py-1.5">
                    <span className="min-w-0">{one.printed || one.item}</span>
                    {one.page === null ? null : <span className="text-sm text-clay">page {one.page}</span>}
                  </li>
                ))}
              </ul>
            </div>
          ))}
        </div>
      </div>
    </section>
  );
}
