import type { Report } from '@/lib/schemas/reports';
import { apiPath } from '@/lib/ui/api';
import type { PageViewSource } from '@/lib/ui/page-view/types';

const SHEET = 'A sheet of this kind is kept as it came. Open the original in your own program and compare from there.';

const TEXTS = new Set(['text/plain', 'application/xml', 'application/json']);
const WORKBOOKS = new Set([
  'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  'application/vnd.ms-excel',
]);

type File = Pick<Report, 'origin' | 'contentType' | 'fileName'>;

/** How the pane beside the grid shows the file. */
export function sourceOf(path: string, report: File): PageViewSource {
  if (report.origin === 'typed' || report.contentType === null) return { kind: 'none' };
  const url = apiPath(`${path}/file?as=inline`);
  const type = report.contentType.split(';')[0]?.trim() ?? '';
  if (type === 'application/pdf') return { kind: 'pdf', url };
  if (type === 'image/png' || type === 'image/jpeg') return { kind: 'image', url };
  if (type === 'text/csv') return { kind: 'csv', url };
  if (TEXTS.has(type)) return { kind: 'text', url };
  if (WORKBOOKS.has(type)) return { kind: 'cells', url: apiPath(`${path}/file?as=cells`) };
  return { kind: 'unsupported', sentence: SHEET };
}

export const originalHref = (path: string, report: File): { originalHref?: string } =>
  report.contentType === null ? {} : { originalHref: apiPath(`${path}/file`) };
