import { z } from 'zod';
import { idSchema, momentSchema } from './parts';

export const askCopyInput = z.strictObject({ reportId: idSchema, page: z.number().int().min(1).max(1000) });
export const copyInput = z.strictObject({ reportId: idSchema, copyId: idSchema });

export const copySchema = z.object({
  id: z.string(),
  reportId: z.string(),
  page: z.number(),
  state: z.enum(['asked', 'ready', 'failed', 'thrown-away']),
  /** Why it could not be made. */
  sentence: z.string().nullable(),
  wordsKept: z.number().nullable(),
  wordsMasked: z.number().nullable(),
  askedAt: momentSchema,
});
export type PageCopy = z.infer<typeof copySchema>;
