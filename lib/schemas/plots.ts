import { z } from 'zod';
import { outlineSchema } from './outline';
import { daySchema, decimalSchema, idSchema, lineSchema, momentSchema, notesSchema, versionSchema } from './parts';

const nameSchema = lineSchema(80, 'Give the plot a name.');
const areaM2Schema = z
  .number()
  .gt(0, 'The area must be more than nothing.')
  .max(1_000_000, 'That is more than 100 hectares.');
const textureSchema = z.enum(['light', 'medium', 'heavy']);
const targetSetKeySchema = lineSchema(80, 'Choose a target set.');
const yearSchema = z.coerce.number().int().min(1950).max(2100);

const facts = {
  /** null: the plot has no outline and stands in the list with its typed area. */
  outline: outlineSchema.nullable(),
  /** Typed wins over the outline. */
  areaTypedM2: areaM2Schema.nullable(),
  texture: textureSchema.nullable(),
  established: z.boolean(),
  freeLimeSeen: z.boolean(),
  /** A built-in set or one of the site's own. */
  targetSetKey: targetSetKeySchema.nullable(),
  notes: notesSchema(4000),
};

export const listPlotsInput = z.strictObject({ archived: z.enum(['yes', 'no']).default('no') });
export const plotInput = z.strictObject({ plotId: idSchema });
export const createPlotInput = z.strictObject({
  name: nameSchema,
  outline: facts.outline.default(null),
  areaTypedM2: facts.areaTypedM2.default(null),
  texture: facts.texture.default(null),
  established: facts.established.default(true),
  freeLimeSeen: facts.freeLimeSeen.default(false),
  targetSetKey: facts.targetSetKey.default(null),
  notes: facts.notes.default(''),
});
/** What is left out stays as it is. */
export const updatePlotInput = z.strictObject({
  plotId: idSchema,
  version: versionSchema,
  name: nameSchema.optional(),
  outline: facts.outline.optional(),
  areaTypedM2: facts.areaTypedM2.optional(),
  texture: facts.texture.optional(),
  established: facts.established.optional(),
  freeLimeSeen: facts.freeLimeSeen.optional(),
  targetSetKey: facts.targetSetKey.optional(),
  notes: facts.notes.optional(),
});
export const plotVersionInput = z.strictObject({ plotId: idSchema, version: versionSchema });
export const setPlantingInput = z.strictObject({
  plotId: idSchema,
  year: yearSchema,
  crop: lineSchema(80, 'Which crop?'),
  targetSetKey: targetSetKeySchema.nullable().default(null),
  plannedOn: daySchema.nullable().default(null),
});
export const unsetPlantingInput = z.strictObject({ plotId: idSchema, year: yearSchema });

export const plantingSchema = z.object({
  id: z.string(),
  /** The calendar year of harvest. */
  year: z.number(),
  crop: z.string(),
  targetSetKey: z.string().nullable(),
  plannedOn: z.string().nullable(),
});

export const plotSchema = z.object({
  id: z.string(),
  name: z.string(),
  outline: z.array(z.object({ x: z.number(), y: z.number() })).nullable(),
  outlineSince: z.string().nullable(),
  areaTypedM2: z.number().nullable(),
  /** null while there is neither an outline nor a typed area. */
  area: z.object({ m2: z.number(), from: z.enum(['typed', 'outline']) }).nullable(),
  texture: textureSchema.nullable(),
  established: z.boolean(),
  freeLimeSeen: z.boolean(),
  targetSetKey: z.string().nullable(),
  notes: z.string(),
  archivedAt: momentSchema.nullable(),
  version: z.number(),
  /** This year's. */
  planting: plantingSchema.nullable(),
  /** From confirmed results only; ph is the pH in water of the newest test that has one. */
  lastTest: z
    .object({
      takenOn: z.string(),
      ph: z.object({ takenOn: z.string(), value: decimalSchema.nullable(), printed: z.string() }).nullable(),
    })
    .nullable(),
});
export const plotListSchema = z.object({ plots: z.array(plotSchema), year: z.number() });
export const plotDetailSchema = plotSchema.extend({ plantings: z.array(plantingSchema) });

export type Plot = z.infer<typeof plotSchema>;
export type PlotList = z.infer<typeof plotListSchema>;
export type PlotDetail = z.infer<typeof plotDetailSchema>;
export type Planting = z.infer<typeof plantingSchema>;
