import type { NavIconName } from './nav-icon';

export type NavItem = {
  href: string;
  label: string;
  icon: NavIconName;
  /** Only this very address counts as being there; without it, anything under it does too. */
  exact?: boolean;
  /** How many wait there; said in words to screen readers. */
  waiting?: number;
};

/** The item whose address is the longest one that holds this path. */
export function currentItem(items: readonly NavItem[], path: string): NavItem | undefined {
  return items
    .filter((item) => path === item.href || (!item.exact && item.href !== '/' && path.startsWith(`${item.href}/`)))
    .sort((a, b) => b.href.length - a.href.length)[0];
}
