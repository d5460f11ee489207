'use client';

import { Menu } from '@/lib/ui/actions/menu';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { NavIcon } from '@/lib/ui/frame/nav-icon';

export function AccountMenu({ name }: { name: string }) {
  const announce = useAnnounce();
  const signOut = async () => {
    const result = await callApi('session', { method: 'DELETE' });
    if (!result.ok) return announce(`You are still signed in. ${result.problem.detail}`, { tone: 'error' });
    window.location.assign('/sign-in?why=signed-out');
  };
  return (
    <Menu
      look="bare"
      align="end"
      name={`${name}: your account`}
      label={
        <span className="flex items-center gap-2">
          <NavIcon name="account" className="size-6" />
          <span className="hidden max-w-40 truncate xl:block">{name}</span>
        </span>
      }
      items={[
        { key: 'account', label: 'Your settings', note: name, href: '/account' },
        { key: 'new-site', label: 'Open a new site', href: '/new-site' },
        { key: 'out', label: 'Sign out', onSelect: () => void signOut(), parted: true },
      ]}
    />
  );
}
