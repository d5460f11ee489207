import type { ReactNode } from 'react';
import type { FooterLink } from '@/lib/ui/frame/footer';
import { PublicFrame } from '@/lib/ui/frame/public-frame';

/** The pages before a sign-in: one heading, a sentence, a form. */
export function Door({
  title,
  lead,
  links = [],
  children,
}: {
  title: string;
  lead?: ReactNode;
  links?: readonly FooterLink[];
  children: ReactNode;
}) {
  return (
    <PublicFrame links={links}>
      <h1 className="text-2xl sm:text-3xl">{title}</h1>
      {lead ? <p className="mt-3 max-w-measure text-clay">{lead}</p> : null}
      <div className="mt-7">{children}</div>
    </PublicFrame>
  );
}
