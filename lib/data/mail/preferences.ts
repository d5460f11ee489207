import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { mailPreference } from '@/db/schema';
import { personVerb } from '../verb';

export const OPTIONAL_MAIL = ['reminder', 'report-ready'] as const;
/** Reminders come unless stopped; that a report is read is told by mail only to whoever asked for it. */
const WANTED_AT_FIRST: Record<(typeof OPTIONAL_MAIL)[number], boolean> = { reminder: true, 'report-ready': false };

export const getMailPreferences = personVerb({
  input: z.strictObject({}),
  run: async ({ tx, person }) => {
    const rows = await tx.select().from(mailPreference).where(eq(mailPreference.personId, person.id));
    const wanted = (kind: (typeof OPTIONAL_MAIL)[number]) =>
      rows.find((row) => row.kind === kind)?.wanted ?? WANTED_AT_FIRST[kind];
    return { preferences: OPTIONAL_MAIL.map((kind) => ({ kind, wanted: wanted(kind) })) };
  },
});

export const setMailPreference = personVerb({
  input: z.strictObject({ kind: z.enum(OPTIONAL_MAIL), wanted: z.boolean() }),
  run: async ({ ctx, tx, person, input }) => {
    await tx
      .insert(mailPreference)
      .values({ personId: person.id, kind: input.kind, wanted: input.wanted, changedAt: ctx.now })
      .onConflictDoUpdate({
        target: [mailPreference.personId, mailPreference.kind],
        set: { wanted: input.wanted, changedAt: ctx.now },
      });
    const [row] = await tx
      .select()
      .from(mailPreference)
      .where(and(eq(mailPreference.personId, person.id), eq(mailPreference.kind, input.kind)));
    return { kind: input.kind, wanted: row?.wanted ?? input.wanted };
  },
});
