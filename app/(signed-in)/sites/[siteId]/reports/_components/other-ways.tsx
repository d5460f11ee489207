'use client';

import { GraduationCap, Sheet } from 'lucide-react';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { PasteBox } from './paste-box';

type OtherWaysProps = { readonly home: string; readonly today: string; readonly onFile: (file: File) => void };

/** What is not a laboratory's file: a mail's numbers, a sheet of one's own. And what earlier confirmations taught. */
export function OtherWays({ home, today, onFile }: OtherWaysProps) {
  return (
    <div className="flex flex-wrap gap-3">
      <PasteBox onFile={onFile} today={today} />
      <LinkButton
        look="quiet"
        size="small"
        className="min-h-(--target)!"
        href={`${home}/reports/own-sheet`}
        icon={<Sheet aria-hidden="true" className="size-5" />}
      >
        Own spreadsheet
      </LinkButton>
      <LinkButton
        look="quiet"
        size="small"
        className="min-h-(--target)!"
        href={`${home}/reports/learnt`}
        icon={<GraduationCap aria-hidden="true" className="size-5" />}
      >
        What was learnt
      </LinkButton>
    </div>
  );
}
