import { z } from 'zod';
import { daySchema, idSchema, lineSchema, momentSchema, remarkSchema, versionSchema } from './parts';

export const REPORT_STATES = [
  'received',
  'reading',
  'in-review',
  'unreadable',
  'not-soil',
  'confirmed',
  'set-aside',
] as const;
export const reportStateSchema = z.enum(REPORT_STATES);

/** For the file picker; the server decides by content and name together. */
export const UPLOAD_ENDINGS = [
  '.pdf',
  '.csv',
  '.tsv',
  '.txt',
  '.tab',
  '.jpg',
  '.jpeg',
  '.png',
  '.xlsx',
  '.xls',
  '.xml',
  '.json',
] as const;
/** Of a PDF or picture; data files and sheets end at 5 MB. */
export const LARGEST_UPLOAD_BYTES = 20 * 1024 * 1024;

/** What the route hands to the verb: the bytes come from the request, never from a client's JSON. */
export const uploadInput = z.strictObject({
  fileName: z.string(),
  bytes: z.custom<Uint8Array>((value) => value instanceof Uint8Array),
  plotId: idSchema.optional(),
  asRevision: z.enum(['true', 'false']).optional(),
  /** A grower's own spreadsheet of old results and no laboratory's report. */
  ownSheet: z.enum(['true', 'false']).optional(),
  /** The announced file of a batch that this is. */
  batchFileId: idSchema.optional(),
});
/** A file that waits longer than this to be read is told so: the worker may not be running. */
export const LONG_WAIT_MS = 30_000;

export const uploadAnswerSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('received'), reportId: z.string(), fileName: z.string(), bytes: z.number() }),
  z.object({
    kind: z.literal('seen-before'),
    reportId: z.string(),
    fileName: z.string().nullable(),
    uploadedAt: momentSchema,
    state: reportStateSchema,
  }),
]);

export const listReportsInput = z.strictObject({ state: reportStateSchema.optional(), plotId: idSchema.optional() });
export const reportInput = z.strictObject({ reportId: idSchema });
export const reportFileInput = z.strictObject({
  reportId: idSchema,
  /** cells: a workbook's cells as JSON, as the reader found them. */
  as: z.enum(['attachment', 'inline', 'cells']).default('attachment'),
});
export const reportReasonInput = z.strictObject({
  reportId: idSchema,
  reason: lineSchema(500, 'Say why, in a few words: it stays with the report.'),
});

const typedSample = z.strictObject({
  name: lineSchema(120, 'Give the sample a name.').nullable().default(null),
  labNumber: lineSchema(60, 'The laboratory number is empty.').nullable().default(null),
  plotId: idSchema.nullable().default(null),
  takenOn: daySchema.nullable().default(null),
  depthFromCm: z.number().min(0).max(300).nullable().default(null),
  depthToCm: z.number().gt(0).max(300).nullable().default(null),
});
/** A report without a file. */
export const typeReportInput = z.strictObject({
  laboratoryId: idSchema.nullable().default(null),
  laboratoryName: lineSchema(120, 'Which laboratory?').nullable().default(null),
  samples: z.array(typedSample).min(1, 'A report has at least one sample.').max(100),
});
export const setLaboratoryInput = z.strictObject({
  reportId: idSchema,
  version: versionSchema,
  /** One of the site's laboratories, or a new name; both null takes the laboratory away. */
  laboratoryId: idSchema.nullable().default(null),
  laboratoryName: lineSchema(120, 'Which laboratory?').nullable().default(null),
});

export const reportSchema = z.object({
  id: z.string(),
  origin: z.enum(['file', 'typed', 'own-sheet']),
  state: reportStateSchema,
  fileName: z.string().nullable(),
  contentType: z.string().nullable(),
  bytes: z.number().nullable(),
  /** null until the reader knows. */
  pages: z.number().nullable(),
  pagesRead: z.number(),
  revision: z.number(),
  /** Why nothing was taken from the file, or what it waits for, in words. */
  refusal: remarkSchema.nullable(),
  warnings: z.array(remarkSchema),
  laboratory: z.object({ id: z.string(), name: z.string() }).nullable(),
  laboratoryPrinted: z.string().nullable(),
  droppedOnPlotId: z.string().nullable(),
  uploadedBy: z.object({ id: z.string(), name: z.string() }),
  uploadedAt: momentSchema,
  confirmedBy: z.object({ id: z.string(), name: z.string() }).nullable(),
  confirmedAt: momentSchema.nullable(),
  withdrawnReason: z.string().nullable(),
  /** How many samples, how many of them with a plot, and the plots by id. */
  samples: z.object({ all: z.number(), assigned: z.number(), plotIds: z.array(z.string()) }),
  version: z.number(),
  /** True while a job that should have begun has not: the worker may not be running. */
  waitingLong: z.boolean(),
});
export const reportListSchema = z.object({ reports: z.array(reportSchema) });
export const reportStateAnswerSchema = z.object({
  reportId: z.string(),
  state: reportStateSchema,
  version: z.number(),
});

export const laboratorySchema = z.object({ id: z.string(), name: z.string(), otherSpellings: z.array(z.string()) });
export const laboratoryListSchema = z.object({ laboratories: z.array(laboratorySchema) });
export const createLaboratoryInput = z.strictObject({ name: lineSchema(120, 'Give the laboratory a name.') });
export const updateLaboratoryInput = z.strictObject({
  laboratoryId: idSchema,
  name: lineSchema(120, 'Give the laboratory a name.'),
  otherSpellings: z.array(lineSchema(120, 'A spelling is empty.')).max(30),
});

export type Report = z.infer<typeof reportSchema>;
export type ReportList = z.infer<typeof reportListSchema>;
export type UploadAnswer = z.infer<typeof uploadAnswerSchema>;
export type Laboratory = z.infer<typeof laboratorySchema>;
