import type { ReactNode } from 'react';
import { cx } from '../cx';

export type Definition = { term: string; said: ReactNode; note?: ReactNode };

export function DefinitionList({ items, className }: { items: readonly Definition[]; className?: string }) {
  return (
    <dl className={cx('grid max-w-3xl content-start', className)}>
      {items.map((item) => (
        <div
          key={item.term}
          className="grid gap-x-6 border-b border-horizon-5 py-2.5 first:border-t sm:grid-cols-[12rem_1fr]"
        >
          <dt className="text-clay">{item.term}</dt>
          <dd className="min-w-0 font-semibold">
            {item.said}
            {item.note ? <span className="block text-sm font-normal text-clay">{item.note}</span> : null}
          </dd>
        </div>
      ))}
    </dl>
  );
}
