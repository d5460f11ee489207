import { eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { site, token } from '@/db/schema';
import { dayInWords } from '@/lib/domain/days';
import type { SiteId } from '@/lib/domain/ids';
import { batchReady } from '@/lib/emails/batch-ready';
import { reportReady } from '@/lib/emails/report-ready';
import type { Email, ReportReadyProps } from '@/lib/emails/types';
import type { BatchRow } from '../batches/getBatchInSite';
import type { Ctx } from '../context';
import { dayOf } from '../days';
import { reachable } from '../people/reachable';
import { readyMailChoice } from '../people/readyMailChoice';
import { hashSecret, newSecret } from '../people/secrets';
import { appUrl, queueMail } from './queueMail';

const KIND = 'report-ready';
const YEAR_MS = 366 * 24 * 3600 * 1000;

export type BatchNews = {
  files: number;
  toReview: number;
  samples: number;
  notRead: number;
  notTaken: number;
  missing: number;
};

type Reader = NonNullable<Awaited<ReturnType<typeof reachable>>>;
type Links = { name: string; unsubscribeUrl: string; preferencesUrl: string };

async function siteName(tx: Transaction, siteId: SiteId): Promise<string> {
  const [row] = await tx.select({ name: site.name }).from(site).where(eq(site.id, siteId));
  return row?.name ?? '';
}

/** The letter, the link in it and the job that sends it are written together; the key lets one through. */
async function queue(
  tx: Transaction,
  ctx: Ctx,
  reader: Reader,
  dedupeKey: string,
  write: (links: Links) => Promise<Email>,
): Promise<boolean> {
  const secret = newSecret(ctx);
  const message = await write({
    name: reader.name,
    unsubscribeUrl: appUrl(`/unsubscribe?token=${secret}`),
    preferencesUrl: appUrl('/account'),
  });
  const { id } = await queueMail(tx, {
    personId: reader.id,
    to: reader.email,
    kind: KIND,
    dedupeKey,
    message,
    headers: {
      'List-Unsubscribe': `<${appUrl(`/api/v1/mail/unsubscribe?token=${secret}`)}>`,
      'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
    },
  });
  if (id === null) return false;
  await tx.insert(token).values({
    id: hashSecret(secret),
    personId: reader.id,
    purpose: 'unsubscribe',
    email: reader.email,
    payload: { kind: KIND },
    expiresAt: new Date(ctx.now.getTime() + YEAR_MS),
    createdAt: ctx.now,
  });
  return true;
}

/** One letter a batch. Who stopped these letters after choosing one for this batch gets none. */
export async function queueBatchReady(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  batch: BatchRow,
  news: BatchNews,
): Promise<boolean> {
  const choice = await readyMailChoice(tx, batch.createdBy);
  if (choice && !choice.wanted && choice.changedAt > batch.mailChosenAt) return false;
  const reader = await reachable(tx, batch.createdBy);
  if (!reader) return false;
  const name = await siteName(tx, siteId);
  return queue(tx, ctx, reader, `batch ${batch.id}`, (links) =>
    batchReady({
      ...links,
      ...news,
      siteName: name,
      sentOn: dayInWords(dayOf(batch.createdAt, reader.timeZone)),
      batchUrl: appUrl(`/sites/${siteId}/reports/batches/${batch.id}`),
    }),
  );
}

/** One letter a report, however often it is read. */
export async function queueReportReady(
  tx: Transaction,
  ctx: Ctx,
  siteId: SiteId,
  read: { reportId: string; personId: string } & Pick<
    ReportReadyProps,
    'fileName' | 'plotNames' | 'outcome' | 'sampledOn'
  >,
): Promise<boolean> {
  const { reportId, personId, ...about } = read;
  if ((await readyMailChoice(tx, personId))?.wanted !== true) return false;
  const reader = await reachable(tx, personId);
  if (!reader) return false;
  const name = await siteName(tx, siteId);
  const reviewUrl = appUrl(`/sites/${siteId}/reports/${reportId}`);
  return queue(tx, ctx, reader, `report ${reportId}`, (links) =>
    reportReady({ ...links, ...about, siteName: name, reviewUrl }),
  );
}
