import { z } from 'zod';
import type { CompareOutcome, EffectOutcome } from '@/lib/domain/effects';
import { idSchema } from './parts';

/** Outcomes are the domain's own types: computed when read, never taken from a client. */
const outcomeOf = <T>() => z.custom<T>((value) => typeof value === 'object' && value !== null && 'ok' in value);

export const effectCheckAnswer = z.object({
  key: z.string(),
  plotId: idSchema,
  plotName: z.string(),
  analyte: z.string(),
  analyteLabel: z.string(),
  decimals: z.number(),
  applications: z.array(
    z.object({
      id: idSchema,
      material: z.string(),
      amountPrinted: z.string(),
      appliedOn: z.string(),
      fullChange: z.number(),
    }),
  ),
  outcome: outcomeOf<EffectOutcome>(),
  /** What stood here before, newest first, when data or the rule changed it. */
  earlier: z.array(z.object({ verdict: z.string(), computedAt: z.string() })),
});
export type EffectCheckAnswer = z.infer<typeof effectCheckAnswer>;
export const effectsAnswer = z.object({ today: z.string(), checks: z.array(effectCheckAnswer) });
export type EffectsAnswer = z.infer<typeof effectsAnswer>;

export const compareInput = z.strictObject({
  analyte: z.string().max(60),
  a: idSchema,
  b: idSchema,
});
const compared = z.object({
  resultId: idSchema,
  plotId: idSchema,
  plotName: z.string(),
  takenOn: z.string(),
  value: z.number(),
  unit: z.string(),
  qualifier: z.enum(['exact', 'below', 'above', 'below-unknown']),
  method: z.string().nullable(),
  laboratory: z.string().nullable(),
  low: z.number().nullable(),
  high: z.number().nullable(),
});
export const compareAnswer = z.object({
  analyte: z.string(),
  analyteLabel: z.string(),
  decimals: z.number(),
  a: compared,
  b: compared,
  outcome: outcomeOf<CompareOutcome>(),
});
export type CompareAnswer = z.infer<typeof compareAnswer>;
