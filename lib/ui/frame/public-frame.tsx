import Link from 'next/link';
import type { ReactNode } from 'react';
import { Footer, type FooterLink, GUIDE_LINKS } from './footer';
import { Wordmark } from './logo';
import { SkipLink } from './skip-link';
import { SoilColumn } from './soil-column';

type PublicFrameProps = {
  /** At the right of the header: sign in, guide. */
  links?: readonly FooterLink[];
  footerLinks?: readonly FooterLink[];
  /** `form` keeps to one column beside the drawn ground; `open` leaves the whole width to the page. */
  shape?: 'form' | 'open';
  children: ReactNode;
};

/** For everyone who is not signed in. */
export function PublicFrame({ links = [], footerLinks = GUIDE_LINKS, shape = 'form', children }: PublicFrameProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="datum">
        <div className="page-wrap flex min-h-16 flex-wrap items-center gap-x-6 pb-1.5">
          <Link href="/" className="flex min-h-16 items-center rounded-sm">
            <Wordmark />
          </Link>
          {links.length > 0 ? (
            <nav aria-label="Main" className="ml-auto">
              <ul className="flex gap-x-5">
                {links.map((link) => (
                  <li key={link.href}>
                    <Link href={link.href} className="text-link flex min-h-(--target) items-center font-semibold">
                      {link.label}
                    </Link>
                  </li>
                ))}
              </ul>
            </nav>
          ) : null}
        </div>
      </header>
      <main id="content" tabIndex={-1} className="flex-1 outline-none">
        {shape === 'form' ? (
          <div className="page-wrap grid gap-x-16 lg:grid-cols-[minmax(0,30rem)_1fr]">
            <div className="pt-8 pb-4 sm:pt-14">{children}</div>
            <SoilColumn className="-mt-[6px] hidden h-full max-h-150 w-full lg:block" />
          </div>
        ) : (
          children
        )}
      </main>
      <Footer links={footerLinks} />
    </div>
  );
}
