'use client';

import { usePathname } from 'next/navigation';
import type { ReactNode } from 'react';
import { can } from '@/lib/access/table';
import type { SiteSummary } from '@/lib/schemas/sites';
import { Frame } from '@/lib/ui/frame/frame';
import { SiteSwitcher } from '@/lib/ui/frame/site-switcher';
import { AccountMenu } from './account-menu';

const STANDING = {
  owner: 'You own it',
  adviser: 'You advise',
  helper: 'You help',
  viewer: 'You read',
} as const;

type SignedInFrameProps = { sites: readonly SiteSummary[]; name: string; paper: 'letter' | 'a4'; children: ReactNode };

/** One frame for all pages, so that going from site to site redraws nothing above the line but the words. */
export function SignedInFrame({ sites, name, paper, children }: SignedInFrameProps) {
  const id = /^\/sites\/([^/]+)/.exec(usePathname())?.[1];
  const open = sites.find((site) => site.id === id);
  const at = `/sites/${open?.id}`;
  return (
    <Frame
      nav={[{ href: '/today', label: 'Today', icon: 'today' }]}
      siteNav={
        open
          ? [
              { href: at, label: 'Ground', icon: 'ground' },
              {
                href: `${at}/reports`,
                label: 'Reports',
                icon: 'reports',
                waiting: can(open.role, 'reading.work') ? open.inReview : 0,
              },
              { href: `${at}/effects`, label: 'Effects', icon: 'effects' },
              { href: `${at}/reminders`, label: 'Reminders', icon: 'reminders' },
              { href: `${at}/members`, label: 'People', icon: 'people' },
              { href: `${at}/settings`, label: 'Settings', icon: 'settings' },
            ]
          : []
      }
      siteSwitcher={
        sites.length > 0 ? (
          <SiteSwitcher
            allHref="/today"
            {...(open ? { currentId: open.id } : {})}
            sites={sites.map((site) => ({
              id: site.id,
              name: site.name,
              href: `/sites/${site.id}`,
              note: STANDING[site.role],
            }))}
          />
        ) : null
      }
      account={<AccountMenu name={name} />}
      paper={paper}
    >
      {children}
    </Frame>
  );
}
