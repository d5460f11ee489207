import type { Report } from '@/lib/schemas/reports';
import type { Status } from '@/lib/ui/feedback/status-word';

/** In these states there are rows to show beside the page. */
export const hasReview = (state: Report['state']): boolean =>
  state === 'in-review' || state === 'confirmed' || state === 'set-aside';

export const isWaiting = (state: Report['state']): boolean => state === 'received' || state === 'reading';

export const reportTitle = (report: Pick<Report, 'fileName' | 'origin'>): string =>
  report.fileName ?? (report.origin === 'typed' ? 'Report typed in by hand' : 'Report');

export const STATE_WORDS: Record<Report['state'], { status: Status; word: string }> = {
  received: { status: 'waiting', word: 'Waiting to be read' },
  reading: { status: 'working', word: 'Being read' },
  'in-review': { status: 'needs-you', word: 'To review' },
  unreadable: { status: 'failed', word: 'Could not be read' },
  'not-soil': { status: 'failed', word: 'Not a soil report' },
  confirmed: { status: 'done', word: 'Confirmed' },
  'set-aside': { status: 'off', word: 'Set aside' },
};

export const counted = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;

/** "1 Dec 2026": the month in letters. */
export const onDay = (moment: string): string =>
  new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' }).format(
    new Date(moment),
  );
