import { createHash } from 'node:crypto';
import type { Ctx } from '../context';

/** 256 bits of chance as text for a link or a cookie. */
export const newSecret = (ctx: Ctx): string => Buffer.from(ctx.random(32)).toString('base64url');

/** What the database keeps of it. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');
