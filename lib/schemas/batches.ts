import { z } from 'zod';
import { idSchema, lineSchema, momentSchema, versionSchema } from './parts';
import { type Report, reportSchema } from './reports';

/** So many files at once make one batch; whatever is beyond them waits on the grower's own device. */
export const LARGEST_BATCH = 100;
/** Fewer files than this are sent one by one, without a list of their own. */
export const BATCH_FROM = 4;

const refusalSchema = lineSchema(1000, 'Say why it was not taken.');

export const createBatchInput = z.strictObject({
  files: z
    .array(
      z.strictObject({
        name: z.string().min(1, 'A file has a name.').max(400, 'This file’s name is too long.'),
        bytes: z.number().int().min(0).max(Number.MAX_SAFE_INTEGER),
        /** Refused before a byte was sent, with the reason. */
        refusal: refusalSchema.nullable().default(null),
      }),
    )
    .min(1, 'A batch has at least one file.')
    .max(LARGEST_BATCH, `At most ${LARGEST_BATCH} files at once.`),
});
export const batchInput = z.strictObject({ batchId: idSchema });
export const batchMailInput = z.strictObject({ batchId: idSchema, wanted: z.boolean() });
export const refuseFileInput = z.strictObject({ batchId: idSchema, fileId: idSchema, sentence: refusalSchema });
export const assignPlotsInput = z.strictObject({
  batchId: idSchema,
  edits: z
    .array(z.strictObject({ reportSampleId: idSchema, version: versionSchema, plotId: idSchema.nullable() }))
    .min(1, 'Choose at least one sample.')
    .max(500, 'At most 500 samples at once.'),
});
export const batchPlaceInput = z.strictObject({ reportId: idSchema });

export const batchFileSchema = z.object({
  id: z.string(),
  ordinal: z.number(),
  fileName: z.string(),
  bytes: z.number(),
  state: z.enum(['announced', 'kept', 'seen-before', 'refused', 'left-out']),
  /** Why it was not taken. */
  refusal: z.string().nullable(),
  report: reportSchema
    .pick({ id: true, state: true, pages: true, pagesRead: true, samples: true, refusal: true, waitingLong: true })
    .nullable(),
});
export const batchCountsSchema = z.object({
  files: z.number(),
  /** Announced, but not here. */
  missing: z.number(),
  beingRead: z.number(),
  toReview: z.number(),
  confirmed: z.number(),
  /** Kept, but nothing could be read from them. */
  notRead: z.number(),
  setAside: z.number(),
  /** Refused, or left out by whoever sent the others. */
  notTaken: z.number(),
});
const batchHead = z.object({
  id: z.string(),
  createdBy: z.object({ id: z.string(), name: z.string() }),
  createdAt: momentSchema,
  readyAt: momentSchema.nullable(),
  counts: batchCountsSchema,
});
export const batchSchema = batchHead.extend({
  /** Whoever sent it is written to once all of it is read. */
  mailWanted: z.boolean(),
  files: z.array(batchFileSchema),
});
export const batchListSchema = z.object({ batches: z.array(batchHead) });
export const batchAnnouncedSchema = z.object({
  batchId: z.string(),
  mailWanted: z.boolean(),
  /** In the order in which they were given. */
  fileIds: z.array(z.string()),
});
export const batchMailAnswerSchema = z.object({ batchId: z.string(), mailWanted: z.boolean() });
export const batchFileAnswerSchema = z.object({ fileId: z.string(), state: batchFileSchema.shape.state });
export const leaveOutAnswerSchema = z.object({ leftOut: z.number() });

export const batchSampleSchema = z.object({
  id: z.string(),
  reportId: z.string(),
  fileName: z.string(),
  printedName: z.string().nullable(),
  fieldName: z.string().nullable(),
  labNumber: z.string().nullable(),
  takenOn: z.string().nullable(),
  sampledPrinted: z.string().nullable(),
  plotId: z.string().nullable(),
  /** A plot that would fit, and why. Nothing is assigned by it. */
  proposal: z
    .object({ plotId: z.string(), because: z.enum(['same-name', 'confirmed-before', 'name-inside']) })
    .nullable(),
  leftOut: z.boolean(),
  version: z.number(),
});
export const batchSamplesSchema = z.object({
  samples: z.array(batchSampleSchema),
  plots: z.array(z.object({ id: z.string(), name: z.string() })),
});
export const plotOutcomesSchema = z.object({
  outcomes: z.array(
    z.object({
      reportSampleId: z.string(),
      kind: z.enum(['saved', 'stale', 'refused']),
      sentence: z.string().nullable(),
    }),
  ),
});

export type Batch = z.infer<typeof batchSchema>;
export type BatchHead = z.infer<typeof batchHead>;
export type BatchList = z.infer<typeof batchListSchema>;
export type BatchFile = z.infer<typeof batchFileSchema>;
export type BatchCounts = z.infer<typeof batchCountsSchema>;
export type BatchAnnounced = z.infer<typeof batchAnnouncedSchema>;
export type BatchSample = z.infer<typeof batchSampleSchema>;
export type BatchSamples = z.infer<typeof batchSamplesSchema>;
export type PlotOutcomes = z.infer<typeof plotOutcomesSchema>;

/** Where a report stands in its batch: "3 of 40", and which one is next. */
export type BatchPlace = {
  batchId: string;
  position: number;
  of: number;
  toReview: number;
  next: { reportId: string; fileName: string } | null;
  before: { reportId: string; fileName: string } | null;
};

export type FileStage = Exclude<keyof BatchCounts, 'files'>;

const OF_REPORT: Record<Report['state'], FileStage> = {
  received: 'beingRead',
  reading: 'beingRead',
  'in-review': 'toReview',
  unreadable: 'notRead',
  'not-soil': 'notRead',
  confirmed: 'confirmed',
  'set-aside': 'setAside',
};

/** How far one file of a batch is, as the counts have it. */
export function fileStage(file: { state: BatchFile['state']; report: { state: Report['state'] } | null }): FileStage {
  if (file.state === 'announced') return 'missing';
  if (file.state === 'refused' || file.state === 'left-out') return 'notTaken';
  return file.report === null ? 'beingRead' : OF_REPORT[file.report.state];
}

export function countFiles(files: readonly Parameters<typeof fileStage>[0][]): BatchCounts {
  const counts: BatchCounts = {
    files: files.length,
    missing: 0,
    beingRead: 0,
    toReview: 0,
    confirmed: 0,
    notRead: 0,
    setAside: 0,
    notTaken: 0,
  };
  for (const file of files) counts[fileStage(file)] += 1;
  return counts;
}
