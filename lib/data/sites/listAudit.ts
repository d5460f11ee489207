import { and, desc, eq, lt } from 'drizzle-orm';
import { auditEvent } from '@/db/schema';
import { type AuditList, auditInput } from '@/lib/schemas/sites';
import { namesOf } from '../people/names';
import { siteVerb } from '../verb';

const PAGE = 50;

export const listAudit = siteVerb({
  act: 'site.manage',
  input: auditInput,
  run: async ({ tx, siteId, input }): Promise<AuditList> => {
    const rows = await tx
      .select()
      .from(auditEvent)
      .where(and(eq(auditEvent.siteId, siteId), ...(input.before ? [lt(auditEvent.at, new Date(input.before))] : [])))
      .orderBy(desc(auditEvent.at), desc(auditEvent.id))
      .limit(PAGE + 1);
    const page = rows.slice(0, PAGE);
    const names = await namesOf(
      tx,
      page.flatMap((row) => (row.personId ? [row.personId] : [])),
    );
    return {
      events: page.map((row) => ({
        id: row.id,
        at: row.at.toISOString(),
        person: row.personId ? (names.get(row.personId) ?? null) : null,
        act: row.act,
        objectKind: row.objectKind,
        objectId: row.objectId,
        detail: row.detail,
      })),
      before: rows.length > PAGE ? (page.at(-1)?.at.toISOString() ?? null) : null,
    };
  },
});
