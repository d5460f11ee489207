import { and, eq } from 'drizzle-orm';
import { membership } from '@/db/schema';
import { notFound } from '@/lib/errors';
import { nothingSchema } from '@/lib/schemas/parts';
import { siteVerb } from '../verb';
import { endMembership } from './endMembership';

export const leaveSite = siteVerb({
  act: 'self.manage',
  input: nothingSchema,
  run: async ({ tx, siteId, person, audit }) => {
    const [mine] = await tx
      .select({ id: membership.id })
      .from(membership)
      .where(and(eq(membership.siteId, siteId), eq(membership.personId, person.id)));
    if (!mine) throw notFound();
    return endMembership(tx, { siteId, memberId: mine.id, act: 'member.left' }, audit);
  },
});
