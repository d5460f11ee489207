import { ROLES } from '@/lib/access/table';
import { ROLE_WORDS } from '@/lib/access/words';

export const ROLE_OPTIONS = ROLES.map((role) => ({
  value: role,
  label: role.charAt(0).toUpperCase() + role.slice(1),
  hint: ROLE_WORDS[role].may,
}));

export const onDay = (moment: string) =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: 'UTC' }).format(new Date(moment));
