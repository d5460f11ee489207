import { claimMail } from '@/lib/data/mail/claimMail';
import { settleMail } from '@/lib/data/mail/settleMail';
import { sendMail } from '@/lib/services/mail/mail';
import type { JobTools } from '../job';

export async function sendQueuedMail({ ctx, payload }: JobTools<'send-mail'>): Promise<void> {
  const mail = await claimMail({ ctx, input: { id: payload.id } });
  if (mail?.state !== 'sending') return;
  const answer = await sendMail({
    to: mail.toAddress,
    subject: mail.subject,
    html: mail.html,
    text: mail.text,
    headers: mail.headers,
    attachments: mail.attachments,
    idempotencyKey: `${mail.kind}/${mail.id}`,
  });
  if (answer.ok) {
    await settleMail({ ctx, input: { answer: 'sent', id: mail.id, providerId: answer.providerId } });
    return;
  }
  await settleMail({ ctx, input: { answer: answer.reason, id: mail.id, sentence: answer.sentence } });
  if (answer.reason === 'later') throw new Error(`mail ${mail.id} is tried again later`);
}
