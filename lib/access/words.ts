import type { Role } from './table';

/** What an invitation says about the role it offers. */
export const ROLE_WORDS: Record<Role, { a: string; may: string }> = {
  owner: {
    a: 'an owner',
    may: 'Owners do everything, including members, invitations and the site itself.',
  },
  adviser: {
    a: 'an adviser',
    may: 'Advisers draw plots, confirm reports and plan amendments; members and invitations stay with the owners.',
  },
  helper: {
    a: 'a helper',
    may: 'Helpers add samples, upload and review reports and record what was spread; they do not confirm results.',
  },
  viewer: {
    a: 'a viewer',
    may: 'Viewers read plots, results, history and verdicts; they change nothing and do not see the original files.',
  },
};
