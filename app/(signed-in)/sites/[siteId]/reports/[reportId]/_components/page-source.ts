import type { Report } from '@/lib/schemas/reports';
import { apiPath } from '@/lib/ui/api';
import type { PageViewSource } from '@/lib/ui/page-view/types';

const SHEET = 'A sheet of this kind is kept as it came. Open the original in your own program and compare from there.';

type File = Pick<Report, 'origin' | 'contentType' | 'fileName'>;

/** How the pane beside the grid shows the file. */
export function sourceOf(path: string, report: File): PageViewSource {
  if (report.origin === 'typed' || report.contentType === null) return { kind: 'none' };
  const url = apiPath(`${path}/file?as=inline`);
  const type = report.contentType.split(';')[0]?.trim() ?? '';
  if (type === 'application/pdf') return { kind: 'pdf', url };
  if (type === 'image/png' || type === 'image/jpeg') return { kind: 'image', url };
  if (type.startsWith('text/')) return { kind: 'csv', url };
  return { kind: 'unsupported', sentence: SHEET };
}

export const originalHref = (path: string, report: File): { originalHref?: string } =>
  report.contentType === null ? {} : { originalHref: apiPath(`${path}/file`) };
