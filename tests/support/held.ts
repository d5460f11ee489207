import type { Transaction } from '@/db/client';
import { database } from '@/lib/data/database';
import type { World } from './factory';
import { until } from './until';

async function waiters(world: World): Promise<number> {
  const [row] = await world.owner()<{ n: number }[]>`
    select count(*)::int as n from pg_stat_activity
    where datname = current_database() and cardinality(pg_blocking_pids(pid)) > 0`;
  return row?.n ?? 0;
}

/** Takes locks in a transaction of its own and holds them until `release` is called. */
export async function holding(take: (tx: Transaction) => Promise<unknown>): Promise<{ release: () => Promise<void> }> {
  let letGo = () => {};
  const asked = new Promise<void>((resolve) => {
    letGo = resolve;
  });
  let done: Promise<void> = Promise.resolve();
  await new Promise<void>((taken, failed) => {
    done = database().transaction(async (tx) => {
      await take(tx);
      taken();
      await asked;
    });
    done.catch(failed);
  });
  return {
    release: async () => {
      letGo();
      await done;
    },
  };
}

/** Until so many connections wait for a lock, or the work that should be waiting went through. */
export async function untilWaiting(world: World, n: number, work: Promise<unknown>): Promise<void> {
  let settled = false;
  const note = () => {
    settled = true;
  };
  work.then(note, note);
  const look = async () => ({ settled, waiting: await waiters(world) });
  await until(`${n} connections wait`, look, (seen) => seen.settled || seen.waiting >= n);
}
