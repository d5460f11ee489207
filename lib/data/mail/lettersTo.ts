import { and, desc, eq, gt, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { outbox } from '@/db/schema';

/** Keys of the newest letters of one kind to an address, since a moment. Only for whoever has proven to read that address. */
export async function lettersTo(
  tx: Transaction,
  asked: { address: string; kind: string; since: Date; most: number },
): Promise<string[]> {
  const rows = await tx
    .select({ key: outbox.dedupeKey })
    .from(outbox)
    .where(
      and(
        inArray(outbox.toAddress, [...new Set([asked.address, asked.address.toLowerCase()])]),
        eq(outbox.kind, asked.kind),
        gt(outbox.createdAt, asked.since),
      ),
    )
    .orderBy(desc(outbox.createdAt))
    .limit(asked.most);
  return rows.map((row) => row.key);
}
