'use client';

import { type ReactNode, useEffect, useRef } from 'react';
import { useAnnounce } from '@/lib/ui/feedback/announce';

/** After a form that sends mail. The heading takes the focus, so that nobody is left on a button that is gone. */
export function Sent({ title, children }: { title: string; children: ReactNode }) {
  const heading = useRef<HTMLHeadingElement>(null);
  const announce = useAnnounce();
  useEffect(() => {
    heading.current?.focus();
    announce(title, { visible: false });
  }, [announce, title]);
  return (
    <div className="grid max-w-measure gap-4">
      <h2 ref={heading} tabIndex={-1} className="text-xl">
        {title}
      </h2>
      {children}
    </div>
  );
}

/** Only where mail stays on this machine: the way to it. */
export function MailboxHint({ url }: { url: string | null }) {
  if (!url) return null;
  return (
    <p className="border-l-2 border-gley pl-4">
      On this machine mail goes nowhere: it stays in{' '}
      <a className="text-link" href={url} target="_blank" rel="noreferrer">
        the mailbox page
      </a>
      .
    </p>
  );
}
