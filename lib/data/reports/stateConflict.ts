import type { Transaction } from '@/db/client';
import type { ReportState } from '@/db/schema';
import { Problem } from '@/lib/errors';
import { namesOf } from '../people/names';
import type { ReportRow } from './getReportInSite';

const WORDS: Record<Exclude<ReportState, 'confirmed'>, string> = {
  received: 'This report is still waiting to be read.',
  reading: 'This report is being read right now.',
  'in-review': 'This report is open for review.',
  unreadable: 'Nothing could be read from this report yet. Type it in by hand first.',
  'not-soil': 'This report holds no soil test. Type it in by hand if it does.',
  'set-aside': 'This report was set aside. Bring it back first.',
};

/** The report is not in the state this needs: says which it is in, and who brought it there. */
export async function stateConflict(tx: Transaction, row: ReportRow): Promise<Problem> {
  const extras = {
    reason: `report-${row.state}`,
    current: { reportId: row.id, state: row.state, version: row.version },
  };
  if (row.state !== 'confirmed') return new Problem('conflict', WORDS[row.state], extras);
  const name = row.confirmedBy === null ? undefined : (await namesOf(tx, [row.confirmedBy])).get(row.confirmedBy);
  const sentence = `This report is already confirmed by ${name ?? 'somebody who has left'}. Withdraw the confirmation to change it.`;
  return new Problem('conflict', sentence, extras);
}
