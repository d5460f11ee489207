import { Skeleton } from '@/lib/ui/feedback/skeleton';

export default function SiteLoading() {
  return (
    <div className="page-wrap py-10">
      <Skeleton label="Loading the page" rows={5} />
    </div>
  );
}
