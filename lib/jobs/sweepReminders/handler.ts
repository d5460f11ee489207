import type { Ctx } from '@/lib/data/context';
import { queueReminder } from '@/lib/data/mail/queueReminder';
import { collectDue } from '@/lib/data/reminders/collectDue';
import { env } from '@/lib/env';
import { calendarOf, reminderLetter } from './letter';

const secret = (ctx: Ctx) => Buffer.from(ctx.random(32)).toString('base64url');

/** Writes to everybody who is due a word today. Safe to run any number of times, in any number of workers. */
export async function sweepReminders(ctx: Ctx): Promise<number> {
  const origin = env().APP_ORIGIN;
  let queued = 0;
  for (const letter of await collectDue({ ctx, input: {} })) {
    const secrets = { action: secret(ctx), unsubscribe: secret(ctx) };
    const mail = await reminderLetter(origin, letter, secrets);
    const answer = await queueReminder({
      ctx,
      input: {
        personId: letter.reader.id,
        to: letter.reader.email,
        day: letter.today,
        subject: mail.subject,
        html: mail.html,
        text: mail.text,
        headers: {
          'List-Unsubscribe': `<${origin}/api/v1/mail/unsubscribe?token=${secrets.unsubscribe}>`,
          'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
        },
        attachments: letter.notices.map((notice) => calendarOf(notice, ctx.now)),
        items: letter.notices.map((notice) => ({ reminderId: notice.reminderId, noticeOn: notice.noticeOn })),
        unsubscribeSecret: secrets.unsubscribe,
        actionSecret: secrets.action,
      },
    });
    if (answer.queued) queued += 1;
  }
  return queued;
}
