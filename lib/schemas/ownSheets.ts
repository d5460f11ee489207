import { z } from 'zod';
import { ANALYTE_KEYS, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import { decimalSchema, idSchema, lineSchema, momentSchema, remarkSchema, versionSchema } from './parts';
import { reportSchema } from './reports';

const unitSchema = z.string().refine(isUnitKey, 'This unit is not on the list.').nullable();
const methodSchema = z.string().refine(isMethodKey, 'This method is not on the list.').nullable();
const depthUnitSchema = z.enum(['in', 'cm']).nullable();

export const SHEET_FORMS = ['element', 'P2O5', 'K2O', 'NO3', 'SO4', 'CaO', 'MgO'] as const;

/** What a person says a column holds. */
export const columnMeaningSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('skip') }),
  z.strictObject({ kind: z.literal('sample-name') }),
  z.strictObject({ kind: z.literal('field-name') }),
  z.strictObject({ kind: z.literal('lab-number') }),
  z.strictObject({ kind: z.literal('laboratory') }),
  z.strictObject({ kind: z.literal('date-sampled') }),
  z.strictObject({ kind: z.literal('depth'), unit: depthUnitSchema }),
  z.strictObject({ kind: z.literal('depth-top'), unit: depthUnitSchema }),
  z.strictObject({ kind: z.literal('depth-bottom'), unit: depthUnitSchema }),
  z.strictObject({
    kind: z.literal('result'),
    analyte: z.enum(ANALYTE_KEYS, 'This analyte is not on the list.'),
    unit: unitSchema,
    form: z.enum(SHEET_FORMS).nullable(),
    method: methodSchema,
  }),
  z.strictObject({ kind: z.literal('analyte') }),
  z.strictObject({ kind: z.literal('value') }),
  z.strictObject({ kind: z.literal('unit') }),
  z.strictObject({ kind: z.literal('method') }),
]);
export const DATE_ORDERS = ['day-first', 'month-first', 'unknown'] as const;

/** Where the headings stand and what the columns hold; headings and cells themselves are never taken from a client. */
const choiceSchema = z.strictObject({
  sheet: z.number().int().min(1).max(1000),
  dateOrder: z.enum(DATE_ORDERS),
  columns: z
    .array(z.strictObject({ column: z.number().int().min(1).max(1000), meaning: columnMeaningSchema }))
    .max(1000),
});
export const mapSheetInput = z.strictObject({
  reportId: idSchema,
  /** Another sheet of the workbook is looked at anew; columns are then proposed. */
  ...choiceSchema.partial({ columns: true }).shape,
});
export const importSheetInput = z.strictObject({
  reportId: idSchema,
  /** Of the report; a second click or a second person is told. */
  version: versionSchema,
  ...choiceSchema.shape,
  /** For each name of the sheet its plot; a name without one is left out. */
  plots: z.array(z.strictObject({ name: lineSchema(200, 'A name is empty.'), plotId: idSchema.nullable() })).max(500),
});

export const mappingSchema = z.object({
  layout: z.enum(['sample-per-row', 'number-per-row']),
  sheet: z.number(),
  headingRow: z.number(),
  dateOrder: z.enum(DATE_ORDERS),
  decimalComma: z.boolean(),
  columns: z.array(
    z.object({
      column: z.number(),
      heading: z.string(),
      examples: z.array(z.string()),
      meaning: columnMeaningSchema,
    }),
  ),
});
const previewRowSchema = z.object({
  analyte: z.string(),
  printed: z.string(),
  unit: z.string().nullable(),
  method: z.string().nullable(),
  form: z.string().nullable(),
  /** Why this number cannot be taken. */
  impossible: z.string().nullable(),
});
export const sheetSampleSchema = z.object({
  /** The name by which its plot is chosen. */
  name: z.string(),
  takenOn: z.string().nullable(),
  depthFromCm: decimalSchema.nullable(),
  depthToCm: decimalSchema.nullable(),
  results: z.array(previewRowSchema),
});
export const sheetProblemSchema = z.object({
  row: z.number(),
  column: z.number().nullable(),
  text: z.string(),
  code: z.string(),
  sentence: z.string(),
  leftOut: z.boolean(),
});
export const ownSheetSchema = z.object({
  report: reportSchema,
  sheets: z.array(z.object({ number: z.number(), name: z.string().nullable(), rows: z.number() })),
  mapping: mappingSchema.nullable(),
  /** When the same headings were mapped before. */
  rememberedOn: momentSchema.nullable(),
  doubts: z.array(remarkSchema),
  counts: z.object({ rows: z.number(), samples: z.number(), results: z.number(), leftOut: z.number() }),
  /** Of a long sheet the first ones; the counts are of all. */
  samples: z.array(sheetSampleSchema),
  problems: z.array(sheetProblemSchema),
  problemCount: z.number(),
  /** Each name of the sheet once, with the plot it seems to be. */
  names: z.array(
    z.object({ name: z.string(), samples: z.number(), withoutDay: z.number(), plotId: z.string().nullable() }),
  ),
  plots: z.array(z.object({ id: z.string(), name: z.string() })),
});
export const sheetImportedSchema = z.object({
  reportId: z.string(),
  state: z.literal('confirmed'),
  version: z.number(),
  samples: z.number(),
  results: z.number(),
  /** Samples that a confirmed report already holds; they count once. */
  known: z.number(),
  leftOut: z.number(),
  plotIds: z.array(z.string()),
});

export type ColumnMeaningInput = z.infer<typeof columnMeaningSchema>;
export type OwnSheet = z.infer<typeof ownSheetSchema>;
export type SheetMapping = z.infer<typeof mappingSchema>;
export type SheetImported = z.infer<typeof sheetImportedSchema>;
