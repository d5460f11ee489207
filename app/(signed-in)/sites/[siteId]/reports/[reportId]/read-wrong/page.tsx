import { notFound } from 'next/navigation';
import { can } from '@/lib/access/table';
import { openReport, type ReportParams } from '../_server/open-report';
import { ReadWrong } from './_components/read-wrong';

export const metadata = { title: 'This was read wrong' };

const HAS_PAGES = new Set(['application/pdf', 'image/png', 'image/jpeg']);

type PageProps = ReportParams & { searchParams: Promise<Record<string, string | string[] | undefined>> };

export default async function ReadWrongPage({ params, searchParams }: PageProps) {
  const { siteId, reportId } = await params;
  const { site, report } = await openReport(siteId, reportId);
  if (!can(site.role, 'reading.work')) notFound();
  const { page } = await searchParams;
  const pages = Math.max(1, report.pages ?? 1);
  const asked = Number(typeof page === 'string' ? page : '1');
  return (
    <ReadWrong
      siteId={siteId}
      reportId={reportId}
      name={report.fileName ?? 'Report typed in by hand'}
      pages={pages}
      first={Number.isInteger(asked) && asked >= 1 && asked <= pages ? asked : 1}
      hasPages={HAS_PAGES.has(report.contentType ?? '')}
    />
  );
}
