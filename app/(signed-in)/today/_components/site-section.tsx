import Link from 'next/link';
import { can } from '@/lib/access/table';
import { ROLE_WORDS } from '@/lib/access/words';
import type { TodaySite } from '@/lib/schemas/today';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Stretch } from '@/lib/ui/frame/layers';
import { DueList } from '../../_components/due-list';
import { inWords } from '../../_components/due-words';
import { WaitingBatches, WaitingReports } from './waiting-reports';

export const asksForSomething = (site: TodaySite): boolean =>
  site.due.length > 0 || site.reports.length > 0 || site.batches.length > 0;
export const isNew = (site: TodaySite): boolean => site.plots === 0 || site.confirmed === 0;

export function nextWords(site: TodaySite): string {
  return site.next
    ? `Next: a sample of ${site.next.plotName}, due ${inWords(site.next.dueOn)}.`
    : 'No reminder is set for a later day.';
}

type SiteSectionProps = { site: TodaySite; today: string; onChanged: () => Promise<void> };

/** One site with what it asks for; a site that is new says how to begin. */
export function SiteSection({ site, today, onChanged }: SiteSectionProps) {
  const headingId = `site-${site.id}`;
  return (
    <Stretch>
      <div className="mb-4 flex flex-wrap items-baseline gap-x-4">
        <h2 id={headingId} tabIndex={-1} className="min-w-0 text-xl outline-none">
          <Link href={`/sites/${site.id}`} className="text-link inline-flex min-h-8 items-center">
            <span className="min-w-0 break-words">{site.name}</span>
          </Link>
        </h2>
        <p className="text-clay">you are {ROLE_WORDS[site.role].a}</p>
      </div>
      <div className="grid gap-6">
        {site.due.length > 0 ? (
          <div>
            <h3 className="mb-2 text-lg">Samples due</h3>
            <DueList due={site.due} today={today} focusId={headingId} onChanged={onChanged} />
          </div>
        ) : null}
        {site.reports.length > 0 || site.batches.length > 0 ? (
          <div>
            <h3 className="mb-2 text-lg">Reports</h3>
            <WaitingBatches siteId={site.id} batches={site.batches} />
            {site.reports.length > 0 ? (
              <WaitingReports siteId={site.id} role={site.role} reports={site.reports} more={site.moreReports} />
            ) : null}
          </div>
        ) : null}
        {!asksForSomething(site) && !isNew(site) ? (
          <p className="max-w-measure text-clay">Nothing is due and nothing waits. {nextWords(site)}</p>
        ) : null}
        {isNew(site) && site.reports.length === 0 ? <FirstStep site={site} /> : null}
      </div>
    </Stretch>
  );
}

function FirstStep({ site }: { site: TodaySite }) {
  if (site.plots === 0) {
    return (
      <EmptyState
        shape="plan"
        title="No plots drawn yet"
        action={
          can(site.role, 'ground.edit') ? <LinkButton href={`/sites/${site.id}`}>Draw the first plot</LinkButton> : null
        }
      >
        {can(site.role, 'ground.edit')
          ? 'Draw each bed or plot you sample on the site plan, roughly to scale. Reports are then dropped onto it.'
          : 'An owner or adviser of this site draws the plots; then their tests stand here.'}
      </EmptyState>
    );
  }
  return (
    <EmptyState
      shape="page"
      title="No soil test yet"
      action={can(site.role, 'reading.work') ? <LinkButton href={`/sites/${site.id}`}>Add a report</LinkButton> : null}
    >
      {can(site.role, 'reading.work')
        ? 'Drop last year’s laboratory report onto a plot. It is read, and you check it against its page before anything counts.'
        : 'The first confirmed report of this site puts its values here.'}
    </EmptyState>
  );
}
