import Link from 'next/link';
import type { ReactNode } from 'react';
import { pageContext } from '@/app/_server/context';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { GUIDES } from './guides';

type GuidePageProps = { href: string; title: string; lead: string; children: ReactNode };

/** Back to where a reader came from: their own page, or the door. */
export async function homeLink() {
  const { actor } = await pageContext();
  return actor.kind === 'person' ? { href: '/today', label: 'Today' } : { href: '/sign-in', label: 'Sign in' };
}

/** One page of the guide: the text in one column, the other pages beside it, or below it on a phone. */
export async function GuidePage({ href, title, lead, children }: GuidePageProps) {
  const home = await homeLink();
  return (
    <PublicFrame shape="open" links={[{ href: '/guide', label: 'Guide' }, home]}>
      <PageTitle title={title} lead={lead} above={{ href: '/guide', label: 'Guide' }} />
      <div className="page-wrap grid gap-x-16 gap-y-12 lg:grid-cols-[minmax(0,1fr)_16rem]">
        <article className="grid min-w-0 content-start gap-10">{children}</article>
        <nav aria-label="Guide" className="self-start border-t-4 border-gley pt-3 lg:sticky lg:top-6">
          <ul>
            {GUIDES.map((guide) => (
              <li key={guide.href} className="border-b border-horizon-5">
                <Link
                  href={guide.href}
                  aria-current={guide.href === href ? 'page' : undefined}
                  className="flex min-h-(--target) items-center py-1.5 hover:text-gley-deep hover:underline aria-[current]:font-semibold"
                >
                  {guide.label}
                </Link>
              </li>
            ))}
          </ul>
        </nav>
      </div>
    </PublicFrame>
  );
}

/** A part with its heading; running text keeps to a readable measure, tables may be wider. */
export function Part({ title, id, children }: { title: string; id?: string; children: ReactNode }) {
  return (
    <section id={id} className="grid min-w-0 gap-3 [&>p]:max-w-measure">
      <h2 className="text-xl">{title}</h2>
      {children}
    </section>
  );
}

export function Points({ children }: { children: ReactNode }) {
  return <ul className="grid max-w-measure list-disc gap-2 pl-5 marker:text-horizon-2">{children}</ul>;
}

export function Steps({ children }: { children: ReactNode }) {
  return <ol className="grid max-w-measure list-decimal gap-3 pl-6 marker:font-bold marker:text-gley">{children}</ol>;
}
