import { z } from 'zod';

const schema = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  APP_ORIGIN: z.url(),
  DATABASE_URL: z.string().min(1),
  DATABASE_OWNER_URL: z.string().min(1).optional(),
  DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(8),
  S3_ENDPOINT: z.url(),
  S3_BUCKET: z.string().min(1),
  S3_REGION: z.string().min(1).default('us-east-1'),
  S3_ACCESS_KEY_ID: z.string().min(1),
  S3_SECRET_ACCESS_KEY: z.string().min(1),
  RESEND_API_KEY: z.string().min(1),
  RESEND_BASE_URL: z.url().optional(),
  MAIL_FROM: z.string().min(3),
  MAILBOX_URL: z.url().optional(),
  APP_SECRET: z.string().min(32, 'APP_SECRET needs at least 32 characters'),
  LOAMLINE_GALLERY: z.enum(['0', '1']).default('0'),
  LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
  SWEEP_SECONDS: z.coerce.number().min(0.5).max(3600).default(30),
  TRUSTED_PROXIES: z.coerce.number().int().min(0).default(0),
});

export type Env = Readonly<z.infer<typeof schema> & { gallery: boolean }>;

let cached: Env | undefined;

/** Read once, lazily: a production build has no settings, a running process must have all of them. */
export function env(): Env {
  if (cached) return cached;
  const parsed = schema.safeParse(process.env);
  if (!parsed.success) throw new Error(`Settings are missing or wrong:\n${z.prettifyError(parsed.error)}`);
  cached = { ...parsed.data, gallery: parsed.data.LOAMLINE_GALLERY === '1' };
  return cached;
}
