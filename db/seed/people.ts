import type { Role } from '@/lib/access/table';
import type { DemoPerson, PersonKey } from './types';

/** Nobody of these exists, and no mail can reach them: .example is kept free for such addresses. */
export const PEOPLE: Record<PersonKey, DemoPerson> = {
  maud: {
    name: 'Maud Ellerker',
    email: 'maud@sloebank.example',
    password: 'blanch the leeks in june',
    since: '2023-04-01',
  },
  tobias: {
    name: 'Tobias Ruddle',
    email: 'tobias@cinderlane.example',
    password: 'turn the marrow on its tile',
    since: '2023-04-02',
  },
  agnes: {
    name: 'Agnes Fairlamb',
    email: 'agnes@weircottage.example',
    password: 'string the onions by the fire',
    since: '2023-04-03',
  },
  hester: {
    name: 'Hester Quayle',
    email: 'hester@showbench.example',
    password: 'three sites and one auger',
    since: '2023-04-04',
  },
  joss: {
    name: 'Joss Penhallam',
    email: 'joss@sloebank.example',
    password: 'twenty cores in one bucket',
    since: '2024-03-10',
  },
  nell: {
    name: 'Nell Winterslow',
    email: 'nell@sloebank.example',
    password: 'only looking at the beds',
    since: '2025-02-22',
  },
};

/** One sign-in a role, all of whom see the first site. */
export const SIGN_INS: readonly { role: Role; who: PersonKey }[] = [
  { role: 'owner', who: 'maud' },
  { role: 'adviser', who: 'hester' },
  { role: 'helper', who: 'joss' },
  { role: 'viewer', who: 'nell' },
];
