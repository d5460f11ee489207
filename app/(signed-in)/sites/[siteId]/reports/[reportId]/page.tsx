import { orNotFound } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getBatchPlace } from '@/lib/data/batches/getBatchPlace';
import { dayOf } from '@/lib/data/days';
import { listPlots } from '@/lib/data/plots/listPlots';
import { listResults } from '@/lib/data/results/listResults';
import { getReview } from '@/lib/data/review/getReview';
import { ReadResults } from './_components/read-results';
import { ReportScreen } from './_components/report-screen';
import { hasReview, reportTitle } from './_components/report-words';
import { openReport, type ReportParams } from './_server/open-report';

export async function generateMetadata({ params }: ReportParams) {
  const { siteId, reportId } = await params;
  const { report } = await openReport(siteId, reportId);
  return { title: reportTitle(report) };
}

export default async function ReportPage({ params }: ReportParams) {
  const { siteId, reportId } = await params;
  const { ctx, person, site, report } = await openReport(siteId, reportId);
  if (!can(site.role, 'reading.work')) {
    const { results } =
      report.state === 'confirmed' ? await orNotFound(listResults({ ctx, input: { siteId } })) : { results: [] };
    const mine = results.filter((one) => one.reportId === reportId);
    const { plots } = await orNotFound(listPlots({ ctx, input: { siteId } }));
    const plotNames = new Map(plots.map((plot) => [plot.id, plot.name]));
    return <ReadResults siteId={siteId} report={report} results={mine} plotNames={plotNames} />;
  }
  const review = hasReview(report.state) ? await orNotFound(getReview({ ctx, input: { siteId, reportId } })) : null;
  const place = await orNotFound(getBatchPlace({ ctx, input: { siteId, reportId } }));
  return (
    <ReportScreen
      siteId={siteId}
      role={site.role}
      personId={person.id}
      units={person.units}
      today={dayOf(ctx.now, person.timeZone)}
      firstReport={report}
      firstReview={review}
      place={place}
    />
  );
}
