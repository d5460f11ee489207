import type { Ctx } from '@/lib/data/context';
import { queueReminder } from '@/lib/data/mail/queueReminder';
import { collectDue, type DueLetter } from '@/lib/data/reminders/collectDue';
import { env } from '@/lib/env';
import { log } from '@/lib/log';
import { calendarOf, reminderLetter } from './letter';

const secret = (ctx: Ctx) => Buffer.from(ctx.random(32)).toString('base64url');

async function write(ctx: Ctx, letter: DueLetter): Promise<boolean> {
  const origin = env().APP_ORIGIN;
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
  return answer.queued;
}

/** Writes to everybody who is due a word today. Safe to run any number of times, in any number of workers. */
export async function sweepReminders(ctx: Ctx): Promise<number> {
  let queued = 0;
  for (const letter of await collectDue({ ctx, input: {} })) {
    try {
      if (await write(ctx, letter)) queued += 1;
    } catch (error) {
      // One letter that cannot be written must not keep everybody else's from leaving.
      log().error({ personId: letter.reader.id, err: error }, 'a reminder was not written; the next sweep tries again');
    }
  }
  return queued;
}
