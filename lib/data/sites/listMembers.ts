import { asc, eq } from 'drizzle-orm';
import { membership } from '@/db/schema';
import { can } from '@/lib/access/table';
import { nothingSchema } from '@/lib/schemas/parts';
import type { MemberList } from '@/lib/schemas/sites';
import { contactsOf } from '../people/contacts';
import { siteVerb } from '../verb';

/** Everyone on a site may know who else is; the addresses are for owners. */
export const listMembers = siteVerb({
  act: 'site.read',
  input: nothingSchema,
  run: async ({ tx, siteId, role, person }): Promise<MemberList> => {
    const rows = await tx
      .select()
      .from(membership)
      .where(eq(membership.siteId, siteId))
      .orderBy(asc(membership.createdAt), asc(membership.id));
    const people = await contactsOf(
      tx,
      rows.map((row) => row.personId),
    );
    const members = rows.flatMap((row) => {
      const who = people.get(row.personId);
      if (!who) return [];
      return [
        {
          id: row.id,
          name: who.name,
          email: can(role, 'site.manage') ? who.email : null,
          role: row.role,
          since: row.createdAt.toISOString(),
          isYou: row.personId === person.id,
        },
      ];
    });
    return { members, role };
  },
});
