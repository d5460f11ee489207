import type { report } from '@/db/schema';
import { Problem } from '@/lib/errors';

export type StateAnswer = { reportId: string; state: typeof report.$inferSelect.state; version: number };

/** What the conditional writes on a report return. */
export const stateAnswer = (row: Pick<typeof report.$inferSelect, 'id' | 'state' | 'version'>): StateAnswer => ({
  reportId: row.id,
  state: row.state,
  version: row.version,
});

export const staleReport = (current: unknown): Problem =>
  new Problem('conflict', 'Somebody changed this report while you had it open. Yours was not saved yet.', {
    reason: 'stale-version',
    current,
  });
