import { signUp } from '@/lib/data/people/signUp';
import { verifyAddress } from '@/lib/data/people/verifyAddress';
import { acceptInvitation } from '@/lib/data/sites/acceptInvitation';
import { invite } from '@/lib/data/sites/invite';
import { later, nobodyOn, personOn } from './clock';
import { linkIn } from './mailbox';
import { PEOPLE } from './people';
import type { DemoPerson, DemoSite } from './types';

export async function signUpAs({ name, email, password, since }: DemoPerson): Promise<void> {
  const ctx = await nobodyOn(since);
  await signUp({ ctx, input: { name, email, password, timeZone: 'America/New_York', units: 'us' } });
  await verifyAddress({ ctx, input: { token: await linkIn(email, 'verify-address') } });
}

/** Invited by the owner on the day the site began, or on the day the person came later. */
export async function inviteMembers(siteId: string, site: DemoSite): Promise<void> {
  const owner = PEOPLE[site.owner];
  for (const { who, role } of site.members) {
    const { email, since } = PEOPLE[who];
    const day = later(since, site.since);
    await invite({ ctx: await personOn(day, owner.email), input: { siteId, email, role } });
    await acceptInvitation({
      ctx: await personOn(day, email),
      input: { token: await linkIn(email, 'invitation') },
    });
  }
}
