import type { ReactNode } from 'react';
import { openReport, type ReportParams } from './_server/open-report';

/** Above loading.tsx: a report that is not there answers 404 before anything is drawn. */
export default async function ReportLayout({ children, params }: ReportParams & { children: ReactNode }) {
  const { siteId, reportId } = await params;
  await openReport(siteId, reportId);
  return children;
}
