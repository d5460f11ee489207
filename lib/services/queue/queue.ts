import PgBoss from 'pg-boss';

export const QUEUE_SCHEMA = 'queue';

export type ExecuteSql = (text: string, values: unknown[]) => Promise<{ rows: Record<string, unknown>[] }>;
export type SendOptions = { singletonKey?: string; singletonSeconds?: number; startAfter?: Date };

const untouched: ExecuteSql = () => Promise.reject(new Error('A job is sent inside a transaction, never beside it.'));

let sender: PgBoss | undefined;

/** Sends through the caller's transaction: the job exists if, and only if, the change that asks for it does. */
export async function sendJob(
  executeSql: ExecuteSql,
  name: string,
  payload: object,
  options: SendOptions = {},
): Promise<string | null> {
  sender ??= new PgBoss({ db: { executeSql: untouched }, schema: QUEUE_SCHEMA });
  return sender.send(name, payload, { ...options, db: { executeSql } });
}

export type QueueDefinition = { name: string; deadLetter: string; expireInSeconds: number; retryLimit: number };

/** Creates the queue's own tables and the queues; the only step that may, so it runs as the owner. */
export async function prepareQueue(ownerUrl: string, queues: QueueDefinition[], appRole: string): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    schema: QUEUE_SCHEMA,
    supervise: false,
    schedule: false,
    max: 1,
  });
  await boss.start();
  try {
    for (const queue of queues) {
      await boss.createQueue(queue.deadLetter);
      const options = {
        name: queue.name,
        retryLimit: queue.retryLimit,
        retryDelay: 1,
        retryBackoff: true,
        expireInSeconds: queue.expireInSeconds,
        deadLetter: queue.deadLetter,
      };
      await boss.createQueue(queue.name, options);
      await boss.updateQueue(queue.name, options);
    }
    // The role comes from our own settings, not from a person; identifiers cannot be bound as parameters.
    const db = boss.getDb();
    await db.executeSql(`GRANT USAGE ON SCHEMA ${QUEUE_SCHEMA} TO ${appRole}`, []);
    await db.executeSql(
      `GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${QUEUE_SCHEMA} TO ${appRole}`,
      [],
    );
  } finally {
    await boss.stop({ graceful: false, close: true });
  }
}

export type Work = { jobId: string; data: unknown; signal: AbortSignal };

export type WorkerQueue = {
  work(name: string, options: { concurrency: number }, handler: (work: Work) => Promise<void>): Promise<void>;
  every(name: string, cron: string): Promise<void>;
  stop(): Promise<void>;
};

export async function startWorkerQueue(appUrl: string, onError: (error: Error) => void): Promise<WorkerQueue> {
  const boss = new PgBoss({
    connectionString: appUrl,
    schema: QUEUE_SCHEMA,
    migrate: false,
    max: 6,
    application_name: 'loamline-queue',
    maintenanceIntervalSeconds: 15,
    monitorStateIntervalSeconds: 60,
    cronMonitorIntervalSeconds: 5,
    cronWorkerIntervalSeconds: 5,
  });
  boss.on('error', onError);
  await boss.start();
  return {
    async work(name, { concurrency }, handler) {
      for (let lane = 0; lane < concurrency; lane += 1) {
        await boss.work<unknown>(name, { pollingIntervalSeconds: 0.5, batchSize: 1 }, async (jobs) => {
          for (const job of jobs) {
            const controller = new AbortController();
            await handler({ jobId: job.id, data: job.data, signal: controller.signal });
          }
        });
      }
    },
    every: (name, cron) => boss.schedule(name, cron, {}),
    stop: () => boss.stop({ graceful: true, timeout: 5000, wait: true }),
  };
}
