import { LONG_WAIT_MS, type Report } from '@/lib/schemas/reports';
import type { Status } from '@/lib/ui/feedback/status-word';
import { isBeingRead, readingText } from '@/lib/ui/files/upload-item';

type State = Report['state'];

export const STATE_MARKS: Record<State, Status> = {
  received: 'waiting',
  reading: 'working',
  'in-review': 'needs-you',
  unreadable: 'failed',
  'not-soil': 'failed',
  confirmed: 'done',
  'set-aside': 'off',
};

export function stateWord(report: Pick<Report, 'state' | 'pages' | 'pagesRead'>): string {
  switch (report.state) {
    case 'received':
      return 'Waiting to be read';
    case 'reading': {
      const text = readingText(report);
      return text.charAt(0).toUpperCase() + text.slice(1);
    }
    case 'in-review':
      return 'To review';
    case 'unreadable':
      return 'Could not be read';
    case 'not-soil':
      return 'Not a soil report';
    case 'confirmed':
      return 'Confirmed';
    case 'set-aside':
      return 'Set aside';
  }
}

export const FILTERS = ['all', 'review', 'reading', 'unreadable', 'confirmed', 'set-aside'] as const;
export type Filter = (typeof FILTERS)[number];
export const isFilter = (text: string | undefined): text is Filter => FILTERS.some((filter) => filter === text);

export const FILTER_WORDS: Record<Filter, string> = {
  all: 'All',
  review: 'To review',
  reading: 'Being read',
  unreadable: 'Could not be read',
  confirmed: 'Confirmed',
  'set-aside': 'Set aside',
};

const FILTER_OF: Record<State, Filter> = {
  received: 'reading',
  reading: 'reading',
  'in-review': 'review',
  unreadable: 'unreadable',
  'not-soil': 'unreadable',
  confirmed: 'confirmed',
  'set-aside': 'set-aside',
};

const RANK: Record<Filter, number> = { review: 0, reading: 1, unreadable: 2, confirmed: 3, all: 3, 'set-aside': 4 };

/** What waits for a person first, then what is under way, then the rest; within each the newest first. What was set aside only where it is asked for. */
export function arranged(reports: readonly Report[], filter: Filter): Report[] {
  return reports
    .filter((report) => (filter === 'all' ? report.state !== 'set-aside' : FILTER_OF[report.state] === filter))
    .sort(
      (a, b) =>
        RANK[FILTER_OF[a.state]] - RANK[FILTER_OF[b.state]] ||
        b.uploadedAt.localeCompare(a.uploadedAt) ||
        a.id.localeCompare(b.id),
    );
}

export function countsOf(reports: readonly Report[]): Record<Filter, number> {
  const counts: Record<Filter, number> = { all: 0, review: 0, reading: 0, unreadable: 0, confirmed: 0, 'set-aside': 0 };
  for (const report of reports) {
    counts[FILTER_OF[report.state]] += 1;
    if (report.state !== 'set-aside') counts.all += 1;
  }
  return counts;
}

/** Nobody has begun to read it for longer than a reader that runs would take. */
export const isStuck = (report: Report, now: number): boolean =>
  report.waitingLong || (report.state === 'received' && now - Date.parse(report.uploadedAt) > LONG_WAIT_MS);

export const someBeingRead = (reports: readonly Report[]): boolean => reports.some(isBeingRead);

/** A report typed in has no file name; its laboratory or its day names it. */
export function reportName(report: Report): string {
  if (report.fileName)
    return report.revision > 1 ? `${report.fileName} (revision ${report.revision})` : report.fileName;
  return report.laboratory ? `Typed in, ${report.laboratory.name}` : 'Typed in';
}

export function samplesText(report: Report, plotNames: ReadonlyMap<string, string>): string | null {
  const { all, assigned, plotIds } = report.samples;
  if (all === 0) return null;
  const count = all === 1 ? '1 sample' : `${all} samples`;
  const names = plotIds.flatMap((id) => plotNames.get(id) ?? []);
  if (names.length > 0 && names.length <= 3) {
    const left = all - assigned;
    return `${count}: ${names.join(', ')}${left > 0 ? `, ${left} without a plot` : ''}`;
  }
  if (assigned === all) return `${count}, each with a plot`;
  return assigned === 0 ? `${count}, no plot chosen yet` : `${count}, ${assigned} with a plot`;
}
