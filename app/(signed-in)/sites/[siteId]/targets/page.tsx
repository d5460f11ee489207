import type { Metadata } from 'next';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getSite } from '@/lib/data/sites/getSite';
import { listTargets } from '@/lib/data/targets/listTargets';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { BuiltInSets } from './_components/built-in-sets';
import { OwnSets } from './_components/own-sets';

export const metadata: Metadata = { title: 'Target sets' };

export default async function TargetsPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx } = await pagePerson(`/sites/${siteId}/targets`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const targets = await listTargets({ ctx, input: { siteId } });
  const mayEdit = can(site.role, 'ground.edit');
  const make = <LinkButton href={`/sites/${siteId}/targets/new`}>Make a target set</LinkButton>;
  return (
    <>
      <PageTitle
        title="Target sets"
        above={{ href: `/sites/${siteId}`, label: site.name }}
        lead="The bands that tests are held against. A plot or a crop takes one set."
        actions={mayEdit && targets.own.length > 0 ? make : null}
      />
      <Stretch title="Your own">
        {targets.own.length > 0 ? (
          <OwnSets siteId={siteId} sets={targets.own} mayEdit={mayEdit} />
        ) : (
          <EmptyState shape="table" title="No set of your own yet" action={mayEdit ? make : null}>
            Where no published band fits your crop, set down the one you work to, with its method. Each change is a new
            version with a day; charts of earlier days keep the band that stood then.
          </EmptyState>
        )}
      </Stretch>
      <Stretch title="Published, built in" ground="white">
        <BuiltInSets sets={targets.builtIn} />
      </Stretch>
    </>
  );
}
