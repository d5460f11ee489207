import type { Transaction } from '@/db/client';
import { auditEvent } from '@/db/schema';
import type { SiteId } from '@/lib/domain/ids';
import type { Ctx } from './context';

export type AuditEntry = {
  act: string;
  objectKind: string;
  objectId: string;
  detail?: Record<string, unknown>;
};

export async function audit(tx: Transaction, ctx: Ctx, siteId: SiteId, entry: AuditEntry): Promise<void> {
  await tx.insert(auditEvent).values({
    siteId,
    at: ctx.now,
    personId: ctx.actor.kind === 'person' ? ctx.actor.person.id : null,
    act: entry.act,
    objectKind: entry.objectKind,
    objectId: entry.objectId,
    detail: entry.detail ?? {},
    requestId: ctx.requestId,
  });
}
