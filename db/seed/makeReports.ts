import { readFile as readBytes } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { uploadReport } from '@/lib/data/reports/uploadReport';
import { confirmReport } from '@/lib/data/results/confirmReport';
import { getReview } from '@/lib/data/review/getReview';
import { setSameAs } from '@/lib/data/review/setSameAs';
import { setSample } from '@/lib/data/review/setSample';
import { MAX_PAGES } from '@/lib/jobs/readFile/limits';
import { readPdfPages } from '@/lib/jobs/readFile/pictures';
import { type ReadFile, readReportWith } from '@/lib/jobs/readReport/handler';
import { readTable } from '@/lib/reading/readTable';
import { refusedReading } from '@/lib/reading/types';
import { wordsOfPdf } from '@/lib/services/pdf/words';
import { refusal } from '@/lib/services/reading/refusals';
import { personOn, workerOn } from './clock';
import { idOf, type MadeSite } from './makeGround';
import { PEOPLE } from './people';
import type { DemoEvent, DemoReport } from './types';

const FILES = fileURLToPath(new URL('../../fixtures/reports/demo/', import.meta.url));

/** The program's own reader without a process for each file: these files are the project's, no stranger's. */
const readHere: ReadFile = async ({ bytes, fileName }) => {
  if (fileName.endsWith('.csv')) return readTable({ fileName, bytes });
  const words = await wordsOfPdf({ bytes, maxPages: MAX_PAGES });
  if (!words.ok) return refusedReading({ file: fileName, pages: words.pages, error: refusal(words.reason) });
  const quiet = { page: () => undefined, scans: () => undefined };
  return readPdfPages({ fileName, bytes, pages: words.pages }, quiet);
};
const read = readReportWith(readHere);

/** Sends a file in and has it read by the worker's own job. */
export async function sendAndRead({ siteId, plots }: MadeSite, report: DemoReport): Promise<string> {
  const bytes = new Uint8Array(await readBytes(`${FILES}${report.file}`));
  const answer = await uploadReport({
    ctx: await personOn(report.sentOn, PEOPLE[report.sentBy].email),
    input: {
      siteId,
      fileName: report.file,
      bytes,
      ...(report.droppedOn === undefined ? {} : { plotId: idOf(plots, report.droppedOn) }),
    },
  });
  if (answer.kind !== 'received') throw new Error(`${report.file} was sent in before.`);
  const ctx = await workerOn(report.sentOn);
  await read({ ctx, payload: { siteId, id: answer.reportId }, signal: new AbortController().signal });
  return answer.reportId;
}

/** Says how many cores went into each bag, which form of an analysis counts, and confirms. */
export async function confirm(
  siteId: string,
  reports: ReadonlyMap<string, string>,
  event: Extract<DemoEvent, { kind: 'confirm' }>,
): Promise<void> {
  const ctx = await personOn(event.on, PEOPLE[event.by].email);
  const reportId = idOf(reports, event.file);
  const { samples } = await getReview({ ctx, input: { siteId, reportId } });
  const other = event.sameAs === undefined ? undefined : idOf(reports, event.sameAs);
  for (const { id: reportSampleId, version, candidates } of samples) {
    const saved = await setSample({
      ctx,
      input: { siteId, reportId, reportSampleId, version, cores: event.cores },
    });
    if (other === undefined) continue;
    const twin = candidates.find((one) => one.reportId === other);
    if (!twin) throw new Error(`${event.file} and ${event.sameAs} do not look like one analysis.`);
    await setSameAs({
      ctx,
      input: { siteId, reportId, reportSampleId, version: saved.version, sameAsId: twin.reportSampleId },
    });
  }
  await confirmReport({ ctx, input: { siteId, reportId } });
}
