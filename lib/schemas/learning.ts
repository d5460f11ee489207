import { z } from 'zod';
import { daySchema, idSchema } from './parts';

/** Any row of a layout stands for the whole of it. */
export const layoutInput = z.strictObject({ layoutId: idSchema });

export const learntLayoutSchema = z.object({
  id: z.string(),
  fingerprint: z.string(),
  laboratory: z.string().nullable(),
  shape: z.enum(['page-across', 'page-down', 'data-across', 'data-down']),
  /** The confirmed reports that taught it, newest first. */
  reports: z.array(z.object({ reportId: z.string(), fileName: z.string().nullable(), confirmedOn: daySchema })),
  lessons: z.array(
    z.object({
      label: z.string(),
      analyte: z.string(),
      method: z.string().nullable(),
      unit: z.string().nullable(),
      form: z.string().nullable(),
      on: daySchema,
    }),
  ),
});
export const layoutListSchema = z.object({ layouts: z.array(learntLayoutSchema) });
export const forgottenLayoutSchema = z.object({ forgotten: z.number() });

/** On a row of a review: the confirmation it leans on and the cells that confirmation filled. */
export const learntSchema = z.object({ on: z.string(), filled: z.array(z.string()) });

export type LearntLayout = z.infer<typeof learntLayoutSchema>;
export type LayoutList = z.infer<typeof layoutListSchema>;
export type ForgottenLayout = z.infer<typeof forgottenLayoutSchema>;
