import { notFound } from 'next/navigation';
import { env } from '@/lib/env';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { SignInExample } from './_components/sign-in-example';

export const dynamic = 'force-dynamic';

export default function PublicGalleryPage() {
  if (!env().gallery) notFound();
  return (
    <PublicFrame links={[{ href: '/guide', label: 'Guide' }]} footerLinks={[{ href: '/guide', label: 'Guide' }]}>
      <h1 className="text-2xl sm:text-3xl">Sign in</h1>
      <SignInExample />
    </PublicFrame>
  );
}
