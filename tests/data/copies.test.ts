import { beforeAll, describe, expect, it } from 'vitest';
import { pageCopy } from '@/db/schema';
import type { Ctx } from '@/lib/data/context';
import { askCopy } from '@/lib/data/copies/askCopy';
import { getCopy } from '@/lib/data/copies/getCopy';
import { getCopyBundle, getCopyPicture } from '@/lib/data/copies/getCopyFile';
import { failCopy, saveCopy, startCopy } from '@/lib/data/copies/makeCopy';
import { throwAwayCopy } from '@/lib/data/copies/throwAwayCopy';
import { giveUpJob } from '@/lib/data/failedJobs/giveUpJob';
import { listFailedJobs } from '@/lib/data/failedJobs/listFailedJobs';
import { replayFailedJob } from '@/lib/data/failedJobs/replayFailedJob';
import { typeReport } from '@/lib/data/reports/typeReport';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { withSite } from '@/lib/data/transaction';
import { getFile, putFile } from '@/lib/services/storage/storage';
import { ctxAs, ctxWorker, useWorld } from '../support/factory';
import { pdfBytes, problemOf, readSample } from '../support/reports';
import { PH, useReviewBench } from '../support/review';

useWorld();
const { bench, reading } = useReviewBench();
let worker: Ctx;
let reportId = '';
beforeAll(async () => {
  worker = await ctxWorker();
  reportId = await reading([readSample({ sampleId: 'North', results: [PH] })]);
});

const at = <T extends object>(rest: T) => ({ siteId: bench.here.id, reportId, ...rest });
const ask = (ctx = bench.helper, page = 1) => askCopy({ ctx, input: at({ page }) });

/** As the worker makes it, without the drawing. */
async function make(id: string) {
  const siteId = bench.here.id;
  const task = await startCopy({ ctx: worker, input: { siteId, id } });
  if (!task) throw new Error('The copy could not be taken.');
  const picture = { key: `site/${siteId}/copy-${id}.png`, bytes: new Uint8Array([1, 2, 3]) };
  const bundle = { key: `site/${siteId}/copy-${id}.zip`, bytes: new Uint8Array([4, 5]) };
  await putFile(picture.key, picture.bytes, 'image/png');
  await putFile(bundle.key, bundle.bytes, 'application/zip');
  const saved = await saveCopy({
    ctx: worker,
    input: { lease: task.lease, picture, bundle, wordsKept: 3, wordsMasked: 9 },
  });
  return { saved, picture, bundle };
}

describe('a copy of a page without names', () => {
  it('is asked for once by two clicks, shown when it is ready, and gone when it is thrown away', async () => {
    const [one, two] = await Promise.all([ask(), ask()]);
    expect(one.id).toBe(two.id);
    const here = at({ copyId: one.id });
    expect((await problemOf(getCopyPicture({ ctx: bench.helper, input: here }))).reason).toBe('no-copy');
    const { picture } = await make(one.id);
    expect(await getCopy({ ctx: bench.helper, input: here })).toMatchObject({ state: 'ready', wordsMasked: 9 });
    const file = await getCopyPicture({ ctx: bench.helper, input: here });
    expect([file.contentType, file.as, [...file.bytes]]).toEqual(['image/png', 'inline', [1, 2, 3]]);
    expect((await getCopyBundle({ ctx: bench.helper, input: here })).as).toBe('attachment');

    await throwAwayCopy({ ctx: bench.helper, input: here });
    await throwAwayCopy({ ctx: bench.helper, input: here });
    expect((await problemOf(getCopyPicture({ ctx: bench.helper, input: here }))).reason).toBe('no-copy');
    await expect(getFile(picture.key, '')).rejects.toThrow('not-found');
    expect((await ask()).id).not.toBe(one.id);
  });

  it('that is thrown away while it is drawn stays away', async () => {
    const { id } = await ask(bench.adviser);
    const task = await startCopy({ ctx: worker, input: { siteId: bench.here.id, id } });
    await throwAwayCopy({ ctx: bench.adviser, input: at({ copyId: id }) });
    const late = { key: `site/${bench.here.id}/late`, bytes: new Uint8Array([1]) };
    if (!task) throw new Error('The copy could not be taken.');
    const input = { lease: task.lease, picture: late, bundle: late, wordsKept: 0, wordsMasked: 0 };
    expect(await saveCopy({ ctx: worker, input })).toBe(false);
    expect((await getCopy({ ctx: bench.adviser, input: at({ copyId: id }) })).state).toBe('thrown-away');
  });

  it('is not made of a page that is not there, of a report without a file, or while it is being read', async () => {
    expect((await problemOf(ask(bench.owner, 2))).code).toBe('invalid');
    const typed = await typeReport({ ctx: bench.owner, input: { siteId: bench.here.id, samples: [{ name: 'X' }] } });
    const of = (id: string) => askCopy({ ctx: bench.owner, input: { siteId: bench.here.id, reportId: id, page: 1 } });
    expect((await problemOf(of(typed.reportId))).reason).toBe('no-file');
    const sent = await uploadReport({
      ctx: bench.owner,
      input: { siteId: bench.here.id, fileName: 'x.pdf', bytes: pdfBytes() },
    });
    expect((await problemOf(of(sent.reportId))).reason).toBe('report-received');
  });

  it('that was given up tells whoever asked, and an owner can have it made again', async () => {
    const { id } = await ask(bench.owner);
    const given = { siteId: bench.here.id, id, sentence: 'It stopped each time.' };
    await failCopy({ ctx: worker, input: given });
    await giveUpJob({ ctx: worker, input: { ...given, job: 'mask-page' } });
    expect(await getCopy({ ctx: bench.owner, input: at({ copyId: id }) })).toMatchObject({
      state: 'failed',
      sentence: 'It stopped each time.',
    });
    const { failedJobs } = await listFailedJobs({ ctx: bench.owner, input: { siteId: bench.here.id } });
    const listed = failedJobs.find((one) => one.job === 'mask-page');
    expect(listed?.subject).toMatchObject({ kind: 'report', id: reportId });
    await replayFailedJob({
      ctx: bench.owner,
      input: { siteId: bench.here.id, failedJobId: listed?.id ?? '' },
    });
    expect((await getCopy({ ctx: bench.owner, input: at({ copyId: id }) })).state).toBe('asked');
    expect((await make(id)).saved).toBe(true);
  });

  it('is not found by somebody of another site, nor under another report', async () => {
    const { id: copyId } = await ask(bench.owner);
    const stranger = await ctxAs(bench.there.people.owner);
    const foreign = { siteId: bench.there.id, reportId, copyId };
    expect((await problemOf(getCopy({ ctx: stranger, input: foreign }))).code).toBe('not-found');
    const other = await reading([readSample({ sampleId: 'South', results: [PH] })]);
    const wrong = { siteId: bench.here.id, reportId: other, copyId };
    expect((await problemOf(getCopy({ ctx: bench.owner, input: wrong }))).code).toBe('not-found');
    const rows = await withSite(bench.here.id, (tx) => tx.select().from(pageCopy));
    expect(rows.every((row) => row.siteId === bench.here.id)).toBe(true);
  });
});
