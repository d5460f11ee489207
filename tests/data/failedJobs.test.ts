import { beforeAll, describe, expect, it } from 'vitest';
import { auditEvent } from '@/db/schema';
import type { Ctx } from '@/lib/data/context';
import { giveUpJob } from '@/lib/data/failedJobs/giveUpJob';
import { listFailedJobs } from '@/lib/data/failedJobs/listFailedJobs';
import { replayFailedJob } from '@/lib/data/failedJobs/replayFailedJob';
import { getReport } from '@/lib/data/reports/getReport';
import { giveUpReading } from '@/lib/data/reports/giveUpReading';
import { readAgain } from '@/lib/data/reports/readAgain';
import { releaseReading } from '@/lib/data/reports/releaseReading';
import { startReading } from '@/lib/data/reports/startReading';
import { takeByHand } from '@/lib/data/reports/takeByHand';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withSite } from '@/lib/data/transaction';
import { JOB_NAMES } from '@/lib/jobs/names';
import { JOB_DEFINITIONS } from '@/lib/jobs/registry';
import { ctxAs, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { pdfBytes, problemOf } from '../support/reports';

const world = useWorld();
let site: TestSite;
let owner: Ctx;
beforeAll(async () => {
  site = await makeSite();
  owner = await ctxAs(site.people.owner);
});

const at = <T extends object>(rest: T) => ({ siteId: site.id, ...rest });
const list = async () => (await listFailedJobs({ ctx: owner, input: { siteId: site.id } })).failedJobs;
const replay = (failedJobId: string, ctx = owner) => replayFailedJob({ ctx, input: at({ failedJobId }) });
const jobs = async (name: string, id: string) =>
  (await world.owner()`select 1 from queue.job where name = ${name} and data ->> 'id' = ${id}`).length;

/** A report whose every try failed, as the worker leaves it. */
async function given(fileName: string): Promise<string> {
  const worker = await ctxWorker();
  const { reportId: id } = await uploadReport({ ctx: owner, input: at({ fileName, bytes: pdfBytes() }) });
  const task = await startReading({ ctx: worker, input: at({ id }) });
  if (!task) throw new Error('The report could not be taken.');
  await releaseReading({
    ctx: worker,
    input: { lease: task.lease, code: 'reader-failed', sentence: 'The reader stopped on this file three times.' },
  });
  await giveUpReading({ ctx: worker, input: at({ id }) });
  return id;
}
const of = async (subjectId: string) => {
  const found = (await list()).find((one) => one.subject.id === subjectId);
  if (!found) throw new Error('It is not listed.');
  return found;
};

describe('what was given up', () => {
  it('is shown to an owner with what happened, once however often it is given up', async () => {
    const id = await given('lost.pdf');
    await giveUpReading({ ctx: await ctxWorker(), input: at({ id }) });
    expect((await list()).filter((one) => one.subject.id === id)).toHaveLength(1);
    expect(await of(id)).toMatchObject({
      job: 'read-report',
      subject: { kind: 'report', name: 'lost.pdf' },
      sentence: 'The reader stopped on this file three times.',
      notAgain: null,
      replayed: null,
    });
  });

  it('runs again for one of two clicks; the other is told', async () => {
    const id = await given('again.pdf');
    const { id: failedJobId } = await of(id);
    const before = await jobs('read-report', id);
    const answers = await Promise.allSettled([replay(failedJobId), replay(failedJobId)]);
    expect(answers.filter((answer) => answer.status === 'fulfilled')).toHaveLength(1);
    expect((await problemOf(replay(failedJobId))).reason).toBe('replayed');
    expect(await jobs('read-report', id)).toBe(before + 1);
    expect((await getReport({ ctx: owner, input: at({ reportId: id }) })).state).toBe('received');
    expect((await of(id)).replayed?.by).toBe(site.people.owner.name);
    const acts = await withSite(site.id, (tx) => tx.select().from(auditEvent));
    expect(acts.filter((one) => one.act === 'job.replay' && one.objectId === failedJobId)).toHaveLength(1);
  });

  it('is not run again over a report that somebody has taken by hand, and says why', async () => {
    const id = await given('typed.pdf');
    await takeByHand({ ctx: owner, input: at({ reportId: id }) });
    const { id: failedJobId, notAgain } = await of(id);
    expect(notAgain).toMatch(/moved on/);
    expect((await problemOf(replay(failedJobId))).reason).toBe('report-in-review');
    expect((await of(id)).replayed).toBeNull();
  });

  it('counts as asked for when the report is read again from its own page', async () => {
    const id = await given('read-again.pdf');
    await readAgain({ ctx: owner, input: at({ reportId: id }) });
    expect((await of(id)).replayed?.by).toBe(site.people.owner.name);
  });

  it('is nothing for anybody but an owner, nor for the owner of another site', async () => {
    const id = await given('theirs.pdf');
    const { id: failedJobId } = await of(id);
    for (const role of ['adviser', 'helper', 'viewer'] as const) {
      const ctx = await ctxAs(site.people[role]);
      expect((await problemOf(listFailedJobs({ ctx, input: { siteId: site.id } }))).code).toBe('forbidden');
      expect((await problemOf(replay(failedJobId, ctx))).code).toBe('forbidden');
    }
    const other = await makeSite('Other');
    const foreign = { siteId: other.id, failedJobId };
    expect((await problemOf(replayFailedJob({ ctx: await ctxAs(other.people.owner), input: foreign }))).code).toBe(
      'not-found',
    );
  });

  it('covers every job of a site: each has a way to give up, and each kind is asked for again', async () => {
    const ofSites = JOB_DEFINITIONS.filter((job) => job.name !== 'send-mail');
    expect(ofSites.filter((job) => !job.giveUp).map((job) => job.name)).toEqual([]);
    const plain = JOB_NAMES.filter((name) => !['send-mail', 'read-report', 'mask-page'].includes(name));
    for (const job of plain) {
      const id = await makePlot(site.id);
      await giveUpJob({ ctx: await ctxWorker(), input: at({ id, job, sentence: 'It stopped.' }) });
      await replay((await of(id)).id);
      expect(await jobs(job, id), job).toBe(1);
    }
  });
});
