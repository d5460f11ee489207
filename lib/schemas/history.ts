import { z } from 'zod';
import { idSchema } from './parts';

const point = z.object({
  id: idSchema,
  takenOn: z.string(),
  value: z.number(),
  unit: z.string(),
  printed: z.string(),
  qualifier: z.enum(['exact', 'below', 'above']),
  low: z.number().nullable(),
  high: z.number().nullable(),
  method: z.string(),
  laboratory: z.string(),
  depth: z.string(),
  breakBefore: z.string().nullable(),
  reportId: idSchema.nullable(),
});

export const seriesAnswer = z.object({
  analyte: z.string(),
  label: z.string(),
  unit: z.string(),
  isPh: z.boolean(),
  decimals: z.number(),
  points: z.array(point),
  band: z
    .object({ low: z.number().nullable(), high: z.number().nullable(), label: z.string(), source: z.string() })
    .nullable(),
  /** What can honestly be said of the movement, one sentence each. */
  trend: z.array(z.string()),
});
export type SeriesAnswer = z.infer<typeof seriesAnswer>;

export const historyAnswer = z.object({
  today: z.string(),
  plot: z.object({ id: idSchema, name: z.string() }),
  series: z.array(seriesAnswer),
  amendments: z.array(z.object({ id: idSchema, on: z.string(), label: z.string(), detail: z.string() })),
});
export type HistoryAnswer = z.infer<typeof historyAnswer>;
