import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getSite } from '@/lib/data/sites/getSite';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { bandChoices } from '../_components/band-choices';
import { TargetForm } from '../_components/target-form';

export const metadata: Metadata = { title: 'Make a target set' };

export default async function NewTargetSetPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/targets/new`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  if (!can(site.role, 'ground.edit')) notFound();
  const today = ctx.now.toLocaleDateString('en-CA', { timeZone: person.timeZone });
  return (
    <>
      <PageTitle title="Make a target set" above={{ href: `/sites/${siteId}/targets`, label: 'Target sets' }} />
      <Stretch>
        <TargetForm siteId={siteId} set={null} today={today} choices={bandChoices()} />
      </Stretch>
    </>
  );
}
