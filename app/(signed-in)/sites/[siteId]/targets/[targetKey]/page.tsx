import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getSite } from '@/lib/data/sites/getSite';
import { listTargets } from '@/lib/data/targets/listTargets';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { dayText } from '@/lib/ui/site-plan/measure';
import { bandChoices } from '../_components/band-choices';
import { TargetForm } from '../_components/target-form';

export const metadata: Metadata = { title: 'Edit a target set' };

type Params = { params: Promise<{ siteId: string; targetKey: string }> };

export default async function EditTargetSetPage({ params }: Params) {
  const { siteId, targetKey } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/targets/${targetKey}`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const { own } = await listTargets({ ctx, input: { siteId } });
  const set = own.find((one) => one.key === targetKey);
  if (!set || !can(site.role, 'ground.edit')) notFound();
  const today = ctx.now.toLocaleDateString('en-CA', { timeZone: person.timeZone });
  return (
    <>
      <PageTitle
        title={`Edit ${set.name}`}
        above={{ href: `/sites/${siteId}/targets`, label: 'Target sets' }}
        lead={`Version ${set.version}, in force since ${dayText(set.validFrom)}. A save makes version ${set.version + 1}; charts of earlier days keep the bands that stood then.`}
      />
      <Stretch>
        <TargetForm siteId={siteId} set={set} today={today} choices={bandChoices()} />
      </Stretch>
    </>
  );
}
