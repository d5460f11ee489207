import { sql } from 'drizzle-orm';
import { foreignKey, jsonb, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { report } from './reports';
import { site } from './sites';

/** A grower's own spreadsheet as the worker found it: its cells as text, what each column seems to be, and what the grower said. */
export const ownSheet = pgTable(
  'own_sheet',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    /** Sheet by sheet the rows of cells as text, in their own order. */
    cells: jsonb('cells').$type<{ number: number; name: string | null; rows: string[][] }[]>().notNull(),
    headerFingerprint: text('header_fingerprint').notNull(),
    proposal: jsonb('proposal').$type<unknown>().notNull(),
    mapping: jsonb('mapping').$type<unknown>(),
    mappedBy: uuid('mapped_by'),
    mappedAt: moment('mapped_at'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    uniqueIndex('own_sheet_site_report_key').on(t.siteId, t.reportId),
    siteRowsOnly('own_sheet'),
  ],
);

/** How the grower read the columns of a sheet with these headings; the next one like it is proposed the same way. */
export const sheetMapping = pgTable(
  'sheet_mapping',
  {
    ...siteColumns,
    headerFingerprint: text('header_fingerprint').notNull(),
    mapping: jsonb('mapping').$type<unknown>().notNull(),
    savedBy: uuid('saved_by').notNull(),
    savedAt: moment('saved_at').notNull().default(sql`now()`),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('sheet_mapping_site_header_key').on(t.siteId, t.headerFingerprint),
    siteRowsOnly('sheet_mapping'),
  ],
);
