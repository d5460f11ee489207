import { and, eq, ne, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { membership, outbox } from '@/db/schema';
import { queueMail } from '@/lib/data/mail/queueMail';
import { setRule } from '@/lib/data/reminders/setRule';
import { withPeople, withSite } from '@/lib/data/transaction';
import { ctxAs, makePlot, makeSite, makeTest, type TestPerson, useWorld } from '../support/factory';
import { startMailService } from '../support/mailService';
import { until } from '../support/until';
import { startWorker, type WorkerProcess } from '../support/workerProcess';

/**
 * [E 69] The real worker process against the mail service's protocol: a letter leaves once, whatever dies in between.
 * One worker serves several tests, since starting a process is what takes the time.
 */
// A process takes a few seconds to start, and several times that on a machine that runs all tests at once.
vi.setConfig({ testTimeout: 120_000 });
const world = useWorld();
const started: WorkerProcess[] = [];
let mail: Awaited<ReturnType<typeof startMailService>>;

beforeAll(async () => {
  mail = await startMailService();
});
afterAll(async () => {
  mail.letAnswersGo();
  await Promise.all(started.map((worker) => worker.killHard()));
  await mail.stop();
});

function worker(): WorkerProcess {
  const one = startWorker({ DATABASE_URL: world.urls().appUrl, RESEND_BASE_URL: mail.url });
  started.push(one);
  return one;
}

const at = (moment: string) => world.moveClock(Math.round((new Date(moment).getTime() - Date.now()) / 1000));

/** A site of one person, with a plot last sampled a year before `dueOn`. */
async function reminderDue(dueOn: string, lastSampled: string): Promise<TestPerson> {
  const site = await makeSite(`Due ${dueOn}`);
  const { owner } = site.people;
  await withSite(site.id, (tx) =>
    tx.delete(membership).where(and(eq(membership.siteId, site.id), ne(membership.personId, owner.id))),
  );
  const plotId = await makePlot(site.id, { name: 'Long border' });
  await makeTest(site, plotId, lastSampled, [{ analyte: 'soil_ph_water', value: '6.4', unit: 'pH' }]);
  await setRule({
    ctx: await ctxAs(owner),
    input: { siteId: site.id, plotId, kind: 'yearly-same-season', active: true },
  });
  return owner;
}

const rowsTo = (who: TestPerson) => withPeople((tx) => tx.select().from(outbox).where(eq(outbox.toAddress, who.email)));
const waitingToWrite = async () => {
  const rows = await withPeople((tx) =>
    tx.execute<{ n: number }>(
      sql`select count(*)::int as n from pg_locks where relation = 'outbox'::regclass and not granted`,
    ),
  );
  return rows[0]?.n ?? 0;
};
const stateTo = async (who: TestPerson) => (await rowsTo(who)).map((row) => row.state).join();
const lettersTo = async (who: TestPerson) => (await mail.letters()).filter((letter) => letter.to.includes(who.email));
const sent = (who: TestPerson) =>
  until(
    'the letter is written down as sent',
    () => stateTo(who),
    (state) => state === 'sent',
  );

describe('a letter', () => {
  let second: WorkerProcess;

  it('is one though two workers sweep at the same time', async () => {
    await at('2027-04-11T12:00:00Z');
    const who = await reminderDue('2027-04-11', '2026-04-11');
    const gate = await world.owner().reserve();
    await gate`begin`;
    await gate`lock table outbox in exclusive mode`;
    const both = [worker(), worker()];
    // Both have found the reminder due and stand before the same insert.
    await until('both are about to write the letter', waitingToWrite, (waiting) => waiting === 2, 60_000);
    await gate`commit`;
    gate.release();
    await Promise.all(both.map((one) => one.ready()));
    await sent(who);
    // One that is asked to stop finishes its sweep and its job first.
    for (const one of both) one.askToStop();
    expect(await Promise.all(both.map((one) => one.ended()))).toEqual([0, 0]);
    expect(await stateTo(who)).toBe('sent');
    expect((await lettersTo(who)).map((letter) => letter.subject)).toEqual([expect.stringContaining('Long border')]);
  });

  it('is one though the worker is killed between the mail call and its commit', async () => {
    await at('2027-06-11T12:00:00Z');
    const who = await reminderDue('2027-06-11', '2026-06-11');
    mail.holdAnswers();
    const first = worker();
    await until(
      'the mail service has taken the letter',
      () => lettersTo(who),
      (letters) => letters.length === 1,
      60_000,
    );
    await first.killHard();
    mail.letAnswersGo();
    const [row] = await rowsTo(who);
    expect([row?.state, row?.providerId]).toEqual(['sending', null]);

    await at('2027-06-11T12:06:00Z');
    second = worker();
    await sent(who);
    const [letter] = await lettersTo(who);
    expect(await lettersTo(who)).toHaveLength(1);
    expect(letter?.idempotency_key).toBe(`reminder/${row?.id}`);
    expect((await rowsTo(who))[0]?.attempts).toBe(2);
  });

  it('waits while the mail service is down, and leaves once when it is back', async () => {
    await second.ready();
    await mail.goDown();
    await at('2027-08-11T12:00:00Z');
    const who = await reminderDue('2027-08-11', '2026-08-11');
    const [row] = await until(
      'two tries have failed',
      () => rowsTo(who),
      ([one]) => one?.state === 'queued' && one.attempts >= 2,
    );
    expect(row?.lastError).toBeTruthy();
    await mail.comeUp();
    await sent(who);
    expect(await lettersTo(who)).toHaveLength(1);
  });

  it('on its way is finished by a worker that is asked to stop, which then leaves nothing open', async () => {
    mail.holdAnswers();
    await at('2027-10-11T12:00:00Z');
    const who = await reminderDue('2027-10-11', '2026-10-11');
    await until(
      'the mail service has taken the letter',
      () => lettersTo(who),
      (letters) => letters.length === 1,
    );
    second.askToStop();
    mail.letAnswersGo();
    expect(await second.ended()).toBe(0);
    expect(await stateTo(who)).toBe('sent');
    const connections = () => world.owner()`
      select 1 from pg_stat_activity where datname = current_database() and application_name = 'loamline-queue'`;
    await until('the connections of its queue are closed', connections, (open) => open.length === 0, 2000);
  });

  it('asked for in a transaction that is rolled back does not exist, and neither does its job', async () => {
    const message = { subject: 'Soil sample due', html: '<p>Due</p>', text: 'Due' };
    const mailTo = (to: string) => ({ personId: null, to, kind: 'reminder', dedupeKey: 'once', message });
    const jobs = () =>
      world.owner()<{ id: string }[]>`select data ->> 'id' as id from queue.job where name = 'send-mail'`;
    const before = (await jobs()).length;
    const asked = withPeople(async (tx) => {
      expect((await queueMail(tx, mailTo('nobody@garden.test'))).id).not.toBeNull();
      throw new Error('changed my mind');
    });
    await expect(asked).rejects.toThrow('changed my mind');
    expect(
      await withPeople((tx) => tx.select().from(outbox).where(eq(outbox.toAddress, 'nobody@garden.test'))),
    ).toEqual([]);
    expect(await jobs()).toHaveLength(before);
    const { id } = await withPeople((tx) => queueMail(tx, mailTo('somebody@garden.test')));
    expect((await jobs()).map((job) => job.id)).toContain(id);
    expect(await jobs()).toHaveLength(before + 1);
  });
});
