import { z } from 'zod';
import { ROLES } from '@/lib/access/table';
import { idSchema, lineSchema, momentSchema } from './parts';
import { emailSchema, timeZoneSchema } from './people';

export const roleSchema = z.enum(ROLES);
const siteNameSchema = lineSchema(80, 'Give the site a name.');
const countrySchema = z.string().regex(/^[A-Z]{2}$/, 'Two capital letters, like US or GB.');
const hemisphereSchema = z.enum(['north', 'south']);
const warmMonthsSchema = z.array(z.boolean()).length(12, 'Twelve months, January first.');
const metresSchema = (what: string) =>
  z.number(`Write ${what} as a number.`).min(2, 'At least 2 m.').max(2000, 'At most 2,000 m.');

export const createSiteInput = z.strictObject({
  name: siteNameSchema,
  country: countrySchema.default('US'),
  hemisphere: hemisphereSchema.default('north'),
  timeZone: timeZoneSchema.optional(),
  planWidthM: metresSchema('the width').default(40),
  planHeightM: metresSchema('the depth').default(25),
});

/** What is left out stays as it is. */
export const updateSiteInput = z.strictObject({
  name: siteNameSchema.optional(),
  country: countrySchema.optional(),
  hemisphere: hemisphereSchema.optional(),
  timeZone: timeZoneSchema.optional(),
  warmMonths: warmMonthsSchema.optional(),
  planWidthM: metresSchema('the width').optional(),
  planHeightM: metresSchema('the depth').optional(),
});

export const siteSchema = z.object({
  id: idSchema,
  name: z.string(),
  country: z.string(),
  hemisphere: hemisphereSchema,
  timeZone: z.string(),
  warmMonths: z.array(z.boolean()),
  planWidthM: z.number(),
  planHeightM: z.number(),
  /** The caller's own. */
  role: roleSchema,
});
export type Site = z.infer<typeof siteSchema>;

export const siteSummarySchema = z.object({
  id: idSchema,
  name: z.string(),
  role: roleSchema,
  plots: z.number(),
  /** Reports that wait for a person to confirm them. */
  inReview: z.number(),
});
export type SiteSummary = z.infer<typeof siteSummarySchema>;
export const siteListSchema = z.object({ sites: z.array(siteSummarySchema) });

export const memberSchema = z.object({
  id: idSchema,
  name: z.string(),
  /** Only an owner is told the addresses. */
  email: z.string().nullable(),
  role: roleSchema,
  since: momentSchema,
  isYou: z.boolean(),
});
export type Member = z.infer<typeof memberSchema>;
export const memberListSchema = z.object({ members: z.array(memberSchema), role: roleSchema });
export type MemberList = z.infer<typeof memberListSchema>;

export const memberInput = z.strictObject({ memberId: idSchema });
export const changeRoleInput = z.strictObject({ memberId: idSchema, role: roleSchema });

export const inviteInput = z.strictObject({ email: emailSchema, role: roleSchema });
export const invitedSchema = z.object({ id: idSchema });
export const invitationInput = z.strictObject({ invitationId: idSchema });
export const invitationSchema = z.object({
  id: idSchema,
  email: z.string(),
  role: roleSchema,
  state: z.enum(['open', 'expired', 'accepted', 'declined', 'revoked']),
  invitedBy: z.string(),
  expiresAt: momentSchema,
  createdAt: momentSchema,
});
export type Invitation = z.infer<typeof invitationSchema>;
export const invitationListSchema = z.object({ invitations: z.array(invitationSchema) });

/** What the holder of the link sees. */
export const invitationLookSchema = z.object({
  siteName: z.string(),
  role: roleSchema,
  invitedBy: z.string(),
  email: z.string(),
  expiresAt: momentSchema,
  /** What this browser has to do before it can be accepted. */
  next: z.enum(['accept', 'sign-in', 'sign-up', 'other-account']),
});
export type InvitationLook = z.infer<typeof invitationLookSchema>;
export const acceptedSchema = z.object({ siteId: idSchema });

/** Moment and id: what one act wrote down twice has one moment, and a page may end between the two. */
const auditMark = z.string().regex(/^\d{4}-\d\d-\d\dT[\d:.]+Z_[\da-f-]{36}$/, 'This is not a mark of this list.');
export const auditInput = z.strictObject({
  /** Events before this one; the mark that came with the page before. */
  before: auditMark.optional(),
});
export const auditListSchema = z.object({
  events: z.array(
    z.object({
      id: idSchema,
      at: momentSchema,
      person: z.string().nullable(),
      act: z.string(),
      objectKind: z.string(),
      objectId: z.string(),
      detail: z.record(z.string(), z.unknown()),
    }),
  ),
  /** Ask for the next page with this; null at the end. */
  before: auditMark.nullable(),
});
export type AuditList = z.infer<typeof auditListSchema>;
