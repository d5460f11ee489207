import type { Metadata } from 'next';
import Link from 'next/link';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { homeLink } from './_components/guide-page';
import { GUIDES } from './_components/guides';

export const metadata: Metadata = { title: 'Guide' };

export default async function GuideIndex() {
  return (
    <PublicFrame shape="open" links={[await homeLink()]}>
      <PageTitle title="Guide" lead="Short pages: three on doing the work, three on what stands behind it." />
      <div className="page-wrap">
        <ul className="max-w-4xl border-y border-horizon-5">
          {GUIDES.map((guide) => (
            <li
              key={guide.href}
              className="grid gap-x-8 border-b border-horizon-5 py-3 last:border-0 sm:grid-cols-[20rem_1fr] sm:items-baseline"
            >
              <Link href={guide.href} className="text-link inline-flex min-h-8 items-center text-lg font-semibold">
                {guide.label}
              </Link>
              <p className="text-clay">{guide.said}</p>
            </li>
          ))}
        </ul>
      </div>
    </PublicFrame>
  );
}
