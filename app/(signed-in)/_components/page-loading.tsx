import { Skeleton } from '@/lib/ui/feedback/skeleton';

/** Stands while a page of a site is fetched; always below the check whether there is anything, so that nothing answers 404. */
export function PageLoading() {
  return (
    <div className="page-wrap py-10">
      <Skeleton label="Loading the page" rows={5} />
    </div>
  );
}
