import type { Transaction } from '@/db/client';
import { type MailAttachment, outbox } from '@/db/schema';
import type { Email } from '@/lib/emails/types';
import { env } from '@/lib/env';
import { enqueue } from '../transaction';

export type QueuedMail = {
  /** Null when it goes to an address that is nobody's account (an invitation). */
  personId: string | null;
  to: string;
  kind: string;
  /** One mail per address, kind and key, however often it is asked for. */
  dedupeKey: string;
  message: Email;
  headers?: Record<string, string>;
  attachments?: MailAttachment[];
};

/** Freezes the message and asks for its sending in the caller's transaction. No id when it was queued before. */
export async function queueMail(tx: Transaction, mail: QueuedMail): Promise<{ id: string | null }> {
  const [row] = await tx
    .insert(outbox)
    .values({
      personId: mail.personId,
      toAddress: mail.to,
      kind: mail.kind,
      dedupeKey: mail.dedupeKey,
      subject: mail.message.subject,
      html: mail.message.html,
      text: mail.message.text,
      headers: mail.headers ?? {},
      attachments: mail.attachments ?? [],
    })
    .onConflictDoNothing()
    .returning({ id: outbox.id });
  if (!row) return { id: null };
  await enqueue(tx, 'send-mail', { id: row.id }, { singletonKey: row.id });
  return { id: row.id };
}

/** Links in mails are built from the configured origin, never from what a request claims. */
export const appUrl = (path: string): string => new URL(path, env().APP_ORIGIN).href;
