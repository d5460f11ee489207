import { Skeleton } from '@/lib/ui/feedback/skeleton';

export default function ReportLoading() {
  return (
    <div className="page-wrap grid gap-8 py-10 lg:grid-cols-2">
      <Skeleton label="Loading the report" shape="chart" />
      <Skeleton label="Loading its values" shape="table" rows={8} />
    </div>
  );
}
