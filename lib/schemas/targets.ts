import { z } from 'zod';
import { ANALYTE_KEYS, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import { daySchema, decimalSchema, lineSchema, versionSchema } from './parts';

const bound = z.number().min(0).max(1_000_000);

const bandInput = z
  .strictObject({
    analyte: z.enum(ANALYTE_KEYS),
    low: bound,
    high: bound,
    unit: z.string().refine(isUnitKey, 'This unit is not on the list.').nullable().default(null),
    method: z.string().refine(isMethodKey, 'This method is not on the list.').nullable().default(null),
  })
  .refine((band) => band.low <= band.high, 'The lower end must not be above the upper end.')
  .refine((band) => band.unit !== 'pH' || band.high <= 14, 'pH ends at 14.');

const setFacts = {
  name: lineSchema(80, 'Give the target set a name.'),
  /** The first day on which this version counts; today when left out. */
  validFrom: daySchema.optional(),
  bands: z
    .array(bandInput)
    .min(1, 'A target set needs at least one band.')
    .max(60)
    .refine((bands) => new Set(bands.map((band) => band.analyte)).size === bands.length, 'Each analyte once.'),
};

export const createTargetSetInput = z.strictObject(setFacts);
/** An edit is a new version; `version` is the one that was on screen. */
export const editTargetSetInput = z.strictObject({
  targetKey: z.string().max(80),
  version: versionSchema,
  ...setFacts,
});

export const bandSchema = z.object({
  analyte: z.string(),
  low: decimalSchema,
  high: decimalSchema,
  unit: z.string().nullable(),
  method: z.string().nullable(),
});
export const ownTargetSetSchema = z.object({
  key: z.string(),
  id: z.string(),
  version: z.number(),
  name: z.string(),
  validFrom: z.string(),
  bands: z.array(bandSchema),
});
export const builtInTargetSetSchema = z.object({
  key: z.string(),
  name: z.string(),
  source: z.string(),
  /** What was looked for and not found in print. */
  gaps: z.string(),
  bands: z.array(bandSchema.extend({ low: decimalSchema.nullable(), high: decimalSchema.nullable() })),
});
/** `own` holds the newest version of each set. */
export const targetListSchema = z.object({
  builtIn: z.array(builtInTargetSetSchema),
  own: z.array(ownTargetSetSchema),
});

export type OwnTargetSet = z.infer<typeof ownTargetSetSchema>;
export type TargetList = z.infer<typeof targetListSchema>;
