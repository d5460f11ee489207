import type { Batch, BatchCounts, BatchFile } from '@/lib/schemas/batches';
import type { Status } from '@/lib/ui/feedback/status-word';
import { counted, outcomeText, readingText } from '@/lib/ui/files/upload-item';

export const isMoving = ({ counts }: Pick<Batch, 'counts'>): boolean => counts.beingRead > 0;

const stillOpen = (counts: BatchCounts): number => counts.missing + counts.beingRead;

export const percentDone = (counts: BatchCounts): number =>
  counts.files === 0 ? 100 : (100 * (counts.files - stillOpen(counts))) / counts.files;

export const progressWords = (counts: BatchCounts): string =>
  `${counts.files - stillOpen(counts)} of ${counts.files} gone through`;

/** One sentence: "36 reports to review, 2 being read, 1 could not be read." */
export function standingWords(counts: BatchCounts, sending = false): string {
  const parts = [
    counts.toReview > 0 && `${counted(counts.toReview, 'report')} to review`,
    counts.beingRead > 0 && `${counts.beingRead} waiting or being read`,
    counts.missing > 0 && `${counts.missing} ${sending ? 'on the way' : 'not here yet'}`,
    counts.notRead > 0 && `${counts.notRead} could not be read`,
    counts.notTaken > 0 && `${counts.notTaken} not taken`,
    counts.setAside > 0 && `${counts.setAside} set aside`,
    counts.confirmed > 0 && `${counts.confirmed} confirmed`,
  ].filter((part) => part !== false);
  return `${parts.join(', ')}.`;
}

const MARKS: Record<NonNullable<BatchFile['report']>['state'], Status> = {
  received: 'waiting',
  reading: 'working',
  'in-review': 'needs-you',
  unreadable: 'failed',
  'not-soil': 'failed',
  confirmed: 'done',
  'set-aside': 'off',
};

/** The state of one file in a few words, and its mark. */
export function fileWords({ state, report }: BatchFile, sending = false): { status: Status; words: string } {
  if (state === 'announced') return { status: 'waiting', words: sending ? 'on its way' : 'not here yet' };
  if (state === 'refused') return { status: 'failed', words: 'not taken' };
  if (state === 'left-out') return { status: 'off', words: 'left out' };
  if (report === null) return { status: 'waiting', words: 'waiting to be read' };
  const words = report.state === 'received' || report.state === 'reading' ? readingText(report) : outcomeText(report);
  return { status: MARKS[report.state], words };
}

/** What else is to be said about it, in a sentence. */
export function fileSentence({ state, refusal, report }: BatchFile): string | null {
  if (state === 'refused') return refusal;
  if (state === 'left-out') return 'It never arrived, and the others went on without it.';
  if (report?.refusal) return report.refusal.sentence;
  if (report?.waitingLong) return 'The file is kept. It is read as soon as the reader is back.';
  return state === 'seen-before' ? 'This very file was sent before; it is not kept twice.' : null;
}
