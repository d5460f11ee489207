import type { Metadata } from 'next';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { listInvitations } from '@/lib/data/sites/listInvitations';
import { listMembers } from '@/lib/data/sites/listMembers';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { Invitations } from './_components/invitations';
import { Members } from './_components/members';

export const metadata: Metadata = { title: 'People' };

export default async function MembersPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx } = await pagePerson(`/sites/${siteId}/members`);
  const list = await orNotFound(listMembers({ ctx, input: { siteId } }));
  const owns = can(list.role, 'site.manage');
  const invitations = owns ? await listInvitations({ ctx, input: { siteId } }) : null;
  return (
    <>
      <PageTitle
        title="People"
        lead={owns ? 'Who is on this site, and as what.' : 'Who is on this site. An owner can ask others to join.'}
      />
      <Stretch>
        <Members siteId={siteId} first={list} />
      </Stretch>
      {invitations ? <Invitations siteId={siteId} first={invitations} /> : null}
    </>
  );
}
