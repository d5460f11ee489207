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
  const sweepAll = async () => {
    for (const sweep of SWEEPS) {
      try {
        await sweep.run(await makeContext({ kind: 'worker' }));
      } catch (error) {
        log().error({ sweep: sweep.name, err: error }, 'sweep failed; the next one tries again');
      }
    }
  };
  // A round that takes longer than the pause is not followed by all those it missed.
  let running: Promise<void> | null = null;
  const tick = () => {
    running ??= sweepAll().finally(() => {
      running = null;
    });
  };
  const timer = setInterval(tick, env().SWEEP_SECONDS * 1000);
  tick();
  return {
    stop: async () => {
      clearInterval(timer);
      await running;
    },
  };
}
