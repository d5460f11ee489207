'use client';

import { Menu } from '../actions/menu';

export type SiteChoice = { id: string; name: string; href: string; note?: string };

/** The open site's name; the others one press away. */
export function SiteSwitcher({
  sites,
  currentId,
  allHref,
}: {
  sites: readonly SiteChoice[];
  currentId?: string;
  allHref: string;
}) {
  const current = sites.find((site) => site.id === currentId);
  return (
    <Menu
      look="bare"
      label={<span className="block truncate sm:max-w-64">{current?.name ?? 'Choose a site'}</span>}
      items={[
        ...sites.map((site) => ({
          key: site.id,
          label: site.name,
          note: site.note,
          href: site.href,
          current: site.id === currentId,
        })),
        { key: 'all', label: 'All sites', href: allHref, parted: true },
      ]}
    />
  );
}
