import './withoutEval';
import { z } from 'zod';
import { parseDay } from '@/lib/domain/days';

/** Pieces that many schemas share: ids, days, versions and short texts, each with the sentence a person sees. */

export const idSchema = z.uuid('This is not the id of anything here.');

export const versionSchema = z.number().int().min(1);

const FIRST_DAY = '1950-01-01';

/** A calendar day from 1950 on. That it is not in the future is asked where the clock is known. */
export const daySchema = z
  .string()
  .refine((text) => parseDay(text).ok, 'Write a day that exists, like 2026-04-10.')
  .refine((text) => text >= FIRST_DAY, 'Days before 1950 are not taken. Is the year right?');

const CONTROLS = /[\p{Cc}\u200b-\u200f\u2028-\u202e\u2060-\u2069\ufeff]/u;
const LINE_CONTROLS = /[\p{Cc}\u200b-\u200f\u2028-\u202e\u2060-\u2069\ufeff]/gu;

/** One line of plain text. */
export const lineSchema = (longest: number, missing: string) =>
  z
    .string()
    .trim()
    .min(1, missing)
    .max(longest, `At most ${longest} characters.`)
    .refine((text) => !CONTROLS.test(text), 'Leave out line breaks and invisible characters.');

/** Several lines of plain text; invisible characters are dropped, line breaks stay. */
export const notesSchema = (longest: number) =>
  z
    .string()
    .max(longest, `At most ${longest} characters.`)
    .transform((text) => text.replace(LINE_CONTROLS, (mark) => (mark === '\n' || mark === '\t' ? mark : '')));

/** A moment in an answer: ISO 8601 in UTC. */
export const momentSchema = z.iso.datetime();

/** An amount as the database holds it: a decimal as text, so that no digit is lost on the way. */
export const decimalSchema = z.string().regex(/^-?\d+(\.\d+)?$/);

export const remarkSchema = z.object({ code: z.string(), sentence: z.string() });

/** For inputs that name nothing but the site. */
export const nothingSchema = z.strictObject({});

export const okSchema = z.object({ ok: z.literal(true) });
