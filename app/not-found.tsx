import type { Metadata } from 'next';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PublicFrame } from '@/lib/ui/frame/public-frame';

export const metadata: Metadata = { title: 'Nothing here' };

export default function NotFound() {
  return (
    <PublicFrame shape="open">
      <PageTitle
        title="Nothing at this address"
        lead="The page was moved or removed, or it is not yours to see. Nothing was changed."
      />
      <div className="page-wrap">
        <LinkButton href="/">Go to the start</LinkButton>
      </div>
    </PublicFrame>
  );
}
