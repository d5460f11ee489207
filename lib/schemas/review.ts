import { z } from 'zod';
import { ANALYTE_KEYS, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import { learntSchema } from './learning';
import { daySchema, decimalSchema, idSchema, lineSchema, momentSchema, remarkSchema, versionSchema } from './parts';
import { plotSchema } from './plots';
import { laboratorySchema, reportSchema } from './reports';

export const QUALIFIER_WORDS = ['=', '<', '>', 'nd', 'trace'] as const;

const analyteSchema = z.enum(ANALYTE_KEYS, 'This analyte is not on the list.');
const unitSchema = z.string().refine(isUnitKey, 'This unit is not on the list.').nullable();
const methodSchema = z.string().refine(isMethodKey, 'This method is not on the list.').nullable();
const formSchema = z.string().max(12).nullable();
/** The cell as typed: "6.4", "6,4", "<0.1", "nd", "trace". */
const valueText = z.string().trim().max(40, 'A value is at most 40 characters long.');

const cells = {
  analyte: analyteSchema.optional(),
  value: valueText.optional(),
  unit: unitSchema.optional(),
  method: methodSchema.optional(),
  form: formSchema.optional(),
};

export const editRowInput = z.strictObject({ reportId: idSchema, rowId: idSchema, version: versionSchema, ...cells });
/** A paste: each row with its own version; a row is saved whole or not at all, whatever happens to its neighbours. */
export const editRowsInput = z.strictObject({
  reportId: idSchema,
  edits: z
    .array(z.strictObject({ rowId: idSchema, version: versionSchema, ...cells }))
    .min(1)
    .max(500),
});
export const rowVersionInput = z.strictObject({ reportId: idSchema, rowId: idSchema, version: versionSchema });
export const addRowInput = z.strictObject({
  reportId: idSchema,
  reportSampleId: idSchema,
  analyte: analyteSchema.nullable().default(null),
  value: valueText.default(''),
  unit: unitSchema.default(null),
  method: methodSchema.default(null),
  form: formSchema.default(null),
});

const depth = z.number().min(0).max(300, 'Deeper than 3 m is not taken.');
/** What is left out stays as it is. */
export const setSampleInput = z.strictObject({
  reportId: idSchema,
  reportSampleId: idSchema,
  version: versionSchema,
  plotId: idSchema.nullable().optional(),
  takenOn: daySchema.nullable().optional(),
  depthFromCm: depth.nullable().optional(),
  depthToCm: depth.nullable().optional(),
  cores: z.number().int().min(1).max(500).nullable().optional(),
  /** 2: the second bag of a plot and day, a field duplicate. */
  composite: z.number().int().min(1).max(9).optional(),
  /** A reason leaves the sample out; null takes it in again. */
  leftOutReason: lineSchema(300, 'Say why it is left out.').nullable().optional(),
});
export const addSampleInput = z.strictObject({
  reportId: idSchema,
  name: lineSchema(120, 'Give the sample a name.').nullable().default(null),
  labNumber: lineSchema(60, 'The laboratory number is empty.').nullable().default(null),
  plotId: idSchema.nullable().default(null),
  takenOn: daySchema.nullable().default(null),
});
export const setSameAsInput = z.strictObject({
  reportId: idSchema,
  reportSampleId: idSchema,
  version: versionSchema,
  /** The sample of another report that is the same analysis in another form; null: it is an analysis of its own. */
  sameAsId: idSchema.nullable(),
});
export const confirmInput = z.strictObject({
  reportId: idSchema,
  /** Samples that look like an analysis which is already confirmed but are a second analysis of the same bag. */
  separateAnalyses: z.array(idSchema).max(200).default([]),
});

export const boxSchema = z.tuple([z.number(), z.number(), z.number(), z.number()]);
export const rowSchema = z.object({
  id: z.string(),
  reportSampleId: z.string(),
  ordinal: z.number(),
  analyte: z.string().nullable(),
  label: z.string(),
  /** The cell's characters: as the page has them, or as typed once it was edited. */
  printed: z.string(),
  value: decimalSchema.nullable(),
  qualifier: z.enum(QUALIFIER_WORDS),
  unit: z.string().nullable(),
  unitPrinted: z.string().nullable(),
  form: z.string().nullable(),
  method: z.string().nullable(),
  methodPrinted: z.string().nullable(),
  rating: z.string().nullable(),
  isPrimary: z.boolean(),
  page: z.number().nullable(),
  box: boxSchema.nullable(),
  cell: z
    .object({ sheet: z.union([z.string(), z.number()]).nullable(), row: z.number(), column: z.number() })
    .nullable(),
  confidence: z.number().nullable(),
  /** The earlier confirmation of this layout that the row leans on. */
  learnt: learntSchema.nullable(),
  doubts: z.array(remarkSchema),
  /** Worth a look: it has a doubt, or the reader was not sure and nobody has checked it. */
  doubtful: z.boolean(),
  /** Why this row cannot be confirmed as it stands. */
  impossible: z.string().nullable(),
  state: z.enum(['proposed', 'edited', 'added', 'removed']),
  /** What the page says, once the row was edited. */
  original: z
    .object({
      analyte: z.string().nullable(),
      printed: z.string(),
      value: decimalSchema.nullable(),
      qualifier: z.enum(QUALIFIER_WORDS),
      unit: z.string().nullable(),
      method: z.string().nullable(),
      form: z.string().nullable(),
    })
    .nullable(),
  version: z.number(),
  editedBy: z.string().nullable(),
  editedAt: momentSchema.nullable(),
});

const differenceSchema = z.object({
  analyte: z.string(),
  unit: z.string().nullable(),
  rowId: z.string().nullable(),
  here: z.string().nullable(),
  there: z.string().nullable(),
  /** The side that repeats the sample above it, where the other one does not. */
  repeats: z.enum(['here', 'there']).nullable(),
});
/** One sample of another report that may be the same analysis, compared cell by cell. */
export const otherFormSchema = z.object({
  reportSampleId: z.string(),
  reportId: z.string(),
  reportState: z.string(),
  fileName: z.string().nullable(),
  printedName: z.string().nullable(),
  labNumber: z.string().nullable(),
  takenOn: z.string().nullable(),
  /** Cells that both have, and how many of them say the same. */
  shared: z.number(),
  equal: z.number(),
  /** Only the cells that differ or that one side lacks. */
  differences: z.array(differenceSchema),
});
export const reviewSampleSchema = z.object({
  id: z.string(),
  ordinal: z.number(),
  printedName: z.string().nullable(),
  labNumber: z.string().nullable(),
  fieldName: z.string().nullable(),
  sampledPrinted: z.string().nullable(),
  reportedOn: z.string().nullable(),
  reportedPrinted: z.string().nullable(),
  plotId: z.string().nullable(),
  takenOn: z.string().nullable(),
  depthFromCm: decimalSchema.nullable(),
  depthToCm: decimalSchema.nullable(),
  cores: z.number().nullable(),
  composite: z.number(),
  leftOutReason: z.string().nullable(),
  sameAsId: z.string().nullable(),
  version: z.number(),
  /** The form it was marked the same as, with the differences. */
  sameAs: otherFormSchema.nullable(),
  /** Samples of other reports that look like the same analysis and were not chosen. */
  candidates: z.array(otherFormSchema),
});
export const recommendationSchema = z.object({
  id: z.string(),
  reportSampleId: z.string().nullable(),
  item: z.string(),
  amount: decimalSchema.nullable(),
  printed: z.string(),
  unit: z.string().nullable(),
  page: z.number().nullable(),
  box: boxSchema.nullable(),
});
/** What stands between this review and its confirmation. */
export const blockerSchema = z.object({
  code: z.enum([
    'no-samples',
    'no-plot',
    'no-day',
    'impossible',
    'no-analyte',
    'no-value',
    'twice',
    'same-analysis',
    'same-as-open',
  ]),
  sentence: z.string(),
  reportSampleId: z.string().nullable(),
  rowId: z.string().nullable(),
});
export const reviewSchema = z.object({
  report: reportSchema,
  samples: z.array(reviewSampleSchema),
  /** Sample by sample, doubtful rows first; removed rows last. */
  rows: z.array(rowSchema),
  recommendations: z.array(recommendationSchema),
  plots: z.array(plotSchema),
  laboratories: z.array(laboratorySchema),
  blockers: z.array(blockerSchema),
});
export const rowOutcomeSchema = z.object({
  rowId: z.string(),
  outcome: z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('saved'), row: rowSchema }),
    /** Somebody else saved this row first: theirs is `current`. */
    z.object({ kind: z.literal('stale'), sentence: z.string(), current: rowSchema }),
    z.object({ kind: z.literal('refused'), sentence: z.string() }),
  ]),
});
export const rowOutcomesSchema = z.object({ outcomes: z.array(rowOutcomeSchema) });
export const reviewSampleAnswerSchema = reviewSampleSchema.omit({ sameAs: true, candidates: true });
export const confirmAnswerSchema = z.object({
  reportId: z.string(),
  state: z.literal('confirmed'),
  results: z.number(),
  plotIds: z.array(z.string()),
});

export type Review = z.infer<typeof reviewSchema>;
export type ReviewRow = z.infer<typeof rowSchema>;
export type ReviewSample = z.infer<typeof reviewSampleSchema>;
export type RowOutcome = z.infer<typeof rowOutcomeSchema>;
export type Blocker = z.infer<typeof blockerSchema>;
export type OtherForm = z.infer<typeof otherFormSchema>;
