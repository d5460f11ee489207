'use client';

import Link from 'next/link';
import { ROLE_WORDS } from '@/lib/access/words';
import type { Today, TodaySite } from '@/lib/schemas/today';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { useApi } from '@/lib/ui/use-api';
import { inWords } from '../../_components/due-words';
import { NewestVerdicts } from './newest-verdicts';
import { asksForSomething, isNew, nextWords, SiteSection } from './site-section';
import { summaryOf } from './summary';

const WHILE_READING_MS = 3_000;

const isBeingRead = (today: Today | undefined): boolean =>
  today?.sites.some((site) =>
    site.reports.some((report) => report.state === 'reading' || (report.state === 'received' && !report.waitingLong)),
  ) ?? false;

export function TodayBoard({ first }: { first: Today }) {
  const {
    data = first,
    problem,
    reload,
  } = useApi<Today>('/today', {
    fallback: first,
    refreshMs: (latest) => (isBeingRead(latest) ? WHILE_READING_MS : 0),
  });
  const { sites } = data;
  const only = sites.length === 1;
  const loud = sites.filter((site) => only || asksForSomething(site) || isNew(site));
  const quiet = sites.filter((site) => !loud.includes(site));
  return (
    <>
      <PageTitle
        title="Today"
        lead={`${inWords(data.today)}. ${summaryOf(data)}`}
        actions={
          sites.length > 0 ? (
            <LinkButton href="/new-site" look="quiet">
              Open a new site
            </LinkButton>
          ) : null
        }
      />
      {problem ? (
        <div className="page-wrap pb-4">
          <ProblemNotice problem={problem} />
        </div>
      ) : null}
      <Invitations invitations={data.invitations} />
      {sites.length === 0 ? <FirstSite invited={data.invitations.length > 0} /> : null}
      {loud.map((site) => (
        <SiteSection key={site.id} site={site} today={data.today} onChanged={() => reload()} />
      ))}
      {quiet.length > 0 ? <QuietSites sites={quiet} all={loud.length === 0} /> : null}
      {sites.some((site) => site.verdicts.length > 0) ? (
        <Stretch title="Newest verdicts" ground="white">
          <NewestVerdicts sites={sites} />
        </Stretch>
      ) : null}
    </>
  );
}

function Invitations({ invitations }: { invitations: Today['invitations'] }) {
  if (invitations.length === 0) return null;
  return (
    <ul className="page-wrap grid gap-3 pb-4">
      {invitations.map((one) => (
        <li key={`${one.siteName} ${one.expiresAt}`}>
          <Notice title={`${one.invitedBy} asks you to join ${one.siteName}`}>
            As {ROLE_WORDS[one.role].a}. {ROLE_WORDS[one.role].may} The letter with the link to answer was mailed to
            you; it stands until {inWords(one.expiresAt.slice(0, 10))}.
          </Notice>
        </li>
      ))}
    </ul>
  );
}

function FirstSite({ invited }: { invited: boolean }) {
  return (
    <Stretch title="Your sites">
      <EmptyState
        shape="plan"
        title="No site yet"
        action={
          <LinkButton href="/new-site" look={invited ? 'quiet' : 'primary'}>
            Open your first site
          </LinkButton>
        }
      >
        A site is the ground you keep: its plots, their soil tests, and what was spread.{' '}
        {invited
          ? 'Answer the invitation in your mail, or open a site of your own.'
          : 'If somebody asks you to join theirs, it stands here and in your mail.'}
      </EmptyState>
    </Stretch>
  );
}

function QuietSites({ sites, all }: { sites: readonly TodaySite[]; all: boolean }) {
  return (
    <Stretch title={all ? 'Your sites' : 'Nothing to do on these'}>
      <ul className="border-y border-horizon-5">
        {sites.map((site) => (
          <li
            key={site.id}
            className="grid gap-x-8 border-b border-horizon-5 py-3 last:border-0 sm:grid-cols-[minmax(12rem,1fr)_2fr] sm:items-center"
          >
            <Link
              href={`/sites/${site.id}`}
              className="text-link inline-flex min-h-(--target) min-w-0 items-center text-lg font-semibold"
            >
              <span className="min-w-0 break-words">{site.name}</span>
            </Link>
            <p className="text-clay">{nextWords(site)}</p>
          </li>
        ))}
      </ul>
    </Stretch>
  );
}
