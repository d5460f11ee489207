'use client';

import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { PageTitle } from '@/lib/ui/frame/page-title';

export default function SiteErrorPage({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <>
      <PageTitle
        title="This page could not be drawn"
        lead="Something failed on Loamline's side. What was saved is still saved. Try the page again, or take another way from the line above."
      />
      <div className="page-wrap grid justify-items-start gap-4">
        <div className="flex flex-wrap gap-3">
          <Button onClick={reset}>Try this page again</Button>
          <LinkButton href="/today" look="quiet">
            Go to your sites
          </LinkButton>
        </div>
        {error.digest ? <p className="text-sm text-clay">Reference: {error.digest}</p> : null}
      </div>
    </>
  );
}
