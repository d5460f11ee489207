import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { lengthUnit } from '@/app/(signed-in)/_components/lengths';
import { can } from '@/lib/access/table';
import { listLaboratories } from '@/lib/data/laboratories/listLaboratories';
import { listPlots } from '@/lib/data/plots/listPlots';
import { getSite } from '@/lib/data/sites/getSite';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { TypedReport } from './_components/typed-report';

export const metadata: Metadata = { title: 'Type a report in' };

export default async function NewReportPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reports/new`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  if (!can(site.role, 'reading.work')) notFound();
  const [{ plots }, { laboratories }] = await Promise.all([
    listPlots({ ctx, input: { siteId } }),
    listLaboratories({ ctx, input: { siteId } }),
  ]);
  return (
    <>
      <PageTitle
        title="Type a report in"
        above={{ href: `/sites/${siteId}/reports`, label: 'Reports' }}
        lead="For a page you hold in your hand and have no file of. Say what was sampled; the values are typed into the grid that opens next."
      />
      <Stretch>
        <TypedReport
          siteId={siteId}
          unit={lengthUnit(person.units) === 'ft' ? 'in' : 'cm'}
          plots={plots.map(({ id, name }) => ({ value: id, label: name }))}
          laboratories={laboratories.map(({ id, name }) => ({ value: id, label: name }))}
          today={ctx.now.toLocaleDateString('en-CA', { timeZone: person.timeZone })}
        />
      </Stretch>
    </>
  );
}
