import { and, asc, eq, inArray, isNull, type SQL } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { application, planIntent, planLine } from '@/db/schema';
import type { PersonId, SiteId } from '@/lib/domain/ids';
import type { ApplicationAnswer } from '@/lib/schemas/applications';
import { namesOf } from '../people/names';

/** Live applications of the site with what each was meant to do, oldest first. */
export async function loadApplications(
  tx: Transaction,
  siteId: SiteId,
  me: PersonId | null,
  only?: SQL,
): Promise<ApplicationAnswer[]> {
  const rows = await tx
    .select({ application, planned: planLine.amountKg })
    .from(application)
    .innerJoin(planLine, and(eq(planLine.siteId, siteId), eq(planLine.id, application.planLineId)))
    .where(and(eq(application.siteId, siteId), isNull(application.supersededAt), only))
    .orderBy(asc(application.appliedOn), asc(application.recordedAt));
  const planIds = rows.map((row) => row.application.planId);
  const intents =
    planIds.length === 0
      ? []
      : await tx
          .select()
          .from(planIntent)
          .where(and(eq(planIntent.siteId, siteId), inArray(planIntent.planId, planIds)));
  const names = await namesOf(
    tx,
    rows.map((row) => row.application.recordedBy),
  );
  return rows.map(({ application: row, planned }) => ({
    id: row.id,
    plotId: row.plotId,
    planId: row.planId,
    material: {
      key: row.material.key,
      name: row.material.name,
      reaction: row.material.reaction,
      affects: row.material.affects,
    },
    amountKg: Number(row.amountKg),
    amountPrinted: row.amountPrinted,
    plannedKg: Number(planned),
    areaM2: Number(row.areaM2),
    appliedOn: row.appliedOn,
    depthCm: row.depthCm === null ? null : Number(row.depthCm),
    method: row.method,
    soilCondition: row.soilCondition,
    note: row.note,
    recordedBy: row.recordedBy,
    recordedByName: names.get(row.recordedBy) ?? null,
    mine: row.recordedBy === me,
    intents: intents
      .filter((intent) => intent.planId === row.planId)
      .map((intent) => ({
        id: intent.id,
        analyte: intent.analyte,
        unit: intent.unit,
        fullChange: Number(intent.fullChange),
        low: intent.low === null ? null : Number(intent.low),
        high: intent.high === null ? null : Number(intent.high),
        source: intent.source,
      })),
  }));
}
