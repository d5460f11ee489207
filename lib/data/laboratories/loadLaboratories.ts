import { asc, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { laboratory } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Laboratory } from '@/lib/schemas/reports';

export const loadLaboratories = (tx: Transaction, siteId: SiteId): Promise<Laboratory[]> =>
  tx
    .select({ id: laboratory.id, name: laboratory.name, otherSpellings: laboratory.otherSpellings })
    .from(laboratory)
    .where(eq(laboratory.siteId, siteId))
    .orderBy(asc(sql`lower(${laboratory.name})`));
