import Link from 'next/link';
import type { SiteSummary } from '@/lib/schemas/sites';
import { StatusWord } from '@/lib/ui/feedback/status-word';

const plots = (n: number) => (n === 0 ? 'no plots yet' : n === 1 ? '1 plot' : `${n} plots`);
const reports = (n: number) => (n === 1 ? '1 report to confirm' : `${n} reports to confirm`);

export function SiteList({ sites }: { sites: readonly SiteSummary[] }) {
  return (
    <ul className="border-y border-horizon-5">
      {sites.map((site) => (
        <li
          key={site.id}
          className="flex flex-wrap items-center gap-x-6 gap-y-1 border-b border-horizon-5 py-3 last:border-0"
        >
          <Link
            className="text-link flex min-h-(--target) min-w-0 items-center text-lg font-semibold"
            href={`/sites/${site.id}`}
          >
            <span className="min-w-0 break-words">{site.name}</span>
          </Link>
          <span className="text-clay">
            {plots(site.plots)} · you are {site.role}
          </span>
          {site.inReview > 0 ? (
            <Link className="ml-auto flex min-h-(--target) items-center" href={`/sites/${site.id}/reports`}>
              <StatusWord status="needs-you">{reports(site.inReview)}</StatusWord>
            </Link>
          ) : null}
        </li>
      ))}
    </ul>
  );
}
