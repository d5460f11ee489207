'use client';

import { Button } from '@/lib/ui/actions/button';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { PublicFrame } from '@/lib/ui/frame/public-frame';

export default function ErrorPage({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <PublicFrame shape="open">
      <PageTitle
        title="This page could not be drawn"
        lead="Something failed on Loamline's side. What was saved is still saved. Try the page again; if it fails once more, go back one page and take another way."
      />
      <div className="page-wrap grid justify-items-start gap-4">
        <Button onClick={reset}>Try this page again</Button>
        {error.digest ? <p className="text-sm text-clay">Reference: {error.digest}</p> : null}
      </div>
    </PublicFrame>
  );
}
