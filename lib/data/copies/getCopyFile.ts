import { Problem } from '@/lib/errors';
import { copyInput } from '@/lib/schemas/copies';
import { getFile } from '@/lib/services/storage/storage';
import type { ReportFile } from '../reports/getReportFile';
import { siteWorkVerb } from '../workVerb';
import { type CopyRow, getCopyInReport } from './copyStore';

const notThere = () =>
  new Problem('conflict', 'This copy is not there: it is still being made, or was thrown away.', { reason: 'no-copy' });

const partOf = (part: (row: CopyRow) => { key: string | null; sha256: string | null } & Omit<ReportFile, 'bytes'>) =>
  siteWorkVerb({
    act: 'reading.work',
    input: copyInput,
    run: async ({ siteId, input, inSite }): Promise<ReportFile> => {
      const row = await inSite(({ tx }) => getCopyInReport(tx, siteId, input.reportId, input.copyId));
      const { key, sha256, ...file } = part(row);
      if (row.state !== 'ready' || !key?.startsWith(`site/${siteId}/`) || sha256 === null) throw notThere();
      return { ...file, bytes: await getFile(key, sha256) };
    },
  });

/** The blacked-out page as a picture, to be looked at before anything is taken away. */
export const getCopyPicture = partOf((row) => ({
  key: row.pictureKey,
  sha256: row.pictureSha256,
  contentType: 'image/png',
  fileName: `page-${row.page}-without-names.png`,
  as: 'inline',
}));

/** The same picture with what the reader saw, in one archive. */
export const getCopyBundle = partOf((row) => ({
  key: row.bundleKey,
  sha256: row.bundleSha256,
  contentType: 'application/zip',
  fileName: `read-wrong-page-${row.page}.zip`,
  as: 'attachment',
}));
