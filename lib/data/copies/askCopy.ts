import { and, eq, inArray } from 'drizzle-orm';
import { pageCopy } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { askCopyInput, type PageCopy } from '@/lib/schemas/copies';
import { getReportInSite } from '../reports/getReportInSite';
import { stateConflict } from '../reports/stateConflict';
import { enqueue } from '../transaction';
import { siteVerb } from '../verb';
import { toCopy } from './copyStore';

/** Asks for a page with names and addresses blacked out. A second click finds the first one's copy. */
export const askCopy = siteVerb({
  act: 'reading.work',
  input: askCopyInput,
  run: async ({ ctx, tx, siteId, person, input, audit }): Promise<PageCopy> => {
    const row = await getReportInSite(tx, siteId, input.reportId, 'update');
    if (row.state === 'received' || row.state === 'reading') throw await stateConflict(tx, row);
    if (row.fileKey === null)
      throw new Problem('conflict', 'This report was typed in; it has no page to copy.', { reason: 'no-file' });
    if (input.page > Math.max(1, row.pages ?? 1))
      throw new Problem('invalid', 'This report has no such page.', { fields: { page: 'There is no such page.' } });
    const [there] = await tx
      .select()
      .from(pageCopy)
      .where(
        and(
          eq(pageCopy.siteId, siteId),
          eq(pageCopy.reportId, row.id),
          eq(pageCopy.page, input.page),
          eq(pageCopy.askedBy, person.id),
          inArray(pageCopy.state, ['asked', 'ready']),
        ),
      )
      .limit(1);
    if (there) return toCopy(there);
    const [made] = await tx
      .insert(pageCopy)
      .values({ siteId, reportId: row.id, page: input.page, askedBy: person.id, askedAt: ctx.now })
      .returning();
    if (!made) throw new Error('The copy was not written.');
    await audit({ act: 'page-copy.ask', objectKind: 'report', objectId: row.id, detail: { page: input.page } });
    await enqueue(tx, 'mask-page', { siteId, id: made.id });
    return toCopy(made);
  },
});
