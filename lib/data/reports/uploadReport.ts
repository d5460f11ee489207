import { and, desc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { report } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import { log } from '@/lib/log';
import { type UploadAnswer, uploadInput } from '@/lib/schemas/reports';
import { deleteFile, putFile, sha256 } from '@/lib/services/storage/storage';
import { getBatchFileInSite, noteArrival } from '../batches/batchFiles';
import { getLivePlotInSite } from '../plots/getLivePlotInSite';
import { enqueue, isUniqueViolation } from '../transaction';
import { siteWorkVerb } from '../workVerb';
import { cleanFileName, endingOf } from './cleanFileName';
import { sniffUpload } from './sniffUpload';

type Seen = Pick<typeof report.$inferSelect, 'id' | 'fileName' | 'uploadedAt' | 'state' | 'revision'>;

async function newestOf(tx: Transaction, siteId: SiteId, hash: string): Promise<Seen | undefined> {
  const rows = await tx
    .select({
      id: report.id,
      fileName: report.fileName,
      uploadedAt: report.uploadedAt,
      state: report.state,
      revision: report.revision,
    })
    .from(report)
    .where(and(eq(report.siteId, siteId), eq(report.sha256, hash)))
    .orderBy(desc(report.revision))
    .limit(1);
  return rows[0];
}

const seenBefore = (seen: Seen): UploadAnswer => ({
  kind: 'seen-before',
  reportId: seen.id,
  fileName: seen.fileName,
  uploadedAt: seen.uploadedAt.toISOString(),
  state: seen.state,
});

/** Version-4 shape from the injected chance. */
function uuidFrom(random: (bytes: number) => Uint8Array): string {
  const hex = Buffer.from(random(16)).toString('hex');
  const variant = ((Number.parseInt(hex.charAt(16), 16) & 0x3) | 0x8).toString(16);
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-4${hex.slice(13, 16)}-${variant}${hex.slice(17, 20)}-${hex.slice(20)}`;
}

/** The file goes to the store first, then row, job and audit in one transaction; the unique key on its hash decides a race. */
export const uploadReport = siteWorkVerb({
  act: 'reading.work',
  input: uploadInput,
  run: async ({ ctx, siteId, person, input, inSite }): Promise<UploadAnswer> => {
    const { bytes, plotId, batchFileId } = input;
    const asRevision = input.asRevision === 'true';
    const fileName = cleanFileName(input.fileName);
    const { contentType } = sniffUpload(bytes, fileName);
    const hash = sha256(bytes);
    const meets = async (tx: Transaction) => {
      const found = await newestOf(tx, siteId, hash);
      if (found && batchFileId && !asRevision)
        await noteArrival(tx, ctx, siteId, batchFileId, { reportId: found.id, state: 'seen-before' });
      return found;
    };
    const seen = await inSite(async ({ tx }) => {
      if (plotId) await getLivePlotInSite(tx, siteId, plotId);
      if (batchFileId) await getBatchFileInSite(tx, siteId, batchFileId);
      return meets(tx);
    });
    if (seen && !asRevision) return seenBefore(seen);

    const key = `site/${siteId}/${uuidFrom(ctx.random)}.${endingOf(fileName)}`;
    await putFile(key, bytes, contentType);
    const record = () =>
      inSite(async ({ tx, audit }): Promise<UploadAnswer> => {
        const revision = asRevision ? ((await newestOf(tx, siteId, hash))?.revision ?? 0) + 1 : 1;
        const [row] = await tx
          .insert(report)
          .values({
            siteId,
            origin: input.ownSheet === 'true' ? 'own-sheet' : 'file',
            state: 'received',
            fileKey: key,
            sha256: hash,
            fileName,
            contentType,
            bytes: bytes.byteLength,
            revision,
            droppedOnPlotId: plotId ?? null,
            uploadedBy: person.id,
            uploadedAt: ctx.now,
          })
          .returning({ id: report.id });
        if (!row) throw new Error('The report was not written.');
        await audit({
          act: 'report.upload',
          objectKind: 'report',
          objectId: row.id,
          detail: { sha256: hash, bytes: bytes.byteLength, revision },
        });
        if (batchFileId) await noteArrival(tx, ctx, siteId, batchFileId, { reportId: row.id, state: 'kept' });
        await enqueue(tx, 'read-report', { siteId, id: row.id });
        return { kind: 'received', reportId: row.id, fileName, bytes: bytes.byteLength };
      });
    try {
      return await record();
    } catch (error) {
      // After any other error the row may exist after all; a file without a row does no harm, a row without its file does.
      if (!isUniqueViolation(error)) throw error;
      await deleteFile(key).catch((err: unknown) =>
        log().warn({ err, key }, 'a file without a row stays in the store'),
      );
      const first = await inSite(({ tx }) => meets(tx));
      if (!first) throw error;
      return seenBefore(first);
    }
  },
});
