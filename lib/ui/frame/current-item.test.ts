import { describe, expect, it } from 'vitest';
import { currentItem, type NavItem } from './current-item';

const items: NavItem[] = [
  { href: '/', label: 'Today', icon: 'today' },
  { href: '/sites/a', label: 'Ground', icon: 'ground' },
  { href: '/sites/a/reports', label: 'Reports', icon: 'reports' },
  { href: '/sites', label: 'Sites', icon: 'sites', exact: true },
];

describe('currentItem', () => {
  it.each([
    ['/', 'Today'],
    ['/sites', 'Sites'],
    ['/sites/a', 'Ground'],
    ['/sites/a/plots/7', 'Ground'],
    ['/sites/a/reports/9', 'Reports'],
  ])('%s is under %s', (path, label) => {
    expect(currentItem(items, path)?.label).toBe(label);
  });

  it.each(['/account', '/sites/ab', '/sites/b/reports'])('%s is under none of them', (path) => {
    expect(currentItem(items, path)).toBeUndefined();
  });
});
