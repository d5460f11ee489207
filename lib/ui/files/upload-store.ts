import { BATCH_FROM, type BatchAnnounced, LARGEST_BATCH } from '@/lib/schemas/batches';
import type { Report, UploadAnswer } from '@/lib/schemas/reports';
import { type ApiResult, callApi, type Problem } from '../api';
import { type UploadProgress, uploadApi } from '../upload';
import type { BatchSpot, UploadItem, UploadStage } from './upload-item';
import { ATTEMPTS, batchOf, isBeingRead, isUnderWay, mayPass, pauseBefore, refusedBeforeSending } from './upload-item';

export type UploadTarget = { readonly plotId: string | null; readonly plotName: string | null };

type Send = (
  path: string,
  options: { body: FormData; onProgress: (progress: UploadProgress) => void; signal: AbortSignal },
) => Promise<ApiResult<UploadAnswer>>;

/** What the store does to the world, so that tests can do it instead. */
export type UploadWorld = {
  readonly send: Send;
  readonly ask: (path: string) => Promise<ApiResult<Report>>;
  readonly announce: (path: string, body: object) => Promise<ApiResult<BatchAnnounced>>;
  readonly refuse: (path: string, body: object) => Promise<ApiResult<unknown>>;
  readonly pause: (ms: number, signal: AbortSignal) => Promise<void>;
  readonly now: () => number;
};

const pause = (ms: number, signal: AbortSignal) =>
  new Promise<void>((resolve) => {
    const timer = setTimeout(resolve, ms);
    signal.addEventListener('abort', () => {
      clearTimeout(timer);
      resolve();
    });
  });

export const REAL_WORLD: UploadWorld = {
  send: uploadApi,
  ask: callApi,
  announce: (path, body) => callApi(path, { method: 'POST', body }),
  refuse: (path, body) => callApi(path, { method: 'POST', body }),
  pause,
  now: Date.now,
};

const AT_ONCE = 3;
const BEYOND = `At most ${LARGEST_BATCH} files are taken at once, and this one is beyond them. It was not sent; choose it again when the others are through.`;
const ASK_EVERY_MS = 1_000;
const ASK_EVERY_LATER_MS = 4_000;
const SLOWER_AFTER_MS = 60_000;
/** The server's clock and this one may differ; a file this browser sent a moment ago is still its own. */
const OWN_SENDING_MS = 10 * 60_000;

/**
 * The files a person has sent to one site since they opened it. It outlives the page, so that going to the inbox and
 * back neither stops a file nor forgets what became of it.
 */
export class UploadStore {
  private items: readonly UploadItem[] = [];
  private readonly listeners = new Set<() => void>();
  private readonly wanted = new Map<string, AbortController>();
  private next = 1;

  constructor(
    private readonly siteId: string,
    private readonly world: UploadWorld = REAL_WORLD,
  ) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  readonly snapshot = (): readonly UploadItem[] => this.items;

  /** The batches begun in this browser, whose end is worth a word wherever the person is by then. */
  private begun: readonly string[] = [];
  readonly batches = (): readonly string[] => this.begun;
  readonly forget = (batchId: string): void => {
    this.begun = this.begun.filter((id) => id !== batchId);
    this.show([...this.items]);
  };

  /** Sends the files; many at once become a batch, whose id is answered once the server knows of it. */
  readonly add = async (files: readonly File[], target: UploadTarget): Promise<string | null> => {
    const many = files.length >= BATCH_FROM;
    const added = files.map((file, at): UploadItem => {
      const why = at < LARGEST_BATCH ? refusedBeforeSending(file) : BEYOND;
      const stage: UploadStage = why
        ? { kind: 'refused', title: 'Not sent', detail: why, mayRetry: false }
        : { kind: 'queued' };
      const batch = many && at < LARGEST_BATCH ? 'announcing' : null;
      return { id: String(this.next++), file, ...target, asRevision: false, batch, stage };
    });
    this.show([...this.items, ...added]);
    if (many) return this.announce(added.slice(0, LARGEST_BATCH));
    this.work();
    return null;
  };

  /** Files of a batch that a reload lost on the way, chosen again: told apart by name and size. */
  readonly resume = (
    batchId: string,
    waiting: readonly { id: string; fileName: string; bytes: number }[],
    files: readonly File[],
  ): readonly File[] => {
    const open = waiting.filter(({ id }) => !this.items.some((item) => batchOf(item)?.fileId === id));
    const others: File[] = [];
    const added = files.flatMap((file): UploadItem[] => {
      const at = open.findIndex((one) => one.fileName === file.name && one.bytes === file.size);
      const [spot] = at < 0 ? [] : open.splice(at, 1);
      if (!spot) {
        others.push(file);
        return [];
      }
      const batch = { batchId, fileId: spot.id };
      const sending = { asRevision: false, batch, stage: { kind: 'queued' } as const };
      return [{ id: String(this.next++), file, plotId: null, plotName: null, ...sending }];
    });
    this.watch(batchId);
    this.show([...this.items, ...added]);
    this.work();
    return others;
  };

  readonly watch = (batchId: string): void => {
    if (this.begun.includes(batchId)) return;
    this.begun = [...this.begun, batchId];
    this.show([...this.items]);
  };

  private async announce(added: readonly UploadItem[]): Promise<string | null> {
    const files = added.map(({ file, stage }) => ({
      name: file.name.slice(-400) || 'report',
      bytes: file.size,
      refusal: stage.kind === 'refused' ? stage.detail : null,
    }));
    const answer = await this.world.announce(`/sites/${this.siteId}/batches`, { files });
    const spots = new Map<string, BatchSpot>();
    if (answer.ok) {
      const { batchId, fileIds } = answer.data;
      added.forEach((item, at) => {
        const fileId = fileIds[at];
        if (fileId) spots.set(item.id, { batchId, fileId });
      });
      this.begun = [...this.begun, batchId];
    }
    // Without a batch they are sent all the same, one by one. What was refused stands on the batch's own list.
    this.show(
      this.items
        .map((item) =>
          item.batch === 'announcing' && added.some(({ id }) => id === item.id)
            ? { ...item, batch: spots.get(item.id) ?? null }
            : item,
        )
        .filter((item) => !(item.batch && item.stage.kind === 'refused' && spots.has(item.id))),
    );
    this.work();
    return answer.ok ? answer.data.batchId : null;
  }

  readonly cancel = (id: string): void => {
    const item = this.find(id);
    if (!item || !isUnderWay(item)) return;
    this.set(id, { kind: 'cancelled' });
    this.wanted.get(id)?.abort();
    this.work();
  };

  readonly retry = (id: string): void => {
    const { stage } = this.find(id) ?? {};
    if (stage?.kind === 'cancelled' || (stage?.kind === 'refused' && stage.mayRetry)) this.queue(id, {});
  };

  readonly sendAsRevision = (id: string): void => {
    if (this.find(id)?.stage.kind === 'seen-before') this.queue(id, { asRevision: true });
  };

  readonly dismiss = (id: string): void => {
    const item = this.find(id);
    if (item && !isUnderWay(item)) this.show(this.items.filter((one) => one.id !== id));
  };

  /** Takes off what needs no more watching; what is under way or being read stays. */
  readonly clear = (): void => {
    this.show(this.items.filter((item) => isUnderWay(item) || item.stage.kind === 'kept'));
  };

  private queue(id: string, change: Partial<UploadItem>) {
    this.show(this.items.map((item) => (item.id === id ? { ...item, ...change, stage: { kind: 'queued' } } : item)));
    this.work();
  }

  private work() {
    const busy = this.items.filter((item) => item.stage.kind === 'sending' || item.stage.kind === 'pausing').length;
    const ready = this.items
      .filter((item) => item.stage.kind === 'queued' && item.batch !== 'announcing')
      .slice(0, Math.max(0, AT_ONCE - busy));
    for (const item of ready) void this.send(item);
  }

  private async send(item: UploadItem) {
    const want = new AbortController();
    this.wanted.set(item.id, want);
    const began = this.world.now();
    for (let attempt = 1; ; attempt += 1) {
      this.set(item.id, { kind: 'sending', sent: 0, total: item.file.size, attempt });
      const result = await this.world.send(`/sites/${this.siteId}/uploads`, {
        body: formOf(item),
        signal: want.signal,
        onProgress: ({ sent, total }) => {
          if (!want.signal.aborted) this.set(item.id, { kind: 'sending', sent, total, attempt });
        },
      });
      if (want.signal.aborted) return;
      if (result.ok) {
        this.answered(item, result.data, attempt, began);
        break;
      }
      // A revision that may have arrived must not be sent twice by itself: each sending makes another.
      if (!mayPass(result.problem) || attempt === ATTEMPTS || item.asRevision) {
        await this.refused(item, refusal(result.problem, item));
        break;
      }
      this.set(item.id, { kind: 'pausing', attempt });
      await this.world.pause(pauseBefore(attempt + 1), want.signal);
      if (want.signal.aborted) return;
    }
    this.wanted.delete(item.id);
    this.work();
  }

  /** A file of a batch that was looked at and not taken: the reason goes onto the batch's list, and off this one. */
  private async refused(item: UploadItem, stage: UploadStage) {
    const spot = batchOf(item);
    if (spot && stage.kind === 'refused' && !stage.mayRetry) {
      const path = `/sites/${this.siteId}/batches/${spot.batchId}/files/${spot.fileId}/refuse`;
      if ((await this.world.refuse(path, { sentence: stage.detail })).ok) return this.drop(item.id);
    }
    this.set(item.id, stage);
  }

  private drop(id: string) {
    this.show(this.items.filter((one) => one.id !== id));
  }

  private answered(item: UploadItem, answer: UploadAnswer, attempt: number, began: number) {
    // The batch's list goes on from here: it knows the report, and what became of it.
    if (item.batch) return this.drop(item.id);
    // When an answer was lost on the way, the next try meets the file it brought itself.
    const own =
      attempt > 1 &&
      answer.kind === 'seen-before' &&
      Date.parse(answer.uploadedAt) > began - OWN_SENDING_MS &&
      !this.items.some((one) => one.id !== item.id && reportOf(one) === answer.reportId);
    if (answer.kind === 'seen-before' && !own) {
      const { reportId, uploadedAt, state } = answer;
      this.set(item.id, { kind: 'seen-before', reportId, uploadedAt, state });
      return;
    }
    const now = this.world.now();
    this.set(item.id, {
      kind: 'kept',
      reportId: answer.reportId,
      report: null,
      keptAt: now,
      heardAt: now,
      unheard: false,
    });
    void this.follow(item.id, answer.reportId, now);
  }

  private async follow(id: string, reportId: string, keptAt: number) {
    const never = new AbortController().signal;
    let misses = 0;
    for (;;) {
      const late = this.world.now() - keptAt > SLOWER_AFTER_MS;
      await this.world.pause(late ? ASK_EVERY_LATER_MS : ASK_EVERY_MS, never);
      const stage = this.find(id)?.stage;
      if (stage?.kind !== 'kept' || stage.reportId !== reportId) return;
      const result = await this.world.ask(`/sites/${this.siteId}/reports/${reportId}`);
      if (result.ok && !isBeingRead(result.data)) {
        this.set(id, { kind: 'settled', reportId, report: result.data });
        return;
      }
      misses = result.ok ? 0 : misses + 1;
      if (!result.ok && [401, 403, 404].includes(result.problem.status)) {
        this.set(id, { kind: 'refused', title: result.problem.title, detail: result.problem.detail, mayRetry: false });
        return;
      }
      const moved =
        result.ok && (result.data.state !== stage.report?.state || result.data.pagesRead !== stage.report.pagesRead);
      this.set(id, {
        ...stage,
        report: result.ok ? result.data : stage.report,
        heardAt: moved ? this.world.now() : stage.heardAt,
        unheard: misses >= 2,
      });
    }
  }

  private find(id: string): UploadItem | undefined {
    return this.items.find((item) => item.id === id);
  }

  private set(id: string, stage: UploadStage) {
    this.show(this.items.map((item) => (item.id === id ? { ...item, stage } : item)));
  }

  private show(items: readonly UploadItem[]) {
    this.items = items;
    for (const listener of this.listeners) listener();
  }
}

function formOf(item: UploadItem): FormData {
  const form = new FormData();
  if (item.plotId !== null) form.set('plotId', item.plotId);
  if (item.asRevision) form.set('asRevision', 'true');
  const spot = batchOf(item);
  if (spot) form.set('batchFileId', spot.fileId);
  form.set('file', item.file, item.file.name);
  return form;
}

const reportOf = ({ stage }: UploadItem): string | null =>
  stage.kind === 'kept' || stage.kind === 'settled' ? stage.reportId : null;

function refusal(problem: Problem, { file: { name: fileName }, asRevision }: UploadItem): UploadStage {
  if (!mayPass(problem)) {
    // The file itself was looked at and not taken; sending it again changes nothing.
    const mayRetry = problem.status === 401 || problem.status === 429 || problem.status >= 500;
    // The sentence may begin with the name that already stands above it.
    const detail = problem.detail.startsWith(`${fileName}: `)
      ? problem.detail.slice(fileName.length + 2)
      : problem.detail;
    return { kind: 'refused', title: 'Not taken', detail, mayRetry };
  }
  const detail = asRevision
    ? 'The connection broke, and the revision may have arrived. Look in the list of reports before you send it again.'
    : problem.status > 0
      ? problem.detail
      : `The file could not be sent in ${ATTEMPTS} tries. It is still on your device; send it again when the connection is better.`;
  return { kind: 'refused', title: 'Not sent', detail, mayRetry: true };
}
