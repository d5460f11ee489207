import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { auditEvent, membership } from '@/db/schema';
import type { Role } from '@/lib/access/table';
import type { Ctx } from '@/lib/data/context';
import { signUp } from '@/lib/data/people/signUp';
import { verifyAddress } from '@/lib/data/people/verifyAddress';
import { acceptInvitation } from '@/lib/data/sites/acceptInvitation';
import { changeRole } from '@/lib/data/sites/changeRole';
import { createSite } from '@/lib/data/sites/createSite';
import { declineInvitation } from '@/lib/data/sites/declineInvitation';
import { getSite } from '@/lib/data/sites/getSite';
import { invite } from '@/lib/data/sites/invite';
import { leaveSite } from '@/lib/data/sites/leaveSite';
import { listAudit } from '@/lib/data/sites/listAudit';
import { listInvitations } from '@/lib/data/sites/listInvitations';
import { listMembers } from '@/lib/data/sites/listMembers';
import { listMySites } from '@/lib/data/sites/listMySites';
import { lookAtInvitation } from '@/lib/data/sites/lookAtInvitation';
import { removeMember } from '@/lib/data/sites/removeMember';
import { revokeInvitation } from '@/lib/data/sites/revokeInvitation';
import { updateSite } from '@/lib/data/sites/updateSite';
import { withSite } from '@/lib/data/transaction';
import { asSiteId, type SiteId } from '@/lib/domain/ids';
import { ctxAs, ctxNobody, makePerson, makeSite, type TestPerson, useWorld } from '../support/factory';
import { GOOD_PASSWORD, linkIn, mailsTo, newAddress, problemOf } from '../support/people';

const world = useWorld();
const DAY = 24 * 3600;

const memberId = async (siteId: SiteId, who: TestPerson) => {
  const rows = await withSite(siteId, (tx) =>
    tx
      .select({ id: membership.id })
      .from(membership)
      .where(and(eq(membership.siteId, siteId), eq(membership.personId, who.id))),
  );
  return rows[0]?.id ?? randomUUID();
};
const acts = async (siteId: SiteId) =>
  (await withSite(siteId, (tx) => tx.select({ act: auditEvent.act }).from(auditEvent))).map((row) => row.act);
const invited = async (ctx: Ctx, siteId: SiteId, email: string, role: Role = 'helper') => {
  const { id } = await invite({ ctx, input: { siteId, email, role } });
  return { id, token: await linkIn(email, 'invitation') };
};

describe('a site', () => {
  it('is opened by anyone signed in, who owns it; it shows in their list and in nobody else’s', async () => {
    const who = await makePerson({ timeZone: 'Europe/London' });
    const ctx = await ctxAs(who);
    const { siteId } = await createSite({ ctx, input: { name: 'Tern Lane', country: 'GB', hemisphere: 'south' } });
    const site = await getSite({ ctx, input: { siteId } });
    expect(site).toMatchObject({ name: 'Tern Lane', role: 'owner', timeZone: 'Europe/London', planWidthM: 40 });
    const warm = site.warmMonths.flatMap((yes, month) => (yes ? [month + 1] : []));
    expect(warm).toEqual([1, 2, 3, 4, 10, 11, 12]);
    expect((await listMySites({ ctx, input: {} })).sites).toEqual([
      { id: siteId, name: 'Tern Lane', role: 'owner', plots: 0, inReview: 0 },
    ]);
    expect((await listMySites({ ctx: await ctxAs(await makePerson()), input: {} })).sites).toEqual([]);
  });

  it('[E 35] of somebody else answers exactly like one that does not exist', async () => {
    const site = await makeSite();
    const ctx = await ctxAs(await makePerson());
    const foreign = await problemOf(getSite({ ctx, input: { siteId: site.id } }));
    const missing = await problemOf(getSite({ ctx, input: { siteId: randomUUID() } }));
    expect({ ...foreign }).toEqual({ ...missing });
    expect(foreign.status).toBe(404);
  });

  it('[E 36] takes no field that is not a setting of it', async () => {
    const site = await makeSite('Kept');
    const ctx = await ctxAs(site.people.owner);
    const planted = { siteId: site.id, name: 'New', id: randomUUID(), site_id: randomUUID(), role: 'owner' };
    expect((await problemOf(updateSite({ ctx, input: planted as { siteId: string } }))).code).toBe('invalid');
    expect((await getSite({ ctx, input: { siteId: site.id } })).name).toBe('Kept');
    const after = await updateSite({ ctx, input: { siteId: site.id, name: 'New', planWidthM: 62.5 } });
    expect(after).toMatchObject({ name: 'New', planWidthM: 62.5, planHeightM: 25 });
    expect(await acts(site.id)).toContain('site.changed');
  });
});

describe('members', () => {
  it('see each other’s names; only owners see addresses', async () => {
    const site = await makeSite();
    const seen = await listMembers({ ctx: await ctxAs(site.people.viewer), input: { siteId: site.id } });
    expect(seen.members.map((one) => one.role).sort()).toEqual(['adviser', 'helper', 'owner', 'viewer']);
    expect(seen.members.map((one) => one.email)).toEqual([null, null, null, null]);
    expect(seen.members.filter((one) => one.isYou).map((one) => one.name)).toEqual([site.people.viewer.name]);
    const owner = await listMembers({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id } });
    expect(owner.members.map((one) => one.email)).toContain(site.people.helper.email);
  });

  it('[E 15] are given another role by an owner, on the record; it holds at their next request', async () => {
    const site = await makeSite();
    const id = await memberId(site.id, site.people.helper);
    const input = { siteId: site.id, memberId: id, role: 'adviser' as const };
    expect((await problemOf(changeRole({ ctx: await ctxAs(site.people.adviser), input }))).code).toBe('forbidden');
    await changeRole({ ctx: await ctxAs(site.people.owner), input });
    expect(await getSite({ ctx: await ctxAs(site.people.helper), input: { siteId: site.id } })).toMatchObject({
      role: 'adviser',
    });
    const { events } = await listAudit({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id } });
    expect(events[0]).toMatchObject({ act: 'member.role-changed', detail: { from: 'helper', to: 'adviser' } });
  });

  it('[E 21] who are removed find nothing at their next request', async () => {
    const site = await makeSite();
    const ctx = await ctxAs(site.people.adviser);
    await getSite({ ctx, input: { siteId: site.id } });
    const id = await memberId(site.id, site.people.adviser);
    await removeMember({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id, memberId: id } });
    expect((await problemOf(getSite({ ctx, input: { siteId: site.id } }))).status).toBe(404);
    expect(await acts(site.id)).toContain('member.removed');
  });

  it('of another site are not found, whoever asks', async () => {
    const [mine, theirs] = [await makeSite(), await makeSite()];
    const id = await memberId(theirs.id, theirs.people.helper);
    const ctx = await ctxAs(mine.people.owner);
    expect((await problemOf(removeMember({ ctx, input: { siteId: mine.id, memberId: id } }))).status).toBe(404);
    expect(
      (await problemOf(changeRole({ ctx, input: { siteId: mine.id, memberId: id, role: 'viewer' } }))).status,
    ).toBe(404);
  });

  it('[E 47] leave when they like, except the last owner', async () => {
    const site = await makeSite();
    await leaveSite({ ctx: await ctxAs(site.people.viewer), input: { siteId: site.id } });
    const owner = await ctxAs(site.people.owner);
    const own = await memberId(site.id, site.people.owner);
    const tries = [
      () => leaveSite({ ctx: owner, input: { siteId: site.id } }),
      () => removeMember({ ctx: owner, input: { siteId: site.id, memberId: own } }),
      () => changeRole({ ctx: owner, input: { siteId: site.id, memberId: own, role: 'adviser' } }),
    ];
    for (const one of tries) expect(await problemOf(one())).toMatchObject({ code: 'conflict', reason: 'last-owner' });
  });

  it('two owners who leave, or step down, at the same moment: one of them stays owner', async () => {
    for (let round = 0; round < 5; round += 1) {
      const site = await makeSite();
      const [a, b] = [site.people.owner, site.people.adviser];
      const second = await memberId(site.id, b);
      await changeRole({ ctx: await ctxAs(a), input: { siteId: site.id, memberId: second, role: 'owner' } });
      const done = await Promise.allSettled([
        leaveSite({ ctx: await ctxAs(a), input: { siteId: site.id } }),
        changeRole({ ctx: await ctxAs(b), input: { siteId: site.id, memberId: second, role: 'viewer' } }),
      ]);
      expect(done.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    }
  });
});

describe('an invitation', () => {
  it('goes out by mail, is looked at without being used, and makes a member of the role it named', async () => {
    const site = await makeSite('Tern Lane');
    const guest = await makePerson();
    const { token } = await invited(await ctxAs(site.people.owner), site.id, guest.email.toUpperCase(), 'adviser');
    for (let turn = 0; turn < 3; turn += 1) {
      const look = await lookAtInvitation({ ctx: await ctxAs(guest), input: { token } });
      expect(look).toMatchObject({
        siteName: 'Tern Lane',
        role: 'adviser',
        invitedBy: site.people.owner.name,
        next: 'accept',
      });
    }
    const both = await Promise.allSettled([
      acceptInvitation({ ctx: await ctxAs(guest), input: { token } }),
      acceptInvitation({ ctx: await ctxAs(guest), input: { token } }),
    ]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    expect(await getSite({ ctx: await ctxAs(guest), input: { siteId: site.id } })).toMatchObject({ role: 'adviser' });
    const again = await problemOf(acceptInvitation({ ctx: await ctxAs(guest), input: { token } }));
    expect(again).toMatchObject({ status: 410, reason: 'accepted' });
  });

  it('[E 70] is bound to the invited address: another account is told which one to use', async () => {
    const site = await makeSite();
    const { token } = await invited(await ctxAs(site.people.owner), site.id, newAddress());
    const other = await makePerson();
    const ctx = await ctxAs(other);
    expect((await lookAtInvitation({ ctx, input: { token } })).next).toBe('other-account');
    const problem = await problemOf(acceptInvitation({ ctx, input: { token } }));
    expect(problem).toMatchObject({ code: 'conflict', reason: 'other-account' });
    expect(problem.sentence).toContain(other.email);
    expect((await problemOf(getSite({ ctx, input: { siteId: site.id } }))).status).toBe(404);
  });

  it('to somebody without an account is accepted by confirming the address of the sign-up it led to', async () => {
    const site = await makeSite();
    const email = newAddress();
    const { token } = await invited(await ctxAs(site.people.owner), site.id, email);
    const ctx = await ctxNobody();
    expect((await lookAtInvitation({ ctx, input: { token } })).next).toBe('sign-up');
    await signUp({ ctx, input: { name: 'New Hand', email, password: GOOD_PASSWORD, invitation: token } });
    expect(
      (await listMembers({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id } })).members,
    ).toHaveLength(4);
    const done = await verifyAddress({ ctx, input: { token: await linkIn(email, 'verify-address') } });
    expect(done).toEqual({ email, invitation: 'accepted', siteId: site.id });
    const { members } = await listMembers({ ctx: await ctxAs(site.people.owner), input: { siteId: site.id } });
    expect(members.find((one) => one.email === email)).toMatchObject({ role: 'helper', name: 'New Hand' });
  });

  it('does not follow a sign-up with another address, and a revoked one does not stop the address being confirmed', async () => {
    const site = await makeSite();
    const owner = await ctxAs(site.people.owner);
    const { id, token } = await invited(owner, site.id, newAddress());
    const ctx = await ctxNobody();
    const other = newAddress();
    await signUp({ ctx, input: { name: 'Passer By', email: other, password: GOOD_PASSWORD, invitation: token } });
    const done = await verifyAddress({ ctx, input: { token: await linkIn(other, 'verify-address') } });
    expect(done).toEqual({ email: other, invitation: 'gone', siteId: null });
    expect((await listInvitations({ ctx: owner, input: { siteId: site.id } })).invitations[0]).toMatchObject({
      id,
      state: 'open',
    });
  });

  it('can be declined by the link alone, taken back, and not answered twice', async () => {
    const site = await makeSite();
    const owner = await ctxAs(site.people.owner);
    const no = await invited(owner, site.id, newAddress());
    await declineInvitation({ ctx: await ctxNobody(), input: { token: no.token } });
    const later = await problemOf(declineInvitation({ ctx: await ctxNobody(), input: { token: no.token } }));
    expect(later).toMatchObject({ status: 410, reason: 'declined' });
    const back = await invited(owner, site.id, newAddress());
    await revokeInvitation({ ctx: owner, input: { siteId: site.id, invitationId: back.id } });
    const revoked = await problemOf(lookAtInvitation({ ctx: await ctxNobody(), input: { token: back.token } }));
    expect(revoked).toMatchObject({ status: 410, reason: 'revoked' });
    const twice = await problemOf(revokeInvitation({ ctx: owner, input: { siteId: site.id, invitationId: back.id } }));
    expect(twice.code).toBe('conflict');
    expect(await acts(site.id)).toEqual(expect.arrayContaining(['invitation.declined', 'invitation.revoked']));
  });

  it('[E 65] stands for 7 days; then the same address can be invited anew', async () => {
    const site = await makeSite();
    const guest = await makePerson();
    const { token } = await invited(await ctxAs(site.people.owner), site.id, guest.email);
    try {
      await world.moveClock(7 * DAY - 60);
      await lookAtInvitation({ ctx: await ctxAs(guest), input: { token } });
      await world.moveClock(7 * DAY + 1);
      const late = await problemOf(acceptInvitation({ ctx: await ctxAs(guest), input: { token } }));
      expect(late).toMatchObject({ status: 410, reason: 'expired' });
      const owner = await ctxAs(site.people.owner);
      const before = await listInvitations({ ctx: owner, input: { siteId: site.id } });
      expect(before.invitations.map((one) => one.state)).toEqual(['expired']);
      const again = await invited(owner, site.id, guest.email);
      await acceptInvitation({ ctx: await ctxAs(guest), input: { token: again.token } });
    } finally {
      await world.moveClock(0);
    }
  });

  it('[E 64] is kept as a hash', async () => {
    const site = await makeSite();
    const { token } = await invited(await ctxAs(site.people.owner), site.id, newAddress());
    const backup = await import('postgres').then(({ default: postgres }) =>
      postgres(world.urls().backupUrl, { max: 1 }),
    );
    const rows = await backup`select 1 from invitation t where t::text like ${`%${token}%`}`;
    await backup.end();
    expect(rows).toHaveLength(0);
  });

  it('is not sent twice to one address, nor to a member, nor by anyone but an owner', async () => {
    const site = await makeSite();
    const owner = await ctxAs(site.people.owner);
    const email = newAddress();
    const input = { siteId: site.id, email, role: 'viewer' as const };
    const both = await Promise.allSettled([invite({ ctx: owner, input }), invite({ ctx: owner, input })]);
    expect(both.filter((one) => one.status === 'fulfilled')).toHaveLength(1);
    expect(await mailsTo(email, 'invitation')).toHaveLength(1);
    const member = await problemOf(invite({ ctx: owner, input: { ...input, email: site.people.helper.email } }));
    expect(member.reason).toBe('member-already');
    const adviser = await problemOf(
      invite({ ctx: await ctxAs(site.people.adviser), input: { ...input, email: newAddress() } }),
    );
    expect(adviser.code).toBe('forbidden');
    const stranger = await problemOf(
      invite({
        ctx: await ctxAs(await makePerson()),
        input: { ...input, siteId: asSiteId(site.id), email: newAddress() },
      }),
    );
    expect(stranger.code).toBe('not-found');
  });
});
