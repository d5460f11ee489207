import { notFound } from '@/lib/errors';
import { reportFileInput } from '@/lib/schemas/reports';
import { cellsKey, getFile, getMade } from '@/lib/services/storage/storage';
import { siteWorkVerb } from '../workVerb';
import { getReportInSite } from './getReportInSite';

export type ReportFile = { bytes: Uint8Array; contentType: string; fileName: string; as: 'attachment' | 'inline' };

const SHOWN_INLINE = new Set(['application/pdf', 'image/png', 'image/jpeg']);

/** The original as it came, checked against the hash taken then. */
export const getReportFile = siteWorkVerb({
  act: 'report.open-file',
  input: reportFileInput,
  run: async ({ siteId, input, inSite }): Promise<ReportFile> => {
    const row = await inSite(({ tx }) => getReportInSite(tx, siteId, input.reportId));
    const { fileKey, sha256, contentType } = row;
    // The key is the store's own address: it must lie under this site, whatever the row says.
    if (!fileKey?.startsWith(`site/${siteId}/`) || sha256 === null || contentType === null) throw notFound();
    if (input.as === 'cells') {
      const cells = await getMade(cellsKey(fileKey));
      if (cells === null) throw notFound();
      return {
        bytes: cells,
        contentType: 'application/json',
        fileName: `${row.fileName ?? 'report'}.json`,
        as: 'inline',
      };
    }
    const as = input.as === 'inline' && SHOWN_INLINE.has(contentType) ? 'inline' : 'attachment';
    return { bytes: await getFile(fileKey, sha256), contentType, fileName: row.fileName ?? 'report', as };
  },
});
