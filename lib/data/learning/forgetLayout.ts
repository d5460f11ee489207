import { and, eq } from 'drizzle-orm';
import { layoutMemory } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { type ForgottenLayout, layoutInput } from '@/lib/schemas/learning';
import { siteVerb } from '../verb';

/** Everything learnt of one layout goes, from whichever report it came. Confirmed results and open reviews stay as they are. */
export const forgetLayout = siteVerb({
  act: 'reading.decide',
  input: layoutInput,
  run: async ({ tx, siteId, input, audit }): Promise<ForgottenLayout> => {
    const [one] = await tx
      .select({ fingerprint: layoutMemory.fingerprint, laboratory: layoutMemory.laboratoryPrinted })
      .from(layoutMemory)
      .where(and(eq(layoutMemory.siteId, siteId), eq(layoutMemory.id, input.layoutId)));
    if (!one) throw notFound();
    const gone = await tx
      .delete(layoutMemory)
      .where(and(eq(layoutMemory.siteId, siteId), eq(layoutMemory.fingerprint, one.fingerprint)))
      .returning({ reportId: layoutMemory.reportId });
    if (gone.length === 0) throw notFound();
    await audit({
      act: 'layout.forget',
      objectKind: 'layout',
      objectId: input.layoutId,
      detail: { laboratory: one.laboratory, reports: gone.map((row) => row.reportId) },
    });
    return { forgotten: gone.length };
  },
});
