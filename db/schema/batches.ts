import {
  bigint,
  boolean,
  foreignKey,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { report } from './reports';
import { site } from './sites';

/** announced: not here yet. seen-before: its report came another time. left-out: whoever sent the others goes on without it. */
export type BatchFileState = 'announced' | 'kept' | 'seen-before' | 'refused' | 'left-out';

/** Many files let go at once: old years. */
export const uploadBatch = pgTable(
  'upload_batch',
  {
    ...siteColumns,
    createdBy: uuid('created_by').notNull(),
    createdAt: moment('created_at').notNull(),
    mailWanted: boolean('mail_wanted').notNull().default(false),
    mailChosenAt: moment('mail_chosen_at').notNull(),
    /** When a file of it last arrived, was refused or left out. */
    movedAt: moment('moved_at').notNull(),
    /** Set once, by whoever finds that nothing of it is waited for any more. */
    readyAt: moment('ready_at'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    index('upload_batch_site_created_idx').on(t.siteId, t.createdAt.desc()),
    siteRowsOnly('upload_batch'),
  ],
);

export const uploadBatchFile = pgTable(
  'upload_batch_file',
  {
    ...siteColumns,
    batchId: uuid('batch_id').notNull(),
    ordinal: integer('ordinal').notNull(),
    fileName: text('file_name').notNull(),
    bytes: bigint('bytes', { mode: 'number' }).notNull(),
    state: text('state').$type<BatchFileState>().notNull().default('announced'),
    reportId: uuid('report_id'),
    /** Why it was not taken, in words. */
    refusal: text('refusal'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.batchId], foreignColumns: [uploadBatch.siteId, uploadBatch.id] }).onDelete(
      'cascade',
    ),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }),
    uniqueIndex('upload_batch_file_site_batch_ordinal_key').on(t.siteId, t.batchId, t.ordinal),
    index('upload_batch_file_site_report_idx').on(t.siteId, t.reportId),
    siteRowsOnly('upload_batch_file'),
  ],
);
