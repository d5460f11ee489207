export const ROLES = ['owner', 'adviser', 'helper', 'viewer'] as const;
export type Role = (typeof ROLES)[number];

const everyone = ['owner', 'adviser', 'helper', 'viewer'] as const;
const hands = ['owner', 'adviser', 'helper'] as const;
const deciders = ['owner', 'adviser'] as const;
const owners = ['owner'] as const;

/** Who may do what on a site. Roles are words of the trade; the rows are acts, not screens. */
export const ACCESS = {
  'site.read': everyone,
  'report.open-file': hands,
  'site.manage': owners,
  'ground.edit': deciders,
  'round.plan': deciders,
  'record.add': hands,
  'record.correct-own': hands,
  'record.correct-any': deciders,
  'reading.work': hands,
  'reading.decide': deciders,
  'plan.decide': deciders,
  'comment.write': everyone,
  'reminder.already-sampled': hands,
  'self.manage': everyone,
  'token.own': everyone,
} as const satisfies Record<string, readonly Role[]>;

export type Act = keyof typeof ACCESS;
export const ACTS = Object.keys(ACCESS) as Act[];

export function can(role: Role, act: Act): boolean {
  return (ACCESS[act] as readonly Role[]).includes(role);
}
