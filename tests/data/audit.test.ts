import { eq } from 'drizzle-orm';
import { describe, expect, it, vi } from 'vitest';
import { auditEvent, membership, outbox, person, token } from '@/db/schema';
import { readLinkToken } from '@/lib/data/mail/linkToken';
import { hashSecret } from '@/lib/data/people/secrets';
import { setRule } from '@/lib/data/reminders/setRule';
import { changeRole } from '@/lib/data/sites/changeRole';
import { listAudit } from '@/lib/data/sites/listAudit';
import { withPeople, withSite } from '@/lib/data/transaction';
import { sweepReminders } from '@/lib/jobs/sweepReminders/handler';
import * as letters from '@/lib/jobs/sweepReminders/letter';
import { ctxAs, ctxNobody, ctxWorker, makePerson, makePlot, makeSite, makeTest, useWorld } from '../support/factory';
import { holding, untilWaiting } from '../support/held';
import { problemOf } from '../support/people';

const world = useWorld();

describe('the audit trail', () => {
  it('shows every event once, though a page ends between events of one moment', async () => {
    const site = await makeSite();
    const at = new Date('2026-04-01T10:00:00Z');
    const event = { siteId: site.id, at, act: 'test', objectKind: 'plot', objectId: 'x' };
    await withSite(site.id, (tx) => tx.insert(auditEvent).values(Array.from({ length: 120 }, () => event)));
    const ctx = await ctxAs(site.people.owner);
    const seen: string[] = [];
    let before: string | null | undefined;
    do {
      const page = await listAudit({ ctx, input: { siteId: site.id, ...(before ? { before } : {}) } });
      seen.push(...page.events.map((one) => one.id));
      before = page.before;
    } while (before);
    expect(seen).toHaveLength(120);
    expect(new Set(seen).size).toBe(120);
  });
});

describe('[E 34] a right that ends while one waits', () => {
  it('is asked for again: an owner who was just made a viewer changes nobody’s role', async () => {
    const site = await makeSite();
    const second = await makePerson();
    const ids = await withSite(site.id, async (tx) => {
      await tx.insert(membership).values({ siteId: site.id, personId: second.id, role: 'owner' });
      return tx.select().from(membership);
    });
    const idOf = (personId: string) => ids.find((row) => row.personId === personId)?.id ?? '';
    const held = await holding(async (tx) => {
      const { enterSite } = await import('@/lib/data/transaction');
      const { queueForOwners } = await import('@/lib/data/sites/owners');
      await enterSite(tx, site.id);
      await queueForOwners(tx, site.id);
      await tx
        .update(membership)
        .set({ role: 'viewer' })
        .where(eq(membership.id, idOf(second.id)));
    });
    const changing = problemOf(
      changeRole({
        ctx: await ctxAs(second),
        input: { siteId: site.id, memberId: idOf(site.people.viewer.id), role: 'owner' },
      }),
    );
    await untilWaiting(world, 1, changing);
    await held.release();
    expect(await changing).toMatchObject({ code: 'forbidden' });
  });
});

describe('[E 21] a link in a letter', () => {
  it('of somebody who was disabled opens nothing', async () => {
    const who = await makePerson();
    const secret = 's'.repeat(43);
    await withPeople((tx) =>
      tx.insert(token).values({
        id: hashSecret(secret),
        personId: who.id,
        purpose: 'mail-action',
        email: who.email,
        expiresAt: new Date(Date.now() + 3600_000),
      }),
    );
    const ctx = await ctxNobody();
    const open = () => withPeople((tx) => readLinkToken(tx, ctx, secret, 'mail-action'));
    expect((await open()).personId).toBe(who.id);
    await withPeople((tx) => tx.update(person).set({ disabledAt: new Date() }).where(eq(person.id, who.id)));
    expect(await problemOf(open())).toMatchObject({ code: 'gone' });
  });
});

describe('the sweep of reminders', () => {
  it('writes to everybody else when one letter cannot be written', async () => {
    const site = await makeSite();
    const plotId = await makePlot(site.id);
    await makeTest(site, plotId, '2026-04-11', [{ analyte: 'soil_ph_water', value: '6.4', unit: 'pH' }]);
    const ctx = await ctxAs(site.people.owner);
    await setRule({ ctx, input: { siteId: site.id, plotId, kind: 'yearly-same-season', active: true } });
    const write = letters.reminderLetter;
    const spoilt = vi.spyOn(letters, 'reminderLetter').mockImplementation((origin, letter, secrets) => {
      if (letter.reader.id === site.people.owner.id) throw new Error('no paper');
      return write(origin, letter, secrets);
    });
    const now = new Date('2027-04-11T16:00:00Z');
    expect(await sweepReminders({ ...(await ctxWorker()), now })).toBe(2);
    spoilt.mockRestore();
    expect(await sweepReminders({ ...(await ctxWorker()), now })).toBe(1);
    const sent = await withPeople((tx) => tx.select().from(outbox).where(eq(outbox.kind, 'reminder')));
    expect(sent).toHaveLength(3);
  });
});
