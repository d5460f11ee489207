import Link from 'next/link';
import { Wordmark } from './logo';

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
          <p className="w-full max-w-measure text-sm text-horizon-5 lg:ml-auto lg:w-auto">
            Amounts here are for planning. Follow the product label, local rules and a licensed adviser where they
            apply.
          </p>
        </div>
      </div>
    </footer>
  );
}

/** The cut face of the ground between the page and the peat. */
function Strata() {
  return (
    <svg
      viewBox="0 0 1200 44"
      preserveAspectRatio="none"
      className="block h-11 w-full"
      aria-hidden="true"
      focusable="false"
    >
      <path d="M0 6C140 2 260 9 420 6s280-5 420-1 240 3 360-1v40H0z" fill="#D9CDBB" />
      <path d="M0 13c160-3 300 5 470 2s260-6 400-1 230 2 330-2v32H0z" fill="#B9A68F" />
      <path d="M0 21c120 4 270-4 430-1s300 5 440 1 220-3 330 0v23H0z" fill="#8A6A4A" />
      <path d="M0 29c180-4 290 4 450 2s270-5 420-1 220 3 330-1v15H0z" fill="#5B4334" />
      <path d="M0 36c150 3 310-3 480-1s290 4 410 0 210-2 310 1v8H0z" fill="#3A2C22" />
    </svg>
  );
}
