import { Skeleton } from '@/lib/ui/feedback/skeleton';

export default function PlotLoading() {
  return (
    <div className="page-wrap grid gap-6 py-8">
      <Skeleton label="Loading the plot" rows={2} />
      <Skeleton label="Loading the numbers" shape="chart" />
    </div>
  );
}
