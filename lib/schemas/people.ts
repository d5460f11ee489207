import { z } from 'zod';
import { idSchema, lineSchema } from './parts';

const SHORTEST_PASSWORD = 8;
const LONGEST_PASSWORD = 128;

export const emailSchema = z
  .string()
  .trim()
  .max(254, 'An address has at most 254 characters.')
  .pipe(z.email('Write an e-mail address, like name@garden.example.'));

/** Counted in characters as people see them, so that a passphrase of emoji is as long as it looks. */
const characters = (text: string) => [...text.normalize('NFC')].length;

export const newPasswordSchema = z
  .string()
  .refine((text) => characters(text) >= SHORTEST_PASSWORD, 'Use at least 8 characters; a few words in a row are good.')
  .refine((text) => characters(text) <= LONGEST_PASSWORD, 'Use at most 128 characters.');

/** What was typed at a sign-in is only compared, never judged. */
const typedPasswordSchema = z
  .string()
  .min(1, 'Type your password.')
  .max(1024, 'That is too long to be a password here.');

/** 256 bits in base64url. Anything else is a link cut short, and the sentence says so. */
export const linkTokenSchema = z
  .string()
  .regex(/^[\w-]{43}$/, 'This link is incomplete. Copy all of it from the mail.');

export function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

export const timeZoneSchema = z
  .string()
  .max(60)
  .refine(isTimeZone, 'This time zone is not known. Choose one from the list.');

export const unitsSchema = z.enum(['us', 'metric']);
export const paperSchema = z.enum(['letter', 'a4']);
const personNameSchema = lineSchema(80, 'Write the name others on a site will see.');

export const signUpInput = z.strictObject({
  name: personNameSchema,
  email: emailSchema,
  password: newPasswordSchema,
  timeZone: timeZoneSchema.optional(),
  units: unitsSchema.optional(),
  /** The link of an invitation: confirming the address accepts it. */
  invitation: linkTokenSchema.optional(),
  /** The ticket of an earlier sign-up whose address was mistyped: that one is taken back. */
  replaces: linkTokenSchema.optional(),
});
/** The same for an address that is new and one that is known. */
export const signUpAnswer = z.object({ email: z.string(), ticket: z.string() });

export const addressInput = z.strictObject({ email: emailSchema });
export const addressAnswer = z.object({ email: z.string() });

export const linkInput = z.strictObject({ token: linkTokenSchema });
export const verifiedAnswer = z.object({
  email: z.string(),
  /** What became of the invitation that came with the sign-up. */
  invitation: z.enum(['none', 'accepted', 'gone']),
  siteId: z.string().nullable(),
});

export const signInInput = z.strictObject({
  email: emailSchema,
  password: typedPasswordSchema,
  sharedComputer: z.boolean().default(false),
  userAgent: z.string().max(400).nullable().default(null),
});

export const performResetInput = z.strictObject({ token: linkTokenSchema, password: newPasswordSchema });

export const meSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  units: unitsSchema,
  paper: paperSchema,
  timeZone: z.string(),
  mailHour: z.number(),
});
export type Me = z.infer<typeof meSchema>;

/** What is left out stays as it is. */
export const updateMeInput = z.strictObject({
  name: personNameSchema.optional(),
  units: unitsSchema.optional(),
  paper: paperSchema.optional(),
  timeZone: timeZoneSchema.optional(),
  mailHour: z.number().int().min(0, 'An hour from 0 to 23.').max(23, 'An hour from 0 to 23.').optional(),
});

export const changePasswordInput = z.strictObject({
  currentPassword: typedPasswordSchema,
  password: newPasswordSchema,
  endOtherSessions: z.boolean().default(true),
  userAgent: z.string().max(400).nullable().default(null),
});
