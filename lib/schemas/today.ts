import { z } from 'zod';
import { VERDICTS } from '@/lib/domain/effects';
import { batchListSchema } from './batches';
import { idSchema, momentSchema } from './parts';
import { dueAnswer } from './reminders';
import { reportStateSchema } from './reports';
import { invitationLookSchema, roleSchema } from './sites';

export const todayReportAnswer = z.object({
  id: idSchema,
  /** null: typed in by hand. */
  fileName: z.string().nullable(),
  state: reportStateSchema,
  uploadedAt: momentSchema,
  pages: z.number().nullable(),
  pagesRead: z.number(),
  samples: z.number(),
  /** Why it could not be read, in a sentence. */
  refusal: z.string().nullable(),
  /** Nobody has begun to read it for a while. */
  waitingLong: z.boolean(),
});
export type TodayReport = z.infer<typeof todayReportAnswer>;

export const todayVerdictAnswer = z.object({
  id: idSchema,
  plotId: idSchema,
  plotName: z.string(),
  verdict: z.enum(VERDICTS),
  sentence: z.string(),
  /** The cheapest way to settle an open verdict. */
  settledBy: z.string().nullable(),
  computedAt: momentSchema,
});
export type TodayVerdict = z.infer<typeof todayVerdictAnswer>;

export const todaySiteAnswer = z.object({
  id: idSchema,
  name: z.string(),
  role: roleSchema,
  plots: z.number(),
  /** Confirmed reports: a site without any is told how to begin. */
  confirmed: z.number(),
  /** Open reminders that are due within a month or have passed, soonest first. */
  due: z.array(dueAnswer),
  /** The first of those that come later. */
  next: dueAnswer.nullable(),
  /** In review, being read, or refused; what needs a person first. */
  reports: z.array(todayReportAnswer),
  /** More of them than are shown here. */
  moreReports: z.number(),
  /** Many files sent at once that are not done with. */
  batches: batchListSchema.shape.batches,
  verdicts: z.array(todayVerdictAnswer),
});
export type TodaySite = z.infer<typeof todaySiteAnswer>;

/** Without the link: that is in the letter only. */
export const todayInvitationAnswer = invitationLookSchema.pick({
  siteName: true,
  role: true,
  invitedBy: true,
  expiresAt: true,
});

export const todayAnswer = z.object({
  /** In the reader's own zone. */
  today: z.string(),
  sites: z.array(todaySiteAnswer),
  invitations: z.array(todayInvitationAnswer),
});
export type Today = z.infer<typeof todayAnswer>;
