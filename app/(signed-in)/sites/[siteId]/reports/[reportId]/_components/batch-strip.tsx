'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect, useRef } from 'react';
import type { BatchPlace } from '@/lib/schemas/batches';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { counted } from './report-words';

type StripProps = { siteId: string; place: BatchPlace };

const link = 'text-link inline-flex min-h-(--target) min-w-0 items-center font-semibold';

/** "3 of 40": where this report stands among the files it came with, and the way to the next. Alt+R goes there. */
export function BatchStrip({ siteId, place }: StripProps) {
  const reports = `/sites/${siteId}/reports`;
  const router = useRouter();
  const nextId = place.next?.reportId;
  useEffect(() => {
    if (nextId === undefined) return;
    const onKey = (event: KeyboardEvent) => {
      if (!event.altKey || event.ctrlKey || event.metaKey || event.shiftKey) return;
      if (event.code !== 'KeyR' && event.key.toLowerCase() !== 'r') return;
      event.preventDefault();
      router.push(`${reports}/${nextId}`);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [router, reports, nextId]);
  return (
    <nav
      aria-label="Files sent together"
      className="no-print page-wrap max-w-[110rem]! flex flex-wrap items-center gap-x-5 gap-y-1 pb-3"
      data-testid="batch-strip"
    >
      <span>
        <strong>
          {place.position} of {place.of}
        </strong>{' '}
        sent at once
      </span>
      {place.before ? (
        <Link className={link} href={`${reports}/${place.before.reportId}`}>
          One before
        </Link>
      ) : null}
      {place.next ? (
        <Link className={link} href={`${reports}/${place.next.reportId}`} aria-keyshortcuts="Alt+R">
          Next to review{' '}
          <kbd className="pointer-coarse:hidden max-md:hidden ml-2 rounded-sm border border-fallow px-1.5 text-sm font-normal">
            Alt+R
          </kbd>
        </Link>
      ) : null}
      <Link className={link} href={`${reports}/batches/${place.batchId}`}>
        The whole list
      </Link>
    </nav>
  );
}

/** Once a report is confirmed: the next of its batch, with the focus on it, so that Enter goes on. */
export function NextOfBatch({ siteId, place, focus }: StripProps & { focus: boolean }) {
  const reports = `/sites/${siteId}/reports`;
  const box = useRef<HTMLParagraphElement>(null);
  useEffect(() => {
    if (!focus) return;
    const at = box.current?.querySelector('a');
    at?.focus({ preventScroll: true });
    at?.scrollIntoView({ block: 'center' });
  }, [focus]);
  return (
    <p ref={box} className="flex flex-wrap items-center gap-x-4 gap-y-2">
      {place.next ? (
        <>
          <LinkButton href={`${reports}/${place.next.reportId}`}>Next report of these files</LinkButton>
          <span className="min-w-0 break-words text-clay">
            {place.next.fileName}; {counted(place.toReview, 'report')} to review
          </span>
        </>
      ) : (
        <>
          <LinkButton href={`${reports}/batches/${place.batchId}`}>See the whole list</LinkButton>
          <span className="text-clay">That was the last one to review of these files.</span>
        </>
      )}
    </p>
  );
}
