import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { lengthUnit } from '@/app/(signed-in)/_components/lengths';
import { can } from '@/lib/access/table';
import { listPlots } from '@/lib/data/plots/listPlots';
import { getSite } from '@/lib/data/sites/getSite';
import { listTargets } from '@/lib/data/targets/listTargets';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PlotEditor } from '../../_components/plot-editor';

export const metadata: Metadata = { title: 'Add a plot' };

export default async function NewPlotPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/plots/new`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  if (!can(site.role, 'ground.edit')) notFound();
  const [{ year }, targets] = await Promise.all([
    listPlots({ ctx, input: { siteId } }),
    listTargets({ ctx, input: { siteId } }),
  ]);
  return (
    <>
      <PageTitle
        title="Add a plot"
        above={{ href: `/sites/${siteId}`, label: site.name }}
        lead="A name is enough to begin. It can also be drawn on the plan."
      />
      <Stretch>
        <PlotEditor siteId={siteId} unit={lengthUnit(person.units)} year={year} targets={targets} plot={null} />
      </Stretch>
    </>
  );
}
