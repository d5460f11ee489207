import { notFound } from 'next/navigation';
import { env } from '@/lib/env';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { LandingExample } from './landing-example';

export const dynamic = 'force-dynamic';

export default function LandingGalleryPage() {
  if (!env().gallery) notFound();
  return (
    <PublicFrame
      shape="open"
      links={[
        { href: '/guide', label: 'Guide' },
        { href: '/sign-in', label: 'Sign in' },
      ]}
      footerLinks={[{ href: '/guide', label: 'Guide' }]}
    >
      <LandingExample />
    </PublicFrame>
  );
}
