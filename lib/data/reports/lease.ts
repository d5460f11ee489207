import { and, eq, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { report } from '@/db/schema';
import { idSchema } from '@/lib/schemas/parts';

export const leaseSchema = z.strictObject({ siteId: idSchema, id: idSchema, started: z.date() });
export type Lease = z.infer<typeof leaseSchema>;

/** True for the report only while the reading that took this lease still holds it. */
export const held = (lease: Lease): SQL | undefined =>
  and(
    eq(report.siteId, lease.siteId),
    eq(report.id, lease.id),
    eq(report.state, 'reading'),
    eq(report.readingStartedAt, lease.started),
  );
