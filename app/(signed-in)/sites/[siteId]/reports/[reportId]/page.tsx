import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { dayOf } from '@/lib/data/days';
import { listPlots } from '@/lib/data/plots/listPlots';
import { getReport } from '@/lib/data/reports/getReport';
import { listResults } from '@/lib/data/results/listResults';
import { getReview } from '@/lib/data/review/getReview';
import { getSite } from '@/lib/data/sites/getSite';
import { idSchema } from '@/lib/schemas/parts';
import { ReadResults } from './_components/read-results';
import { ReportScreen } from './_components/report-screen';
import { hasReview, reportTitle } from './_components/report-words';

type PageProps = { params: Promise<{ siteId: string; reportId: string }> };

async function openReport({ params }: PageProps) {
  const { siteId, reportId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reports/${reportId}`);
  if (!idSchema.safeParse(reportId).success) notFound();
  const [site, report] = await Promise.all([
    orNotFound(getSite({ ctx, input: { siteId } })),
    orNotFound(getReport({ ctx, input: { siteId, reportId } })),
  ]);
  return { ctx, person, site, report, siteId, reportId };
}

export async function generateMetadata(props: PageProps) {
  const { report } = await openReport(props);
  return { title: reportTitle(report) };
}

export default async function ReportPage(props: PageProps) {
  const { ctx, person, site, report, siteId, reportId } = await openReport(props);
  if (!can(site.role, 'reading.work')) {
    const { results } =
      report.state === 'confirmed' ? await orNotFound(listResults({ ctx, input: { siteId } })) : { results: [] };
    const mine = results.filter((one) => one.reportId === reportId);
    const { plots } = await orNotFound(listPlots({ ctx, input: { siteId } }));
    const plotNames = new Map(plots.map((plot) => [plot.id, plot.name]));
    return <ReadResults siteId={siteId} report={report} results={mine} plotNames={plotNames} />;
  }
  const review = hasReview(report.state) ? await orNotFound(getReview({ ctx, input: { siteId, reportId } })) : null;
  return (
    <ReportScreen
      siteId={siteId}
      role={site.role}
      personId={person.id}
      units={person.units}
      today={dayOf(ctx.now, person.timeZone)}
      firstReport={report}
      firstReview={review}
    />
  );
}
