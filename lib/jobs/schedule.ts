import { makeContext } from '@/lib/data/context';
import { requeueMail } from '@/lib/data/mail/requeueMail';
import { env } from '@/lib/env';
import { log } from '@/lib/log';
import { sweepReminders } from './sweepReminders/handler';
import { sweepUploads } from './sweepUploads/handler';

type Sweep = { name: string; run: (ctx: Awaited<ReturnType<typeof makeContext>>) => Promise<unknown> };

/**
 * Sweeps look for what is due by the database's clock. Every worker runs them and any number may at once: what a sweep
 * writes is closed by unique keys and conditional updates, so a clock jump or a second worker changes nothing.
 */
const SWEEPS: readonly Sweep[] = [
  { name: 'uploads', run: sweepUploads },
  { name: 'reminders', run: sweepReminders },
  { name: 'mail', run: (ctx) => requeueMail({ ctx, input: {} }) },
];

export function startSweeps(): { stop: () => Promise<void> } {
  let running: Promise<void> = Promise.resolve();
  const sweepAll = async () => {
    for (const sweep of SWEEPS) {
      try {
        await sweep.run(await makeContext({ kind: 'worker' }));
      } catch (error) {
        log().error({ sweep: sweep.name, err: error }, 'sweep failed; the next one tries again');
      }
    }
  };
  const timer = setInterval(() => {
    running = running.then(sweepAll);
  }, env().SWEEP_SECONDS * 1000);
  running = sweepAll();
  return {
    stop: () => {
      clearInterval(timer);
      return running;
    },
  };
}
