import Link from 'next/link';
import type { ReactNode } from 'react';
import type { NavItem } from './current-item';
import { Footer, type FooterLink, GUIDE_LINKS } from './footer';
import { Wordmark } from './logo';
import { NavBar, NavRow } from './nav';
import { SkipLink } from './skip-link';

type FrameProps = {
  /** Places above any one site: today, all sites. */
  nav: readonly NavItem[];
  /** Places inside the site that is open; the datum line then runs under these. */
  siteNav?: readonly NavItem[];
  /** What the phone's bar holds; the first four are in sight when there are more than five. */
  phoneNav?: readonly NavItem[];
  siteSwitcher?: ReactNode;
  account?: ReactNode;
  footerLinks?: readonly FooterLink[];
  /** A strip above everything: the session is about to end, changes are waiting. */
  strip?: ReactNode;
  /** What this person prints on. */
  paper?: 'letter' | 'a4';
  children: ReactNode;
};

/** Above the line: where you are. The line is the ground. Below it the page, cut in layers down to the peat. */
export function Frame({
  nav,
  siteNav,
  phoneNav,
  siteSwitcher,
  account,
  footerLinks = GUIDE_LINKS,
  strip,
  paper = 'letter',
  children,
}: FrameProps) {
  const inSite = siteNav !== undefined && siteNav.length > 0;
  return (
    <div className="flex min-h-dvh flex-col" data-paper={paper}>
      <SkipLink />
      {strip}
      <header className={inSite ? undefined : 'datum'}>
        <div className="page-wrap flex min-h-16 items-end gap-x-2 sm:gap-x-5">
          <Link href="/" className="flex min-h-16 flex-none items-center rounded-sm" aria-label="Loamline, today">
            <Wordmark className="max-sm:[&>span]:sr-only" />
          </Link>
          {siteSwitcher ? <div className="flex min-h-16 min-w-0 items-center">{siteSwitcher}</div> : null}
          <NavRow
            items={nav}
            label="Main"
            onLine={!inSite}
            className={inSite ? 'hidden min-h-16 items-center md:ml-auto md:flex' : 'hidden md:ml-auto md:block'}
          />
          {account ? <div className="ml-auto flex min-h-16 flex-none items-center md:ml-0">{account}</div> : null}
        </div>
        {inSite ? (
          <div className="datum max-md:pb-[5px]">
            <div className="page-wrap">
              <NavRow items={siteNav} label="This site" className="hidden md:block" />
            </div>
          </div>
        ) : null}
      </header>
      <main id="content" tabIndex={-1} className="flex-1 outline-none">
        {children}
      </main>
      <Footer links={footerLinks} />
      <NavBar items={phoneNav ?? (inSite ? [...nav.slice(0, 1), ...siteNav, ...nav.slice(1)] : nav)} label="Places" />
    </div>
  );
}
