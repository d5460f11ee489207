import { and, desc, eq } from 'drizzle-orm';
import { outbox } from '@/db/schema';
import { database } from '@/lib/data/database';
import { claimMail } from '@/lib/data/mail/claimMail';
import { settleMail } from '@/lib/data/mail/settleMail';
import { workerOn } from './clock';

const LINK = /\/(?:verify|invitation)\/([\w-]{43})/;

/** The secret of the newest mail's link, as its reader would follow it. */
export async function linkIn(email: string, kind: string): Promise<string> {
  const [mail] = await database()
    .select({ text: outbox.text })
    .from(outbox)
    .where(and(eq(outbox.toAddress, email), eq(outbox.kind, kind), eq(outbox.state, 'queued')))
    .orderBy(desc(outbox.createdAt))
    .limit(1);
  const secret = mail?.text.match(LINK)?.[1];
  if (!secret) throw new Error(`No ${kind} mail with a link waits for ${email}.`);
  return secret;
}

/** The letters of years ago are answered already; sent today they would only confuse. */
export async function withdrawMails(day: string): Promise<void> {
  const ctx = await workerOn(day);
  const waiting = await database().select({ id: outbox.id }).from(outbox).where(eq(outbox.state, 'queued'));
  for (const { id } of waiting) {
    await claimMail({ ctx, input: { id } });
    const sentence = 'Not sent: a letter of the demo, whose people have no mailboxes.';
    await settleMail({ ctx, input: { answer: 'refused', id, sentence } });
  }
}
