import { z } from 'zod';
import { isAnalyteKey } from '@/lib/domain/analytes';
import { daySchema, idSchema, lineSchema, notesSchema } from './parts';

export const AMOUNT_UNITS = ['lb', 'oz', 'kg', 'g'] as const;
export type AmountUnit = (typeof AMOUNT_UNITS)[number];

/** By definition: 1 lb = 0.45359237 kg exactly. */
export const KG_PER: Record<AmountUnit, number> = { lb: 0.45359237, oz: 0.45359237 / 16, kg: 1, g: 0.001 };

const analyteSchema = z.string().refine(isAnalyteKey, 'This is not an analyte Loamline knows.');
/** May be empty: said or not said. */
const shortSchema = notesSchema(120).transform((text) => text.replace(/\s+/g, ' ').trim());
const reasonSchema = lineSchema(300, 'Say why in a few words; the history keeps it.').refine(
  (text) => text.length >= 3,
  'Say why in a few words; the history keeps it.',
);
const positive = (most: number, sentence: string) => z.number(sentence).positive(sentence).max(most, sentence);

export const intentSchema = z.strictObject({
  analyte: analyteSchema,
  unit: lineSchema(40, 'The unit is empty.').nullable(),
  /** Signed change once the reaction is complete. */
  fullChange: z
    .number('Give the change meant, with its sign: -0.5 lowers pH by half a unit.')
    .min(-100000)
    .max(100000)
    .refine((change) => change !== 0, 'A change of nothing cannot be checked.'),
  low: z.number().min(-100000).max(100000).nullable(),
  high: z.number().min(-100000).max(100000).nullable(),
  source: notesSchema(300),
});

export const materialSchema = z.union([
  z.strictObject({ key: z.string().min(1).max(80) }),
  z.strictObject({
    name: lineSchema(120, 'Name the material.'),
    reaction: z.enum(['sulfur', 'lime', 'soluble-salt']).nullable(),
    affects: z.array(analyteSchema).max(40),
  }),
]);

export const applicationFields = {
  material: materialSchema,
  amount: positive(100000, 'Give the amount spread, more than nothing.'),
  amountUnit: z.enum(AMOUNT_UNITS),
  /** What the plan asked for, when it was another amount than was spread. */
  plannedAmount: positive(100000, 'Give the planned amount, more than nothing.').optional(),
  appliedOn: daySchema,
  areaM2: positive(1000000, 'Give the area, more than nothing.').optional(),
  depthCm: z.number().min(0).max(100, 'Deeper than a metre is not spreading.').optional(),
  method: shortSchema.optional(),
  soilCondition: shortSchema.optional(),
  note: notesSchema(2000).optional(),
};

export const recordApplicationInput = z.strictObject({
  plotId: idSchema,
  ...applicationFields,
  intents: z.array(intentSchema).max(12),
});

export const correctApplicationInput = z.strictObject({
  applicationId: idSchema,
  ...applicationFields,
  reason: reasonSchema,
});

export const removeApplicationInput = z.strictObject({
  applicationId: idSchema,
  reason: reasonSchema,
});

export const applicationAnswer = z.object({
  id: idSchema,
  plotId: idSchema,
  planId: idSchema,
  material: z.object({
    key: z.string(),
    name: z.string(),
    reaction: z.enum(['sulfur', 'lime', 'soluble-salt']).nullable(),
    affects: z.array(z.string()),
  }),
  amountKg: z.number(),
  amountPrinted: z.string(),
  plannedKg: z.number(),
  areaM2: z.number(),
  appliedOn: z.string(),
  depthCm: z.number().nullable(),
  method: z.string(),
  soilCondition: z.string(),
  note: z.string(),
  recordedBy: idSchema,
  recordedByName: z.string().nullable(),
  mine: z.boolean(),
  intents: z.array(
    z.object({
      id: idSchema,
      analyte: z.string(),
      unit: z.string().nullable(),
      fullChange: z.number(),
      low: z.number().nullable(),
      high: z.number().nullable(),
      source: z.string(),
    }),
  ),
});
export type ApplicationAnswer = z.infer<typeof applicationAnswer>;
export const applicationsAnswer = z.object({ applications: z.array(applicationAnswer) });

export const suggestChangeInput = z.strictObject({
  plotId: idSchema,
  material: z.string().min(1).max(80),
  amount: z.coerce.number().positive().max(100000),
  amountUnit: z.enum(AMOUNT_UNITS),
  areaM2: z.coerce.number().positive().max(1000000).optional(),
  depthCm: z.coerce.number().min(0).max(100).optional(),
});
export const suggestChangeAnswer = z.object({
  suggestions: z.array(
    z.object({
      analyte: z.string(),
      unit: z.string(),
      likely: z.number(),
      low: z.number(),
      high: z.number(),
      source: z.string(),
      weakSource: z.boolean(),
    }),
  ),
  /** Why there is none. */
  sentence: z.string().nullable(),
});
export type SuggestChangeAnswer = z.infer<typeof suggestChangeAnswer>;
