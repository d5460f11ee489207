import { and, desc, eq } from 'drizzle-orm';
import { layoutMemory, report } from '@/db/schema';
import { memoryOf } from '@/lib/reading/memory/lessons';
import type { LayoutList, LearntLayout } from '@/lib/schemas/learning';
import { nothingSchema } from '@/lib/schemas/parts';
import { dayOf } from '../days';
import { siteVerb } from '../verb';
import { toLesson, zoneOfSite } from './storedLayouts';

const MOST = 1000;

/** Layout by layout: what each label was confirmed to mean, on which day, and from which reports. */
export const listLayouts = siteVerb({
  act: 'reading.work',
  input: nothingSchema,
  run: async ({ tx, siteId }): Promise<LayoutList> => {
    const rows = await tx
      .select({ learnt: layoutMemory, fileName: report.fileName })
      .from(layoutMemory)
      .innerJoin(report, and(eq(report.siteId, siteId), eq(report.id, layoutMemory.reportId)))
      .where(eq(layoutMemory.siteId, siteId))
      .orderBy(desc(layoutMemory.learntAt), desc(layoutMemory.id))
      .limit(MOST);
    const zone = await zoneOfSite(tx, siteId);
    const layouts: LearntLayout[] = [];
    for (const { learnt } of rows) {
      if (layouts.some((one) => one.fingerprint === learnt.fingerprint)) continue;
      const same = rows.filter((one) => one.learnt.fingerprint === learnt.fingerprint);
      const memory = memoryOf(
        same.map((one) => ({ on: dayOf(one.learnt.learntAt, zone), lessons: one.learnt.lessons.flatMap(toLesson) })),
      );
      layouts.push({
        id: learnt.id,
        fingerprint: learnt.fingerprint,
        laboratory: learnt.laboratoryPrinted,
        shape: learnt.shape,
        reports: same.map((one) => ({
          reportId: one.learnt.reportId,
          fileName: one.fileName,
          confirmedOn: dayOf(one.learnt.learntAt, zone),
        })),
        lessons: [...memory.values()].flatMap(({ on, lessons }) =>
          lessons.map(({ labelPrinted, analyte, method, unit, form }) => ({
            label: labelPrinted,
            analyte,
            method,
            unit,
            form,
            on,
          })),
        ),
      });
    }
    return { layouts };
  },
});
