import { z } from 'zod';
import { daySchema, idSchema } from './parts';

export const REMINDER_KINDS = ['after-lime', 'after-sulfur', 'yearly-same-season'] as const;

export const setRuleInput = z.strictObject({ plotId: idSchema, kind: z.enum(REMINDER_KINDS), active: z.boolean() });

export const ruleAnswer = z.object({
  id: idSchema,
  plotId: idSchema,
  plotName: z.string(),
  kind: z.enum(REMINDER_KINDS),
  active: z.boolean(),
  /** null: the rule has nothing to count from yet; `why` says what is missing. */
  dueOn: z.string().nullable(),
  why: z.string(),
});
export const rulesAnswer = z.object({ rules: z.array(ruleAnswer) });
export type RuleAnswer = z.infer<typeof ruleAnswer>;

export const dueAnswer = z.object({
  id: idSchema,
  siteId: idSchema,
  siteName: z.string(),
  plotId: idSchema,
  plotName: z.string(),
  kind: z.enum(REMINDER_KINDS),
  dueOn: z.string(),
  reason: z.string(),
  /** Days from today; negative once it has passed. */
  inDays: z.number().int(),
  snoozedUntil: z.string().nullable(),
  mayClose: z.boolean(),
});
export type DueAnswer = z.infer<typeof dueAnswer>;
export const dueListAnswer = z.object({ today: z.string(), due: z.array(dueAnswer) });

/** What a person may choose to get or not; mail about the account itself is not optional. */
export const mailPreferencesAnswer = z.object({
  preferences: z.array(z.object({ kind: z.string(), wanted: z.boolean() })),
});
export type MailPreferences = z.infer<typeof mailPreferencesAnswer>;

export const closeReminderInput = z.strictObject({ reminderId: idSchema });
export const snoozeInput = z.strictObject({ reminderId: idSchema, until: daySchema });

export const mailTokenInput = z.strictObject({ token: z.string().min(20).max(100) });
export const mailActionInput = z.strictObject({
  token: z.string().min(20).max(100),
  reminderId: idSchema,
  action: z.enum(['snooze-two-weeks', 'already-sampled']),
});
export const mailActionsAnswer = z.object({
  name: z.string(),
  reminders: z.array(dueAnswer.omit({ inDays: true, snoozedUntil: true }).extend({ open: z.boolean() })),
});
export const doneAnswer = z.object({ done: z.literal(true) });
