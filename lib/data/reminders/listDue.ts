import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { reminder } from '@/db/schema';
import { can } from '@/lib/access/table';
import { asDay, daysBetween } from '@/lib/domain/days';
import type { DueAnswer } from '@/lib/schemas/reminders';
import { dayOf } from '../days';
import { siteVerb } from '../verb';
import { loadDue } from './loadDue';

/** Open reminders of one site, soonest first. */
export const listDue = siteVerb({
  act: 'site.read',
  input: z.strictObject({}),
  run: async ({ ctx, tx, siteId, person, role }) => {
    const today = dayOf(ctx.now, person.timeZone);
    const rows = await loadDue(tx, siteId, person.id, eq(reminder.state, 'open'));
    const due: DueAnswer[] = rows.map(({ state: _, ...row }) => ({
      ...row,
      siteId,
      inDays: daysBetween(today, asDay(row.dueOn)),
      mayClose: can(role, 'reminder.already-sampled'),
    }));
    return { today: today as string, due };
  },
});
