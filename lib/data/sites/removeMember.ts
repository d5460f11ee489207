import { asMembershipId } from '@/lib/domain/ids';
import { memberInput } from '@/lib/schemas/sites';
import { mayHere, siteVerb } from '../verb';
import { endMembership } from './endMembership';
import { getMemberInSite } from './getMemberInSite';
import { queueForOwners } from './owners';

export const removeMember = siteVerb({
  act: 'site.manage',
  input: memberInput,
  run: async ({ ctx, tx, siteId, input, audit }) => {
    await queueForOwners(tx, siteId);
    // Asked again after the wait: whoever was before me may have taken my own right away.
    await mayHere(tx, ctx, siteId, 'site.manage');
    const member = await getMemberInSite(tx, siteId, asMembershipId(input.memberId));
    return endMembership(tx, { siteId, memberId: member.id, act: 'member.removed' }, audit);
  },
});
