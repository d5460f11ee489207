import { makeContext } from '@/lib/data/context';
import { closeDatabase } from '@/lib/data/database';
import { env } from '@/lib/env';
import { log } from '@/lib/log';
import { startWorkerQueue, type WorkerQueue } from '@/lib/services/queue/queue';
import type { JobDefinition } from './job';
import { deadLetterOf, JOBS, type JobName } from './names';
import { JOB_DEFINITIONS } from './registry';
import { startSweeps } from './schedule';

async function register<N extends JobName>(queue: WorkerQueue, job: JobDefinition<N>): Promise<void> {
  const { payload: schema } = JOBS[job.name];
  await queue.work(job.name, { concurrency: job.concurrency }, async ({ data, signal, jobId }) => {
    const payload = schema.parse(data) as Parameters<typeof job.handle>[0]['payload'];
    const started = performance.now();
    try {
      await job.handle({ ctx: await makeContext({ kind: 'worker' }, { requestId: jobId }), payload, signal });
      log().info({ job: job.name, jobId, ms: Math.round(performance.now() - started) }, 'job done');
    } catch (error) {
      log().warn({ job: job.name, jobId, err: error }, 'job failed; it is tried again while tries are left');
      throw error;
    }
  });
  const { giveUp } = job;
  if (!giveUp) return;
  await queue.work(deadLetterOf(job.name), { concurrency: 1 }, async ({ data, signal, jobId }) => {
    const payload = schema.parse(data) as Parameters<typeof job.handle>[0]['payload'];
    await giveUp({ ctx: await makeContext({ kind: 'worker' }, { requestId: jobId }), payload, signal });
  });
}

async function main(): Promise<void> {
  const queue = await startWorkerQueue(env().DATABASE_URL, (error) => log().error({ err: error }, 'queue error'));
  for (const job of JOB_DEFINITIONS) await register(queue, job as JobDefinition);
  const sweeps = startSweeps();
  log().info('worker ready');
  let stopping = false;
  const stop = async () => {
    if (stopping) return;
    stopping = true;
    await sweeps.stop();
    await queue.stop();
    await closeDatabase();
    process.exit(0);
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
}

await main();
