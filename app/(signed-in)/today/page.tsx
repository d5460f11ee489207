import type { Metadata } from 'next';
import { pagePerson } from '@/app/_server/context';
import { listMySites } from '@/lib/data/sites/listMySites';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { SiteList } from '../_components/site-list';

export const metadata: Metadata = { title: 'Today' };

export default async function TodayPage() {
  const { ctx } = await pagePerson('/today');
  const { sites } = await listMySites({ ctx, input: {} });
  return (
    <>
      <PageTitle
        title="Today"
        actions={
          sites.length > 0 ? (
            <LinkButton href="/new-site" look="quiet">
              Open a new site
            </LinkButton>
          ) : null
        }
      />
      <Stretch title="Your sites">
        {sites.length > 0 ? (
          <SiteList sites={sites} />
        ) : (
          <EmptyState
            shape="plan"
            title="No site yet"
            action={<LinkButton href="/new-site">Open your first site</LinkButton>}
          >
            A site is the ground you keep: its plots, their soil tests, and what was spread. If somebody asked you to
            join theirs, open the link in the mail.
          </EmptyState>
        )}
      </Stretch>
    </>
  );
}
