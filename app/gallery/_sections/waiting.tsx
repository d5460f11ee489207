import { Button } from '@/lib/ui/actions/button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';
import { Skeleton } from '@/lib/ui/feedback/skeleton';

export function WaitingSection() {
  return (
    <div className="grid gap-8">
      <div className="grid gap-6 lg:grid-cols-3">
        <ProgressBar label="Sending spring-2026.pdf" percent={35} valueText="1.2 of 3.4 MB" />
        <ProgressBar label="Reading" percent={67} valueText="page 4 of 6" />
        <ProgressBar label="Waiting for its turn" valueText="2 before it" />
      </div>
      <div className="grid gap-8 lg:grid-cols-3">
        <Skeleton label="Loading the text" />
        <Skeleton label="Loading the table" shape="table" rows={3} />
        <Skeleton label="Loading the chart" shape="chart" />
      </div>
      <div className="grid gap-x-10 lg:grid-cols-2">
        <EmptyState shape="plan" title="No plots yet" action={<Button>Draw the first plot</Button>}>
          Each plot will stand here to scale, with its last pH in it.
        </EmptyState>
        <EmptyState shape="chart" title="One test so far">
          With a second one this becomes a line, and what you spread stands on it.
        </EmptyState>
        <EmptyState shape="table" title="No results">
          Confirmed values will stand here, one row an analyte, one column a year.
        </EmptyState>
        <EmptyState shape="list" title="Nothing is due">
          Samples to take and reports to wait for will be listed here by day.
        </EmptyState>
        <EmptyState shape="page" title="No reports">
          A report you drop on a plot is read here, and you check it against its page.
        </EmptyState>
      </div>
    </div>
  );
}
