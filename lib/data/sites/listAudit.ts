import { and, desc, eq, type SQL, sql } from 'drizzle-orm';
import { auditEvent } from '@/db/schema';
import { type AuditList, auditInput } from '@/lib/schemas/sites';
import { namesOf } from '../people/names';
import { siteVerb } from '../verb';

const PAGE = 50;

function olderThan(mark: string | undefined): SQL | undefined {
  const [at, id] = mark?.split('_') ?? [];
  return at && id ? sql`(${auditEvent.at}, ${auditEvent.id}) < (${at}::timestamptz, ${id}::uuid)` : undefined;
}

export const listAudit = siteVerb({
  act: 'site.manage',
  input: auditInput,
  run: async ({ tx, siteId, input }): Promise<AuditList> => {
    const rows = await tx
      .select()
      .from(auditEvent)
      .where(and(eq(auditEvent.siteId, siteId), olderThan(input.before)))
      .orderBy(desc(auditEvent.at), desc(auditEvent.id))
      .limit(PAGE + 1);
    const page = rows.slice(0, PAGE);
    const names = await namesOf(
      tx,
      page.flatMap((row) => (row.personId ? [row.personId] : [])),
    );
    const last = page.at(-1);
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
      before: last && rows.length > PAGE ? `${last.at.toISOString()}_${last.id}` : null,
    };
  },
});
