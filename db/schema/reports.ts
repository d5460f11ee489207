import { sql } from 'drizzle-orm';
import {
  boolean,
  date,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  numeric,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { moment, siteColumns, siteRowsOnly } from './columns';
import { plot, site } from './sites';

export type ReportState = 'received' | 'reading' | 'in-review' | 'unreadable' | 'not-soil' | 'confirmed' | 'set-aside';
export type ReportOrigin = 'file' | 'typed' | 'own-sheet';
export type RowState = 'proposed' | 'edited' | 'added' | 'removed';
export type Qualifier = '=' | '<' | '>' | 'nd' | 'trace';
export type Box = [x0: number, y0: number, x1: number, y1: number];
export type Cell = { sheet: string | null; row: number; column: number };
export type Doubt = { code: string; sentence: string };
export type UnitBasis = 'mass' | 'volume' | 'area' | 'charge' | 'share' | 'index' | 'none';

export const laboratory = pgTable(
  'laboratory',
  {
    ...siteColumns,
    name: text('name').notNull(),
    otherSpellings: text('other_spellings').array().notNull().default([]),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    uniqueIndex('laboratory_site_name_key').on(t.siteId, sql`lower(${t.name})`),
    siteRowsOnly('laboratory'),
  ],
);

/** One bag. Two bags of one plot and day (composite 1 and 2) are a field duplicate. */
export const sample = pgTable(
  'sample',
  {
    ...siteColumns,
    plotId: uuid('plot_id').notNull(),
    takenOn: date('taken_on', { mode: 'string' }).notNull(),
    depthFromCm: numeric('depth_from_cm'),
    depthToCm: numeric('depth_to_cm'),
    cores: integer('cores'),
    composite: integer('composite').notNull().default(1),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }).onDelete('cascade'),
    index('sample_site_plot_day_idx').on(t.siteId, t.plotId, t.takenOn.desc()),
    siteRowsOnly('sample'),
  ],
);

export const report = pgTable(
  'report',
  {
    ...siteColumns,
    origin: text('origin').$type<ReportOrigin>().notNull().default('file'),
    state: text('state').$type<ReportState>().notNull(),
    fileKey: text('file_key'),
    sha256: text('sha256'),
    fileName: text('file_name'),
    contentType: text('content_type'),
    bytes: integer('bytes'),
    pages: integer('pages'),
    pagesRead: integer('pages_read').notNull().default(0),
    revision: integer('revision').notNull().default(1),
    readerVersion: text('reader_version'),
    layoutFingerprint: text('layout_fingerprint'),
    refusalCode: text('refusal_code'),
    refusalSentence: text('refusal_sentence'),
    warnings: jsonb('warnings').$type<Doubt[]>().notNull().default([]),
    laboratoryId: uuid('laboratory_id'),
    laboratoryPrinted: text('laboratory_printed'),
    droppedOnPlotId: uuid('dropped_on_plot_id'),
    uploadedBy: uuid('uploaded_by').notNull(),
    uploadedAt: moment('uploaded_at').notNull().defaultNow(),
    readingStartedAt: moment('reading_started_at'),
    confirmedBy: uuid('confirmed_by'),
    confirmedAt: moment('confirmed_at'),
    withdrawnReason: text('withdrawn_reason'),
    version: integer('version').notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId], foreignColumns: [site.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.laboratoryId], foreignColumns: [laboratory.siteId, laboratory.id] }),
    foreignKey({ columns: [t.siteId, t.droppedOnPlotId], foreignColumns: [plot.siteId, plot.id] }),
    uniqueIndex('report_site_sha256_revision_key').on(t.siteId, t.sha256, t.revision),
    index('report_site_uploaded_idx').on(t.siteId, t.uploadedAt.desc()),
    siteRowsOnly('report'),
  ],
);

export const reportSample = pgTable(
  'report_sample',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    ordinal: integer('ordinal').notNull(),
    printedName: text('printed_name'),
    labNumber: text('lab_number'),
    fieldName: text('field_name'),
    sampledPrinted: text('sampled_printed'),
    reportedOn: date('reported_on', { mode: 'string' }),
    reportedPrinted: text('reported_printed'),
    plotId: uuid('plot_id'),
    takenOn: date('taken_on', { mode: 'string' }),
    depthFromCm: numeric('depth_from_cm'),
    depthToCm: numeric('depth_to_cm'),
    cores: integer('cores'),
    composite: integer('composite').notNull().default(1),
    leftOutReason: text('left_out_reason'),
    /** The same analysis in another form (a data file beside its page): compared, never counted twice. */
    sameAsId: uuid('same_as_id'),
    sampleId: uuid('sample_id'),
    version: integer('version').notNull().default(1),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }),
    foreignKey({ columns: [t.siteId, t.sampleId], foreignColumns: [sample.siteId, sample.id] }),
    uniqueIndex('report_sample_site_report_ordinal_key').on(t.siteId, t.reportId, t.ordinal),
    siteRowsOnly('report_sample'),
  ],
);

export type OriginalReading = {
  analyte: string | null;
  printed: string;
  value: string | null;
  qualifier: Qualifier;
  unit: string | null;
  method: string | null;
  form: string | null;
};

export type LearntFrom = {
  on: string;
  filled: string[];
  /** The cells as the page alone gave them. */
  before: { analyte: string; form: string | null; unit: string | null; method: string | null };
};

/** What one label meant in a confirmed review; the shape is that of the reading room. */
export type LessonRow = {
  label: string;
  labelPrinted: string;
  analyte: string;
  method: string | null;
  unit: string | null;
  form: string | null;
  columns: number[];
};

export const readingRow = pgTable(
  'reading_row',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    reportSampleId: uuid('report_sample_id').notNull(),
    ordinal: integer('ordinal').notNull(),
    analyte: text('analyte'),
    label: text('label').notNull().default(''),
    printed: text('printed').notNull().default(''),
    value: numeric('value'),
    qualifier: text('qualifier').$type<Qualifier>().notNull().default('='),
    unit: text('unit'),
    unitPrinted: text('unit_printed'),
    form: text('form'),
    method: text('method'),
    methodPrinted: text('method_printed'),
    rating: text('rating'),
    isPrimary: boolean('is_primary').notNull().default(true),
    page: integer('page'),
    box: jsonb('box').$type<Box>(),
    cell: jsonb('cell').$type<Cell>(),
    confidence: doublePrecision('confidence'),
    doubts: jsonb('doubts').$type<Doubt[]>().notNull().default([]),
    state: text('state').$type<RowState>().notNull().default('proposed'),
    /** The confirmation this row leans on and the cells it filled; null where nothing of the layout was learnt. */
    learnt: jsonb('learnt').$type<LearntFrom>(),
    original: jsonb('original').$type<OriginalReading>(),
    version: integer('version').notNull().default(1),
    editedBy: uuid('edited_by'),
    editedAt: moment('edited_at'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    foreignKey({
      columns: [t.siteId, t.reportSampleId],
      foreignColumns: [reportSample.siteId, reportSample.id],
    }).onDelete('cascade'),
    index('reading_row_site_report_idx').on(t.siteId, t.reportId, t.ordinal),
    siteRowsOnly('reading_row'),
  ],
);

export const recommendation = pgTable(
  'recommendation',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    reportSampleId: uuid('report_sample_id'),
    item: text('item').notNull(),
    amount: numeric('amount'),
    printed: text('printed').notNull(),
    unit: text('unit'),
    page: integer('page'),
    box: jsonb('box').$type<Box>(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    siteRowsOnly('recommendation'),
  ],
);

/** What one confirmed report taught of its layout. Withdrawing the confirmation takes the row away and no other's. */
export const layoutMemory = pgTable(
  'layout_memory',
  {
    ...siteColumns,
    reportId: uuid('report_id').notNull(),
    fingerprint: text('fingerprint').notNull(),
    laboratory: text('laboratory').notNull(),
    laboratoryPrinted: text('laboratory_printed'),
    shape: text('shape').$type<'page-across' | 'page-down' | 'data-across' | 'data-down'>().notNull(),
    headings: text('headings').array().notNull(),
    lessons: jsonb('lessons').$type<LessonRow[]>().notNull(),
    learntBy: uuid('learnt_by').notNull(),
    learntAt: moment('learnt_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    uniqueIndex('layout_memory_site_report_key').on(t.siteId, t.reportId),
    index('layout_memory_site_laboratory_idx').on(t.siteId, t.laboratory, t.learntAt.desc()),
    siteRowsOnly('layout_memory'),
  ],
);

/** Insert-only but for the two columns that say a row was superseded; the application's role holds no other update right. */
export const result = pgTable(
  'result',
  {
    ...siteColumns,
    sampleId: uuid('sample_id').notNull(),
    reportId: uuid('report_id').notNull(),
    reportSampleId: uuid('report_sample_id').notNull(),
    readingRowId: uuid('reading_row_id'),
    /** 1, or 2 and up for a second analysis of the same bag (laboratory duplicate). */
    analysis: integer('analysis').notNull().default(1),
    plotId: uuid('plot_id').notNull(),
    takenOn: date('taken_on', { mode: 'string' }).notNull(),
    depthFromCm: numeric('depth_from_cm'),
    depthToCm: numeric('depth_to_cm'),
    laboratoryId: uuid('laboratory_id'),
    analyte: text('analyte').notNull(),
    method: text('method'),
    form: text('form'),
    unit: text('unit'),
    unitBasis: text('unit_basis').$type<UnitBasis>().notNull(),
    value: numeric('value'),
    valueSi: numeric('value_si'),
    qualifier: text('qualifier').$type<Qualifier>().notNull(),
    printed: text('printed').notNull(),
    unitPrinted: text('unit_printed'),
    confirmedBy: uuid('confirmed_by').notNull(),
    confirmedAt: moment('confirmed_at').notNull().defaultNow(),
    supersedesId: uuid('supersedes_id'),
    supersededAt: moment('superseded_at'),
    supersededReason: text('superseded_reason'),
  },
  (t) => [
    primaryKey({ columns: [t.siteId, t.id] }),
    foreignKey({ columns: [t.siteId, t.sampleId], foreignColumns: [sample.siteId, sample.id] }),
    foreignKey({ columns: [t.siteId, t.reportId], foreignColumns: [report.siteId, report.id] }).onDelete('cascade'),
    foreignKey({ columns: [t.siteId, t.plotId], foreignColumns: [plot.siteId, plot.id] }),
    foreignKey({ columns: [t.siteId, t.laboratoryId], foreignColumns: [laboratory.siteId, laboratory.id] }),
    uniqueIndex('result_live_key')
      .on(
        t.siteId,
        t.sampleId,
        t.analysis,
        t.analyte,
        sql`coalesce(${t.method}, '')`,
        sql`coalesce(${t.form}, '')`,
        t.unitBasis,
      )
      .where(sql`superseded_at is null`),
    siteRowsOnly('result'),
  ],
);
