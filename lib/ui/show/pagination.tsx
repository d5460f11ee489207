import { LinkButton } from '../actions/link-button';

export type PaginationProps = {
  label: string;
  /** "21 to 40 of 64 reports". */
  summary: string;
  previous?: { href: string; label: string } | undefined;
  next?: { href: string; label: string } | undefined;
};

/** Only the ways that exist are there. */
export function Pagination({ label, summary, previous, next }: PaginationProps) {
  return (
    <nav aria-label={label} className="flex flex-wrap items-center gap-x-5 gap-y-3 py-4">
      {previous ? (
        <LinkButton look="quiet" href={previous.href} rel="prev">
          {previous.label}
        </LinkButton>
      ) : null}
      <p className="text-sm text-clay">{summary}</p>
      {next ? (
        <LinkButton look="quiet" href={next.href} rel="next">
          {next.label}
        </LinkButton>
      ) : null}
    </nav>
  );
}
