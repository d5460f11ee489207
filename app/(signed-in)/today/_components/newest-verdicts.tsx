import Link from 'next/link';
import type { TodaySite } from '@/lib/schemas/today';
import { VerdictLine } from '@/lib/ui/verdict/verdict-line';
import { inWords } from '../../_components/due-words';

const SHOWN = 6;

/** News, not tasks: over all sites, the latest first. */
export function newestFirst(sites: readonly TodaySite[]) {
  return sites
    .flatMap((site) => site.verdicts.map((verdict) => ({ ...verdict, siteId: site.id, siteName: site.name })))
    .sort((a, b) => b.computedAt.localeCompare(a.computedAt))
    .slice(0, SHOWN);
}

export function NewestVerdicts({ sites }: { sites: readonly TodaySite[] }) {
  return (
    <ul className="grid gap-x-12 gap-y-6 lg:grid-cols-2">
      {newestFirst(sites).map((one) => (
        <li key={one.id} className="min-w-0">
          <p className="flex flex-wrap items-baseline gap-x-3">
            <Link
              href={`/sites/${one.siteId}/plots/${one.plotId}/effects`}
              className="text-link inline-flex min-h-8 items-center font-semibold"
            >
              <span className="min-w-0 break-words">{one.plotName}</span>
            </Link>
            <span className="text-sm text-clay">
              {sites.length > 1 ? `${one.siteName}, ` : ''}
              {inWords(one.computedAt.slice(0, 10))}
            </span>
          </p>
          <VerdictLine
            verdict={one.verdict}
            sentence={one.sentence}
            size="small"
            {...(one.settledBy ? { settledBy: one.settledBy } : {})}
          />
        </li>
      ))}
    </ul>
  );
}
