'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';

export type LinkTab = { href: string; label: string };

/** Pages that belong together (history, compare, records of one plot), each with an address of its own. */
export function LinkTabs({ tabs, label, current }: { tabs: readonly LinkTab[]; label: string; current?: string }) {
  const path = usePathname();
  const here = current ?? path;
  return (
    <nav aria-label={label} className="max-w-full overflow-x-auto">
      <ul className="flex gap-1 border-b border-fallow">
        {tabs.map((tab) => (
          <li key={tab.href}>
            <Link
              href={tab.href}
              aria-current={tab.href === here ? 'page' : undefined}
              className="-mb-px flex min-h-(--target) items-center border-b-4 border-transparent px-3 font-semibold whitespace-nowrap text-clay -outline-offset-3 hover:bg-silt hover:text-humus aria-[current]:border-gley aria-[current]:text-humus"
            >
              {tab.label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
