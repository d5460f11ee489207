import { failCopy, releaseCopy, saveCopy, startCopy } from '@/lib/data/copies/makeCopy';
import { deleteFile, getFile, putFile } from '@/lib/services/storage/storage';
import { zip } from '@/lib/services/zip/zip';
import { giveUpWith } from '../giveUp';
import type { JobDefinition, JobTools } from '../job';
import type { Masked } from './messages';
import { runMask } from './runMask';

const GIVEN_UP =
  'A copy of a page without names could not be made: the process that draws it stopped each time. Nothing was kept of it.';

const ABOUT = `What this is
------------
A page that was read wrong, and what the reader saw on it. Names, addresses and everything else that is not a value, a unit, an
analyte, a method, a rating or a heading is blacked out in page.png and in stages.json.

page.png      the page
stages.json   the reading, and what each stage of the reader made of the page

Nothing of this was sent anywhere. Look at both before you hand them on.
`;

const bundleOf = ({ picture, stages }: Masked): Uint8Array =>
  zip([
    { name: 'README.txt', bytes: Buffer.from(ABOUT) },
    { name: 'page.png', bytes: picture },
    { name: 'stages.json', bytes: Buffer.from(stages) },
  ]);

/** asked -> ready or failed. A second delivery finds the copy taken and does nothing. */
async function makeCopy({ ctx, payload, signal }: JobTools<'mask-page'>): Promise<void> {
  const task = await startCopy({ ctx, input: payload });
  if (!task) return;
  const { lease } = task;
  try {
    const bytes = await getFile(task.fileKey, task.sha256);
    const answer = await runMask({ fileName: task.fileName, bytes, page: task.page }, { signal });
    if (!answer.ok) return await failCopy({ ctx, input: { ...payload, sentence: answer.sentence } });
    const name = Buffer.from(ctx.random(16)).toString('hex');
    const picture = { key: `site/${payload.siteId}/copy-${name}.png`, bytes: answer.picture };
    const bundle = { key: `site/${payload.siteId}/copy-${name}.zip`, bytes: bundleOf(answer) };
    await putFile(picture.key, picture.bytes, 'image/png');
    await putFile(bundle.key, bundle.bytes, 'application/zip');
    const counts = { wordsKept: answer.kept, wordsMasked: answer.masked };
    if (await saveCopy({ ctx, input: { lease, picture, bundle, ...counts } })) return;
    // Thrown away meanwhile: nothing of it stays.
    await deleteFile(picture.key);
    await deleteFile(bundle.key);
  } catch (error) {
    await releaseCopy({ ctx, input: lease });
    throw error;
  }
}

export const maskPageJob: JobDefinition<'mask-page'> = {
  name: 'mask-page',
  concurrency: 1,
  handle: makeCopy,
  giveUp: async (tools) => {
    await failCopy({ ctx: tools.ctx, input: { ...tools.payload, sentence: GIVEN_UP } });
    await giveUpWith('mask-page', GIVEN_UP)(tools);
  },
};
