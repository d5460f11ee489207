import { and, eq, inArray } from 'drizzle-orm';
import { membership, reminder } from '@/db/schema';
import { can } from '@/lib/access/table';
import { addDays } from '@/lib/domain/days';
import { asPersonId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { mailActionInput, mailTokenInput } from '@/lib/schemas/reminders';
import type { Ctx } from '../context';
import { dayOf } from '../days';
import { readLinkToken } from '../mail/linkToken';
import { remindersOfLetter } from '../mail/remindersOfLetter';
import { withPeople, withSite } from '../transaction';
import { publicVerb } from '../verb';
import { closeInSite } from './closeReminder';
import { loadDue } from './loadDue';
import { snoozeInSite } from './snoozeReminder';

const letterOf = (ctx: Ctx, secret: string) =>
  withPeople(async (tx) => {
    const link = await readLinkToken(tx, ctx, secret, 'mail-action');
    const reminders = await remindersOfLetter(tx, link.payload.outboxId ?? '');
    return { ...link, personId: asPersonId(link.personId), reminders };
  });

/** What the page behind a letter's links shows. Looking changes nothing: mail scanners look too. */
export const showMailActions = publicVerb({
  input: mailTokenInput,
  run: async ({ ctx, input }) => {
    const letter = await letterOf(ctx, input.token);
    const shown = [];
    for (const [siteId, ids] of letter.reminders) {
      const rows = await withSite(siteId, async (tx) => {
        const [member] = await tx
          .select({ role: membership.role })
          .from(membership)
          .where(and(eq(membership.siteId, siteId), eq(membership.personId, letter.personId)));
        if (!member) return [];
        const due = await loadDue(tx, siteId, letter.personId, inArray(reminder.id, ids));
        return due.map(({ state, snoozedUntil: _, ...row }) => ({
          ...row,
          siteId: siteId as string,
          open: state === 'open',
          mayClose: can(member.role, 'reminder.already-sampled'),
        }));
      });
      shown.push(...rows);
    }
    return { name: letter.name, reminders: shown };
  },
});

/** "Ask again" and "already sampled" from a letter, in the name of the person it was written to. */
export const doMailAction = publicVerb({
  input: mailActionInput,
  run: async ({ ctx, input }) => {
    const letter = await letterOf(ctx, input.token);
    const { reminderId } = input;
    const siteId = [...letter.reminders].find(([, ids]) => ids.includes(reminderId))?.[0];
    if (!siteId) throw notFound();
    await withSite(siteId, async (tx) => {
      const [member] = await tx
        .select({ role: membership.role })
        .from(membership)
        .where(and(eq(membership.siteId, siteId), eq(membership.personId, letter.personId)));
      if (!member) throw notFound();
      if (input.action === 'snooze-two-weeks') {
        const until = addDays(dayOf(ctx.now, letter.timeZone), 14);
        return snoozeInSite(tx, siteId, letter.personId, reminderId, until);
      }
      if (!can(member.role, 'reminder.already-sampled')) {
        throw new Problem('forbidden', 'Somebody who works on this site can say that the sample is taken.');
      }
      return closeInSite(tx, ctx, siteId, letter.personId, reminderId);
    });
    return { done: true as const };
  },
});
