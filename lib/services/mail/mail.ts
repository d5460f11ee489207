import { Resend } from 'resend';
import { env } from '@/lib/env';

export type OutgoingMail = {
  to: string;
  subject: string;
  html: string;
  text: string;
  headers: Record<string, string>;
  attachments: { filename: string; content: string; contentType: string }[];
  idempotencyKey: string;
};

export type MailAnswer =
  | { ok: true; providerId: string }
  | { ok: false; reason: 'refused' | 'later'; sentence: string };

const AGAIN = new Set([401, 403, 408, 409, 429]);

let client: Resend | undefined;

/** One mail to the provider. "refused" is final for this address or body; "later" may be tried again with the same key. */
export async function sendMail(mail: OutgoingMail): Promise<MailAnswer> {
  const { RESEND_API_KEY, RESEND_BASE_URL, MAIL_FROM } = env();
  client ??= new Resend(RESEND_API_KEY, RESEND_BASE_URL ? { baseUrl: RESEND_BASE_URL } : {});
  const { data, error } = await client.emails.send(
    {
      from: MAIL_FROM,
      to: mail.to,
      subject: mail.subject,
      html: mail.html,
      text: mail.text,
      headers: mail.headers,
      attachments: mail.attachments.map((file) => ({
        filename: file.filename,
        content: Buffer.from(file.content, 'utf8').toString('base64'),
        contentType: file.contentType,
      })),
    },
    { idempotencyKey: mail.idempotencyKey },
  );
  if (data) return { ok: true, providerId: data.id };
  const status = error?.statusCode ?? 0;
  // 401 and 403 are about our own key or sender: once that is put right, the letter goes.
  const final = status >= 400 && status < 500 && !AGAIN.has(status);
  return {
    ok: false,
    reason: final ? 'refused' : 'later',
    sentence: error?.message ?? 'The mail service did not answer.',
  };
}
