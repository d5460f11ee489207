import { and, eq, isNull } from 'drizzle-orm';
import type { z } from 'zod';
import type { Transaction } from '@/db/client';
import { application, type plot } from '@/db/schema';
import { can, type Role } from '@/lib/access/table';
import type { SiteId } from '@/lib/domain/ids';
import { notFound, Problem } from '@/lib/errors';
import { type AmountUnit, KG_PER, type recordApplicationInput } from '@/lib/schemas/applications';
import type { Ctx } from '../context';
import { dayOf } from '../days';
import { areaOfPlot } from '../plots/area';

type Fields = Omit<z.output<typeof recordApplicationInput>, 'plotId' | 'intents' | 'material'>;

export const toKg = (amount: number, unit: AmountUnit): number => amount * KG_PER[unit];

export async function getLiveApplication(tx: Transaction, siteId: SiteId, id: string) {
  const rows = await tx
    .select()
    .from(application)
    .where(and(eq(application.siteId, siteId), eq(application.id, id), isNull(application.supersededAt)))
    .limit(1);
  const row = rows[0];
  if (!row) throw notFound();
  return row;
}

/** The columns that stand in the request, with the plot's own area where none was given. */
export function columnsOf(plotRow: typeof plot.$inferSelect, fields: Fields, ctx: Ctx, timeZone: string) {
  if (fields.appliedOn > dayOf(ctx.now, timeZone)) {
    throw new Problem(
      'invalid',
      'This day has not come yet. What is planned belongs in a plan; record it once it is spread.',
      {
        fields: { appliedOn: 'Give today or an earlier day.' },
      },
    );
  }
  const areaM2 = fields.areaM2 ?? areaOfPlot(plotRow);
  if (areaM2 <= 0) {
    throw new Problem('invalid', 'This plot has no area yet, so a rate cannot be worked out.', {
      fields: { areaM2: 'Give the area that was treated.' },
    });
  }
  return {
    amountKg: String(toKg(fields.amount, fields.amountUnit)),
    amountPrinted: `${fields.amount} ${fields.amountUnit}`,
    areaM2: String(areaM2),
    appliedOn: fields.appliedOn,
    depthCm: fields.depthCm === undefined ? null : String(fields.depthCm),
    method: fields.method ?? '',
    soilCondition: fields.soilCondition ?? '',
    note: fields.note ?? '',
  };
}

/** A helper corrects what they recorded; owner and adviser correct anybody's. */
export function mayCorrect(role: Role, row: { recordedBy: string }, me: string): void {
  if (row.recordedBy === me || can(role, 'record.correct-any')) return;
  throw new Problem(
    'forbidden',
    'You can correct what you recorded yourself. An owner or adviser can correct this one.',
  );
}

/** Closes the live record; a second person who was faster is told. */
export async function supersede(tx: Transaction, ctx: Ctx, siteId: SiteId, id: string, reason: string): Promise<void> {
  const rows = await tx
    .update(application)
    .set({ supersededAt: ctx.now, supersededReason: reason })
    .where(and(eq(application.siteId, siteId), eq(application.id, id), isNull(application.supersededAt)))
    .returning({ id: application.id });
  if (rows.length === 0) {
    throw new Problem(
      'conflict',
      'Somebody else has just corrected or removed this record. Load it again to see what stands there now.',
    );
  }
}
