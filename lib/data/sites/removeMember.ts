import { asMembershipId } from '@/lib/domain/ids';
import { memberInput } from '@/lib/schemas/sites';
import { siteVerb } from '../verb';
import { endMembership } from './endMembership';
import { getMemberInSite } from './getMemberInSite';

export const removeMember = siteVerb({
  act: 'site.manage',
  input: memberInput,
  run: async ({ tx, siteId, input, audit }) => {
    const member = await getMemberInSite(tx, siteId, asMembershipId(input.memberId));
    return endMembership(tx, { siteId, memberId: member.id, act: 'member.removed' }, audit);
  },
});
