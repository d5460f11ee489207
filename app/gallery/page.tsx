import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { env } from '@/lib/env';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { sections } from './_sections';

export const metadata: Metadata = { title: 'Gallery', robots: { index: false } };
export const dynamic = 'force-dynamic';

export default function GalleryPage() {
  if (!env().gallery) notFound();
  return (
    <PublicFrame shape="open" footerLinks={[{ href: '/guide', label: 'Guide' }]}>
      <PageTitle title="Gallery" lead="Every part of the screens in every state it can be in." />
      <nav aria-label="Sections" className="page-wrap">
        <ul className="flex flex-wrap gap-x-5">
          {sections.map((section) => (
            <li key={section.id}>
              <a className="text-link flex min-h-(--target) items-center" href={`#${section.id}`}>
                {section.title}
              </a>
            </li>
          ))}
        </ul>
      </nav>
      {sections.map(({ id, title, Section }) => (
        <Stretch key={id} id={id} title={title}>
          <Section />
        </Stretch>
      ))}
    </PublicFrame>
  );
}
