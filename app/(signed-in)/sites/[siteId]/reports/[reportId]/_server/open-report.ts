import { notFound } from 'next/navigation';
import { cache } from 'react';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { getReport } from '@/lib/data/reports/getReport';
import { getSite } from '@/lib/data/sites/getSite';
import { idSchema } from '@/lib/schemas/parts';

/** The report of an address with its site, read once for the layout and the page under it. */
export const openReport = cache(async (siteId: string, reportId: string) => {
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reports/${reportId}`);
  if (!idSchema.safeParse(reportId).success) notFound();
  const [site, report] = await Promise.all([
    orNotFound(getSite({ ctx, input: { siteId } })),
    orNotFound(getReport({ ctx, input: { siteId, reportId } })),
  ]);
  return { ctx, person, site, report };
});

export type ReportParams = { params: Promise<{ siteId: string; reportId: string }> };
