import { z } from 'zod';
import { ANALYTE_KEYS } from '@/lib/domain/analytes';
import { daySchema, decimalSchema, idSchema, lineSchema, momentSchema } from './parts';
import { QUALIFIER_WORDS } from './review';

/** Live results: confirmed and not superseded. */
export const listResultsInput = z.strictObject({
  plotId: idSchema.optional(),
  analyte: z.enum(ANALYTE_KEYS).optional(),
  from: daySchema.optional(),
  to: daySchema.optional(),
});
export const latestResultsInput = z.strictObject({ plotId: idSchema.optional() });
export const correctResultInput = z.strictObject({
  resultId: idSchema,
  /** As typed: "6.4", "<0.1", "nd". */
  value: z.string().trim().min(1, 'Enter the right value.').max(40),
  reason: lineSchema(500, 'Say why, in a few words: it stays with the result.'),
});

export const resultSchema = z.object({
  id: z.string(),
  sampleId: z.string(),
  reportId: z.string(),
  analysis: z.number(),
  composite: z.number(),
  plotId: z.string(),
  takenOn: z.string(),
  depthFromCm: decimalSchema.nullable(),
  depthToCm: decimalSchema.nullable(),
  laboratory: z.object({ id: z.string(), name: z.string() }).nullable(),
  analyte: z.string(),
  method: z.string().nullable(),
  form: z.string().nullable(),
  unit: z.string().nullable(),
  unitBasis: z.enum(['mass', 'volume', 'area', 'charge', 'share', 'index', 'none']),
  value: decimalSchema.nullable(),
  /** mg/kg where the unit, or unit and depth, allow it; null where they do not. */
  valueSi: decimalSchema.nullable(),
  qualifier: z.enum(QUALIFIER_WORDS),
  printed: z.string(),
  unitPrinted: z.string().nullable(),
  confirmedBy: z.string().nullable(),
  confirmedAt: momentSchema,
  supersedesId: z.string().nullable(),
  correctionReason: z.string().nullable(),
});
export const resultListSchema = z.object({ results: z.array(resultSchema) });

export type Result = z.infer<typeof resultSchema>;
export type ResultList = z.infer<typeof resultListSchema>;
