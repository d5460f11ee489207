import { sql } from 'drizzle-orm';
import { foreignKey, index, integer, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { report } from './reports';
import { site } from './sites';

/** A job that no try is left for, with what that means in words. One open row a job and subject, however often it fails. */
export const failedJob = pgTable(
  'failed_job',
  {
    ...siteColumns,
    job: text('job').notNull(),
    subjectId: uuid('subject_id').notNull(),
    code: text('code').notNull(),
    sentence: text('sentence').notNull(),
    gaveUpAt: moment('gave_up_at').notNull(),
    replayedAt: moment('replayed_at'),
    replayedBy: uuid('replayed_by'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('failed_job_open_key').on(t.siteId, t.job, t.subjectId).where(sql`replayed_at is null`),
    index('failed_job_site_gave_up_idx').on(t.siteId, t.gaveUpAt.desc()),
    siteRowsOnly('failed_job'),
  ],
);

export type PageCopyState = 'asked' | 'ready' | 'failed' | 'thrown-away';

/** A page with names and addresses blacked out, made for a report of a fault and kept for a day. */
export const pageCopy = pgTable(
  'page_copy',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    page: integer('page').notNull(),
    state: text('state').$type<PageCopyState>().notNull().default('asked'),
    sentence: text('sentence'),
    askedBy: uuid('asked_by').notNull(),
    askedAt: moment('asked_at').notNull(),
    startedAt: moment('started_at'),
    readyAt: moment('ready_at'),
    pictureKey: text('picture_key'),
    pictureSha256: text('picture_sha256'),
    bundleKey: text('bundle_key'),
    bundleSha256: text('bundle_sha256'),
    /** How many words were kept and blacked out. */
    wordsKept: integer('words_kept'),
    wordsMasked: integer('words_masked'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    index('page_copy_site_report_idx').on(t.siteId, t.reportId),
    siteRowsOnly('page_copy'),
  ],
);
