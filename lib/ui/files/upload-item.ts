import { LARGEST_UPLOAD_BYTES, type Report, UPLOAD_ENDINGS } from '@/lib/schemas/reports';
import type { Problem } from '../api';

/** One file on its way: from the person's hand to rows that can be reviewed. */
export type UploadItem = {
  readonly id: string;
  readonly file: File;
  /** The plot it was let go over; null: the site. */
  readonly plotId: string | null;
  readonly plotName: string | null;
  readonly asRevision: boolean;
  /** The place of the file in its batch; 'announcing' until the server has named it; null: sent by itself. */
  readonly batch: BatchSpot | 'announcing' | null;
  readonly stage: UploadStage;
};

export type BatchSpot = { readonly batchId: string; readonly fileId: string };
export const batchOf = ({ batch }: UploadItem): BatchSpot | null => (batch === 'announcing' ? null : batch);

export type UploadStage =
  | { readonly kind: 'queued' }
  | { readonly kind: 'sending'; readonly sent: number; readonly total: number; readonly attempt: number }
  /** The network failed; it is sent again by itself. */
  | { readonly kind: 'pausing'; readonly attempt: number }
  | {
      readonly kind: 'seen-before';
      readonly reportId: string;
      readonly uploadedAt: string;
      readonly state: Report['state'];
    }
  /** Kept. `report` is what was last heard of it; `unheard` while asking fails. */
  | {
      readonly kind: 'kept';
      readonly reportId: string;
      readonly report: Report | null;
      readonly keptAt: number;
      readonly heardAt: number;
      readonly unheard: boolean;
    }
  | { readonly kind: 'settled'; readonly reportId: string; readonly report: Report }
  | { readonly kind: 'refused'; readonly title: string; readonly detail: string; readonly mayRetry: boolean }
  | { readonly kind: 'cancelled' };

export const ACCEPTED_FILES = UPLOAD_ENDINGS.join(',');
export const ATTEMPTS = 3;

export const isUnderWay = (item: UploadItem): boolean => ['queued', 'sending', 'pausing'].includes(item.stage.kind);

/** Whether the reader has still to say something about it. */
export const isBeingRead = (report: Pick<Report, 'state'> | null): boolean =>
  report === null || report.state === 'received' || report.state === 'reading';

const endingOf = (name: string) => /\.[^.\\/]+$/.exec(name)?.[0].toLowerCase() ?? '';

/** What can be refused without sending a byte. The server decides by content all the same. */
export function refusedBeforeSending(file: { name: string; size: number }): string | null {
  if (file.size === 0) {
    return 'This file is empty, so nothing was sent. Download the report again, or type it in.';
  }
  if (file.size > LARGEST_UPLOAD_BYTES) {
    return `This file has ${megabytes(file.size)}; at most ${megabytes(LARGEST_UPLOAD_BYTES)} are taken. Nothing was sent. Save the report's own pages, or a smaller scan, and send that.`;
  }
  if (!UPLOAD_ENDINGS.some((ending) => ending === endingOf(file.name))) {
    return 'Nothing was sent: reports are taken as PDF, picture (JPG, PNG), workbook, data file or text. Save the report as one of these, or type it in.';
  }
  return null;
}

const PASSING = new Set([502, 503, 504]);

/** A failure of the way and not of the file. */
export const mayPass = (problem: Problem): boolean =>
  problem.code === 'unreachable' || problem.code === 'timed-out' || PASSING.has(problem.status);

/** 0.8, 2.5 … seconds: one and three times a base, so that a short gap in the network is bridged. */
export const pauseBefore = (attempt: number): number => 800 * 3 ** (attempt - 2);

export function megabytes(bytes: number): string {
  const value = bytes / 1024 / 1024;
  return value < 0.1 ? `${Math.ceil(bytes / 1024)} KB` : `${value.toFixed(1).replace(/\.0$/, '')} MB`;
}

/** "1.2 of 3.4 MB": the unit once where it is the same. */
export function sentText(sent: number, total: number): string {
  const [a, b] = [megabytes(sent), megabytes(total)];
  const unit = b.slice(-2);
  return a.endsWith(unit) ? `${a.slice(0, -3)} of ${b}` : `${a} of ${b}`;
}

export const counted = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;

/** How far the reader is: "reading page 2 of 3". */
export function readingText(report: Pick<Report, 'state' | 'pages' | 'pagesRead'> | null): string {
  if (report === null || report.state === 'received') return 'waiting to be read';
  if (report.pages === null) return 'reading';
  return `reading page ${Math.min(report.pages, report.pagesRead + 1)} of ${report.pages}`;
}

/** A few words for the plan and the list of plots. */
export function shortText(item: UploadItem): string {
  const { stage } = item;
  switch (stage.kind) {
    case 'queued':
      return 'waiting to be sent';
    case 'sending':
      return sentText(stage.sent, stage.total);
    case 'pausing':
      return 'connection lost, trying again';
    case 'seen-before':
      return 'sent before';
    case 'kept':
      return readingText(stage.report);
    case 'settled':
      return outcomeText(stage.report);
    case 'refused':
      return 'not taken';
    case 'cancelled':
      return 'stopped';
  }
}

/** What came of reading, in a few words. */
export function outcomeText(report: Pick<Report, 'state' | 'samples'>): string {
  switch (report.state) {
    case 'in-review':
      return `${counted(report.samples.all, 'sample')} to review`;
    case 'unreadable':
      return 'could not be read';
    case 'not-soil':
      return 'not a soil report';
    case 'confirmed':
      return 'confirmed';
    case 'set-aside':
      return 'set aside';
    default:
      return 'waiting to be read';
  }
}

/** 0 to 1 of what is being done now; null while that is not known. */
export function shareOf(item: UploadItem): number | null {
  const { stage } = item;
  if (stage.kind === 'sending') return stage.total > 0 ? stage.sent / stage.total : null;
  if (stage.kind === 'kept' && stage.report?.state === 'reading' && stage.report.pages) {
    return stage.report.pagesRead / stage.report.pages;
  }
  return null;
}
