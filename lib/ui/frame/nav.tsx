'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useEffect, useState } from 'react';
import { cx } from '../cx';
import { Dialog } from '../feedback/dialog';
import { currentItem, type NavItem } from './current-item';
import { NavIcon } from './nav-icon';

function Waiting({ count }: { count: number | undefined }) {
  if (!count) return null;
  return (
    <>
      <span
        aria-hidden
        className="grid min-w-6 place-items-center rounded-sm bg-ochre px-1 text-xs font-bold text-white"
      >
        {count}
      </span>
      <span className="sr-only">, {count} waiting</span>
    </>
  );
}

/** The row of links that stands on the datum line; the dot is where you are. */
type NavRowProps = {
  items: readonly NavItem[];
  label: string;
  className?: string;
  /** Off when another row stands on the line. */
  onLine?: boolean;
};

export function NavRow({ items, label, className, onLine = true }: NavRowProps) {
  const current = currentItem(items, usePathname());
  return (
    <nav aria-label={label} className={className}>
      <ul className="-ml-3 flex flex-wrap">
        {items.map((item) => (
          <li key={item.href}>
            <Link
              href={item.href}
              aria-current={item === current ? 'page' : undefined}
              className={cx(
                'flex min-h-(--target) items-center gap-2 px-3 font-semibold text-clay hover:text-gley-deep aria-[current]:text-humus',
                onLine && 'datum-stop pb-3',
              )}
            >
              {item.label}
              <Waiting count={item.waiting} />
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}

const PLACES = 5;

/** The same links within reach of a thumb; what does not fit opens as a sheet. */
export function NavBar({ items, label }: { items: readonly NavItem[]; label: string }) {
  const path = usePathname();
  const [open, setOpen] = useState(false);
  // biome-ignore lint/correctness/useExhaustiveDependencies: arriving somewhere closes the sheet
  useEffect(() => setOpen(false), [path]);

  const current = currentItem(items, path);
  const fits = items.length <= PLACES;
  const shown = fits ? items : items.slice(0, PLACES - 1);
  const rest = fits ? [] : items.slice(PLACES - 1);
  const place =
    'datum-stop flex w-full min-h-14 flex-col items-center justify-end gap-0.5 px-0.5 pt-4 pb-1.5 text-xs font-semibold text-clay aria-[current]:text-humus';

  return (
    <nav
      aria-label={label}
      data-frame="bar"
      className="datum-bar fixed inset-x-0 bottom-0 z-30 pb-[env(safe-area-inset-bottom)] md:hidden"
    >
      <ul className="flex">
        {shown.map((item) => (
          <li key={item.href} className="min-w-0 flex-1">
            <Link href={item.href} aria-current={item === current ? 'page' : undefined} className={place}>
              <span className="relative">
                <NavIcon name={item.icon} />
                <span className="absolute -top-1.5 left-4 leading-none">
                  <Waiting count={item.waiting} />
                </span>
              </span>
              <span className="max-w-full truncate leading-tight">{item.label}</span>
            </Link>
          </li>
        ))}
        {rest.length > 0 ? (
          <li className="min-w-0 flex-1">
            <button
              type="button"
              aria-haspopup="dialog"
              aria-expanded={open}
              aria-current={current && rest.includes(current) ? 'true' : undefined}
              className={place}
              onClick={() => setOpen(true)}
            >
              <NavIcon name="more" />
              More
            </button>
          </li>
        ) : null}
      </ul>
      <Dialog open={open} onOpenChange={setOpen} title="More places">
        <ul className="-mx-3">
          {rest.map((item) => (
            <li key={item.href} className="border-b border-horizon-5 last:border-0">
              <Link
                href={item.href}
                aria-current={item === current ? 'page' : undefined}
                className={cx(
                  'flex min-h-14 items-center gap-4 px-3 font-semibold hover:bg-silt',
                  item === current && 'text-gley',
                )}
                onClick={() => setOpen(false)}
              >
                <NavIcon name={item.icon} />
                {item.label}
                <Waiting count={item.waiting} />
              </Link>
            </li>
          ))}
        </ul>
      </Dialog>
    </nav>
  );
}
