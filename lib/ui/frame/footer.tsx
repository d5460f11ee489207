import Link from 'next/link';
import { Wordmark } from './logo';
import { Strata } from './strata';

export type FooterLink = { href: string; label: string };

/** At the foot of every page that names no others. */
export const GUIDE_LINKS: readonly FooterLink[] = [
  { href: '/guide', label: 'Guide' },
  { href: '/guide/method', label: 'How verdicts are made' },
  { href: '/guide/trust', label: 'What you can rely on' },
];

export function Footer({ links }: { links: readonly FooterLink[] }) {
  return (
    <footer data-frame="footer" className="on-peat mt-16 text-chalk">
      <Strata />
      <div className="bg-peat pb-[calc(var(--bar-bottom)+1.5rem)]">
        <div className="page-wrap flex flex-wrap items-start gap-x-10 gap-y-5 pt-6">
          <Wordmark on="dark" />
          <div className="grid min-w-0 flex-1 basis-72 gap-2">
            <ul className="-my-1 flex flex-wrap gap-x-6">
              {links.map((link) => (
                <li key={link.href}>
                  <Link
                    href={link.href}
                    className="flex min-h-(--target) items-center underline underline-offset-4 hover:text-lamp"
                  >
                    {link.label}
                  </Link>
                </li>
              ))}
            </ul>
            <p className="max-w-measure text-sm text-horizon-5">
              Amounts here are for planning. Follow the product label, local rules and a licensed adviser where they
              apply.
            </p>
          </div>
        </div>
      </div>
    </footer>
  );
}
