import type { ReactNode } from 'react';
import { CoreAndLine } from './core-and-line';

type HeroProps = { title: ReactNode; lead: ReactNode; actions: ReactNode; note?: ReactNode };

/** The product in one drawing: a core under the line, and the line that four tests draw. */
export function Hero({ title, lead, actions, note }: HeroProps) {
  return (
    <section className="overflow-x-clip">
      <div className="page-wrap grid gap-x-12 gap-y-6 lg:grid-cols-[minmax(0,26rem)_1fr] lg:gap-x-16">
        <div className="pt-10 sm:pt-16 lg:pb-20">
          <h1 className="text-3xl sm:text-4xl">{title}</h1>
          <p className="mt-5 max-w-measure text-lg">{lead}</p>
          <div className="mt-7 flex flex-wrap gap-3">{actions}</div>
          {note ? <p className="mt-4 max-w-measure text-sm text-clay">{note}</p> : null}
        </div>
        <CoreAndLine />
      </div>
    </section>
  );
}
