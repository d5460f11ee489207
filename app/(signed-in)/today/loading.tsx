import { Skeleton } from '@/lib/ui/feedback/skeleton';

export default function TodayLoading() {
  return (
    <div className="page-wrap py-10">
      <Skeleton label="Loading what is due" rows={6} />
    </div>
  );
}
