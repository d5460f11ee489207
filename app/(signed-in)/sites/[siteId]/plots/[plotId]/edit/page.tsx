import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { lengthUnit } from '@/app/(signed-in)/_components/lengths';
import { can } from '@/lib/access/table';
import { getPlot } from '@/lib/data/plots/getPlot';
import { listPlots } from '@/lib/data/plots/listPlots';
import { getSite } from '@/lib/data/sites/getSite';
import { listTargets } from '@/lib/data/targets/listTargets';
import { Stretch } from '@/lib/ui/frame/layers';
import { ArchivedNotice, ArchivePlot } from '../../../_components/archive-plot';
import { PlotEditor } from '../../../_components/plot-editor';

export const metadata: Metadata = { title: 'Edit a plot' };

type Params = { params: Promise<{ siteId: string; plotId: string }> };

export default async function EditPlotPage({ params }: Params) {
  const { siteId, plotId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/plots/${plotId}/edit`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const plot = await orNotFound(getPlot({ ctx, input: { siteId, plotId } }));
  if (!can(site.role, 'ground.edit')) notFound();
  const [{ year }, targets] = await Promise.all([
    listPlots({ ctx, input: { siteId } }),
    listTargets({ ctx, input: { siteId } }),
  ]);
  const unit = lengthUnit(person.units);
  return (
    <Stretch title={`Edit ${plot.name}`}>
      {plot.archivedAt ? (
        <ArchivedNotice siteId={siteId} plot={plot} />
      ) : (
        <PlotEditor siteId={siteId} unit={unit} year={year} targets={targets} plot={plot}>
          <ArchivePlot siteId={siteId} plot={plot} />
        </PlotEditor>
      )}
    </Stretch>
  );
}
