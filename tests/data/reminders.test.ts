import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { outbox, outboxItem, reminder } from '@/db/schema';
import { recordApplication } from '@/lib/data/applications/recordApplication';
import { removeApplication } from '@/lib/data/applications/removeApplication';
import { unsubscribe } from '@/lib/data/mail/unsubscribe';
import { closeReminder } from '@/lib/data/reminders/closeReminder';
import { collectDue } from '@/lib/data/reminders/collectDue';
import { listDue } from '@/lib/data/reminders/listDue';
import { listRules } from '@/lib/data/reminders/listRules';
import { doMailAction, showMailActions } from '@/lib/data/reminders/mailActions';
import { setRule } from '@/lib/data/reminders/setRule';
import { snoozeReminder } from '@/lib/data/reminders/snoozeReminder';
import { withPeople, withSite } from '@/lib/data/transaction';
import type { PlotId } from '@/lib/domain/ids';
import { sweepReminders } from '@/lib/jobs/sweepReminders/handler';
import { ctxAs, ctxWorker, makePlot, makeSite, makeTest, type TestSite, useWorld } from '../support/factory';

const world = useWorld();
const PH = { analyte: 'soil_ph_water', value: '7.2', unit: 'pH' };

/** Sets the database's clock to a moment, as seen by everything that asks it. */
async function at(moment: string): Promise<void> {
  await world.moveClock(Math.round((new Date(moment).getTime() - Date.now()) / 1000));
}

const lettersTo = (personId: string) =>
  withPeople((tx) => tx.select().from(outbox).where(eq(outbox.personId, personId)));

describe('reminders', () => {
  let site: TestSite;
  let plotId: PlotId;

  beforeAll(async () => {
    site = await makeSite();
    plotId = await makePlot(site.id, { name: 'Long border' });
    await at('2026-04-20T15:00:00Z');
    await makeTest(site, plotId, '2026-04-11', [PH]);
    const ctx = await ctxAs(site.people.owner);
    await setRule({ ctx, input: { siteId: site.id, plotId, kind: 'yearly-same-season', active: true } });
  });

  it('comes due a year after the last sample, in the same season', async () => {
    const { due } = await listDue({ ctx: await ctxAs(site.people.viewer), input: { siteId: site.id } });
    expect(due.map((one) => [one.plotName, one.dueOn, one.inDays, one.mayClose])).toEqual([
      ['Long border', '2027-04-11', 356, false],
    ]);
  });

  it('moves when sulfur is recorded under a rule for it, and goes when the record does', async () => {
    const ctx = await ctxAs(site.people.owner);
    await setRule({ ctx, input: { siteId: site.id, plotId, kind: 'after-sulfur', active: true } });
    expect((await listDue({ ctx, input: { siteId: site.id } })).due).toHaveLength(1);
    const { id } = await recordApplication({
      ctx,
      input: {
        siteId: site.id,
        plotId,
        material: { name: 'Sulfur', reaction: 'sulfur', affects: ['soil_ph_water'] },
        amount: 10,
        amountUnit: 'lb',
        appliedOn: '2026-04-18',
        intents: [],
      },
    });
    const after = (await listDue({ ctx, input: { siteId: site.id } })).due.find((one) => one.kind === 'after-sulfur');
    // Half of fine sulfur after three months of 30 days at or above 13 C; this site is warm from April on.
    expect(after?.dueOn).toBe('2026-07-17');
    await removeApplication({ ctx, input: { siteId: site.id, applicationId: id, reason: 'wrong plot' } });
    const left = (await listDue({ ctx, input: { siteId: site.id } })).due.map((one) => one.kind);
    expect(left).toEqual(['yearly-same-season']);
    const { rules } = await listRules({ ctx, input: { siteId: site.id } });
    expect(rules.find((rule) => rule.kind === 'after-sulfur')).toMatchObject({ active: true, dueOn: null });
  });

  it('is written once to each who works there, at their own hour, though two workers sweep at once', async () => {
    await at('2027-03-28T10:59:00Z'); // 06:59 in New York
    expect(await sweepReminders(await ctxWorker())).toBe(0);
    await at('2027-03-28T11:01:00Z'); // 07:01 there, two weeks ahead
    const [one, two] = [await ctxWorker(), await ctxWorker()];
    const queued = await Promise.all([sweepReminders(one), sweepReminders(two), sweepReminders(one)]);
    expect(queued.reduce((sum, count) => sum + count, 0)).toBe(3);
    for (const who of ['owner', 'adviser', 'helper'] as const) {
      const letters = await lettersTo(site.people[who].id);
      expect(letters.map((letter) => letter.kind)).toEqual(['reminder']);
      expect(letters[0]?.subject).toContain('Long border');
      expect(letters[0]?.text).toContain('11 April 2027');
      expect(letters[0]?.headers['List-Unsubscribe-Post']).toBe('List-Unsubscribe=One-Click');
      expect(letters[0]?.attachments[0]?.content).toContain('DTSTART;VALUE=DATE:20270411');
    }
    expect(await lettersTo(site.people.viewer.id)).toEqual([]);
  });

  it('is not repeated the next day, and comes again on the day itself', async () => {
    await at('2027-03-29T12:00:00Z');
    expect(await sweepReminders(await ctxWorker())).toBe(0);
    await at('2027-04-11T12:00:00Z');
    expect(await collectDue({ ctx: await ctxWorker(), input: {} })).toHaveLength(3);
  });

  it('is one digest when several plots are due on a day', async () => {
    const second = await makePlot(site.id, { name: 'Wall bed' });
    await makeTest(site, second, '2026-04-11', [PH]);
    await setRule({
      ctx: await ctxAs(site.people.owner),
      input: { siteId: site.id, plotId: second, kind: 'yearly-same-season', active: true },
    });
    expect(await sweepReminders(await ctxWorker())).toBe(3);
    const letters = await lettersTo(site.people.owner.id);
    expect(letters).toHaveLength(2);
    const digest = letters.find((letter) => letter.dedupeKey.endsWith('2027-04-11'));
    expect(digest?.text).toContain('Long border');
    expect(digest?.text).toContain('Wall bed');
    expect(digest?.attachments).toHaveLength(2);
  });

  it('snooze is one person’s; already sampled is everybody’s', async () => {
    const [row] = await withSite(site.id, (tx) => tx.select().from(reminder).where(eq(reminder.plotId, plotId)));
    const reminderId = row?.id ?? '';
    const helper = await ctxAs(site.people.helper);
    await snoozeReminder({ ctx: helper, input: { siteId: site.id, reminderId, until: '2027-04-25' } });
    await at('2027-04-25T12:00:00Z');
    const letters = await collectDue({ ctx: await ctxWorker(), input: {} });
    const whose = letters.filter((letter) => letter.notices.some((notice) => notice.reminderId === reminderId));
    expect(whose.map((letter) => letter.reader.id).sort()).toEqual(
      [site.people.owner.id, site.people.adviser.id, site.people.helper.id].sort(),
    );
    await closeReminder({ ctx: helper, input: { siteId: site.id, reminderId } });
    const open = (await collectDue({ ctx: await ctxWorker(), input: {} })).flatMap((letter) => letter.notices);
    expect(open.some((notice) => notice.reminderId === reminderId)).toBe(false);
    await expect(closeReminder({ ctx: helper, input: { siteId: site.id, reminderId } })).rejects.toMatchObject({
      code: 'conflict',
    });
  });

  it('a viewer cannot close it, and another site’s reminder is not found', async () => {
    const { due } = await listDue({ ctx: await ctxAs(site.people.viewer), input: { siteId: site.id } });
    const reminderId = due[0]?.id ?? '';
    expect(reminderId).not.toBe('');
    const viewer = await ctxAs(site.people.viewer);
    await expect(closeReminder({ ctx: viewer, input: { siteId: site.id, reminderId } })).rejects.toMatchObject({
      code: 'forbidden',
    });
    const other = await makeSite('Other');
    const stranger = await ctxAs(other.people.owner);
    await expect(closeReminder({ ctx: stranger, input: { siteId: other.id, reminderId } })).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it('the letter’s links act in the reader’s name, and looking changes nothing', async () => {
    const [letter] = await lettersTo(site.people.adviser.id);
    const token = /reminder\?token=([\w-]+)/.exec(letter?.text ?? '')?.[1] ?? '';
    const ctx = await ctxWorker();
    const nobody = { ...ctx, actor: { kind: 'nobody' as const } };
    const items = await withPeople((tx) =>
      tx
        .select()
        .from(outboxItem)
        .where(eq(outboxItem.outboxId, letter?.id ?? '')),
    );
    const before = await showMailActions({ ctx: nobody, input: { token } });
    expect(before.reminders.map((one) => one.id)).toEqual(items.map((item) => item.reminderId));
    const { due } = await listDue({ ctx: await ctxAs(site.people.adviser), input: { siteId: site.id } });
    const foreign = due.find((one) => one.id !== items[0]?.reminderId)?.id ?? '';
    await expect(
      doMailAction({ ctx: nobody, input: { token, reminderId: foreign, action: 'already-sampled' } }),
    ).rejects.toMatchObject({ code: 'not-found' });
  });

  it('one click ends it for that person alone, and the link may be pressed twice', async () => {
    const letters = await lettersTo(site.people.owner.id);
    const token = /unsubscribe\?token=([\w-]+)/.exec(letters[0]?.headers['List-Unsubscribe'] ?? '')?.[1] ?? '';
    const ctx = { ...(await ctxWorker()), actor: { kind: 'nobody' as const } };
    await unsubscribe({ ctx, input: { token } });
    await unsubscribe({ ctx, input: { token } });
    await expect(unsubscribe({ ctx, input: { token: `${token.slice(0, -3)}xyz` } })).rejects.toMatchObject({
      code: 'gone',
    });
    const readers = (await collectDue({ ctx: await ctxWorker(), input: {} })).map((letter) => letter.reader.id);
    expect(readers).not.toContain(site.people.owner.id);
    expect(readers).toContain(site.people.adviser.id);
  });
});
