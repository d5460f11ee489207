import Link from 'next/link';
import type { ReactNode } from 'react';
import { cx } from '../cx';

type PageTitleProps = {
  title: ReactNode;
  /** Where this page lies: the site, the plot. */
  above?: { href: string; label: string } | undefined;
  lead?: ReactNode;
  actions?: ReactNode;
  /** Inside a layer the wrap is already there. */
  inLayer?: boolean;
};

export function PageTitle({ title, above, lead, actions, inLayer = false }: PageTitleProps) {
  return (
    <div className={cx(inLayer ? '' : 'page-wrap pt-7 pb-6 sm:pt-10', 'flex flex-wrap items-end gap-x-8 gap-y-4')}>
      <div className="min-w-0 flex-1 basis-72">
        {above ? (
          <p className="-mt-2">
            <Link href={above.href} className="text-link inline-flex min-h-8 items-center text-sm font-semibold">
              {above.label}
            </Link>
          </p>
        ) : null}
        <h1 className="text-2xl sm:text-3xl">{title}</h1>
        {lead ? <p className="mt-2 max-w-measure text-clay">{lead}</p> : null}
      </div>
      {actions ? <div className="flex flex-wrap gap-3">{actions}</div> : null}
    </div>
  );
}
