'use client';

import Link from 'next/link';
import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { cx } from '../cx';
import { buttonClass } from './button-style';

export type MenuItem = {
  key: string;
  label: string;
  /** A second line in small type. */
  note?: string | undefined;
  icon?: ReactNode;
  destructive?: boolean;
  current?: boolean;
  /** A line is drawn above it. */
  parted?: boolean;
} & ({ href: string; onSelect?: never } | { onSelect: () => void; href?: never });

export type MenuProps = {
  label: ReactNode;
  /** When the label is only a mark, what it is called. */
  name?: string;
  items: readonly MenuItem[];
  look?: 'quiet' | 'plain' | 'bare';
  align?: 'start' | 'end';
};

const row =
  'flex min-h-(--target) w-full items-center gap-3 px-4 py-2 text-left outline-none select-none data-[highlighted]:bg-gley data-[highlighted]:text-white';

/** Not modal on purpose: the page behind can still be scrolled, and no style element has to be written for it. */
export function Menu({ label, name, items, look = 'quiet', align = 'start' }: MenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger
        aria-label={name}
        className={
          look === 'bare'
            ? 'flex min-h-(--target) min-w-(--target) max-w-full items-center justify-center gap-2 rounded-sm px-2 font-semibold hover:bg-silt'
            : buttonClass(look)
        }
      >
        <span className="min-w-0">{label}</span>
        <OpenMark />
      </DropdownMenu.Trigger>
      {/* Inside the page's main part, so that nothing stands outside a landmark. */}
      <DropdownMenu.Portal container={typeof document === 'undefined' ? null : document.getElementById('content')}>
        <DropdownMenu.Content
          align={align}
          sideOffset={6}
          collisionPadding={12}
          className="z-40 max-h-[70dvh] max-w-[calc(100vw-1.5rem)] min-w-56 overflow-y-auto rounded-sm border border-fallow border-t-2 border-t-gley bg-white py-1 shadow-lift"
        >
          {items.map((item) => (
            <Entry key={item.key} item={item} />
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

function Entry({ item }: { item: MenuItem }) {
  const look = cx(row, item.destructive && 'text-iron', item.current && 'font-bold');
  const inside = (
    <>
      {item.icon}
      <span className="min-w-0">
        {item.label}
        {item.note ? <span className="block text-sm opacity-85">{item.note}</span> : null}
      </span>
      {item.current ? <span aria-hidden className="ml-auto size-2.5 flex-none rounded-full bg-current" /> : null}
    </>
  );
  return (
    <>
      {item.parted ? <DropdownMenu.Separator className="my-1 border-t border-horizon-5" /> : null}
      {item.href === undefined ? (
        <DropdownMenu.Item className={look} onSelect={item.onSelect}>
          {inside}
        </DropdownMenu.Item>
      ) : (
        <DropdownMenu.Item asChild>
          <Link href={item.href} className={look} aria-current={item.current ? 'true' : undefined}>
            {inside}
          </Link>
        </DropdownMenu.Item>
      )}
    </>
  );
}

function OpenMark() {
  return (
    <svg viewBox="0 0 12 8" className="w-3 flex-none" aria-hidden="true" fill="none">
      <path
        d="M1.5 1.5L6 6l4.5-4.5"
        stroke="currentColor"
        strokeWidth="2"
        strokeLinecap="round"
        strokeLinejoin="round"
      />
    </svg>
  );
}
