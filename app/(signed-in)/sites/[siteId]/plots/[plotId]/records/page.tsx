import type { Metadata } from 'next';
import { orNotFound } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { listApplications } from '@/lib/data/applications/listApplications';
import { openPlot, type PlotParams } from '../_server/open-plot';
import { PlotRecords } from './_components/plot-records';

export const metadata: Metadata = { title: 'Records' };

export default async function RecordsPage({ params }: PlotParams) {
  const { siteId, plotId } = await params;
  const { ctx, person, site, plot, today } = await openPlot(siteId, plotId);
  const first = await orNotFound(listApplications({ ctx, input: { siteId, plotId } }));
  return (
    <PlotRecords
      siteId={siteId}
      plotId={plotId}
      first={first}
      units={person.units}
      today={today}
      plotAreaM2={plot.area?.m2 ?? null}
      may={{
        record: can(site.role, 'record.add') && plot.archivedAt === null,
        correctOwn: can(site.role, 'record.correct-own'),
        correctAny: can(site.role, 'record.correct-any'),
      }}
    />
  );
}
