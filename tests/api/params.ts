import { createHash, randomBytes } from 'node:crypto';
import { eq } from 'drizzle-orm';
import {
  application,
  failedJob,
  invitation,
  laboratory,
  layoutMemory,
  membership,
  ownSheet,
  pageCopy,
  plan,
  planIntent,
  planLine,
  readingRow,
  reminder,
  reminderRule,
  report,
  reportSample,
  result,
  sample,
  target,
  targetSet,
  uploadBatch,
  uploadBatchFile,
} from '@/db/schema';
import { hashSecret } from '@/lib/data/people/secrets';
import { withSite } from '@/lib/data/transaction';
import { proposeMapping } from '@/lib/reading/ownSheet';
import { putFile } from '@/lib/services/storage/storage';
import { makePlot, type TestPerson, type TestSite } from '../support/factory';

const one = <T>(rows: T[]): T => {
  const row = rows[0];
  if (row === undefined) throw new Error('A row was not written.');
  return row;
};

const BYTES = new TextEncoder().encode('sample,ph\nNorth,6.4\n');
const MATERIAL = {
  key: 'own',
  name: 'Ground sulfur',
  reaction: 'sulfur' as const,
  affects: ['ph-water'],
  analysis: { S: 90 },
  source: 'as entered by the grower',
};

/**
 * For each parameter a route's path may name, a row of this site. A new name needs a line here: the walk says so.
 * `author` is who uploaded and recorded them, since helpers may change only what is their own.
 */
export async function makeParams(site: TestSite, author: TestPerson = site.people.owner) {
  const siteId = site.id;
  const plotId = await makePlot(siteId);
  const owner = site.people.owner.id;
  const token = randomBytes(32).toString('base64url');
  const fileKey = `site/${siteId}/${randomBytes(8).toString('hex')}.csv`;
  const sha256 = createHash('sha256').update(BYTES).digest('hex');
  await putFile(fileKey, BYTES, 'text/csv');
  return withSite(siteId, async (tx) => {
    const member = one(await tx.select().from(membership).where(eq(membership.personId, site.people.viewer.id)));
    const invited = one(
      await tx
        .insert(invitation)
        .values({
          siteId,
          email: 'asked@garden.test',
          role: 'viewer',
          tokenHash: hashSecret(token),
          invitedBy: owner,
          expiresAt: new Date(Date.now() + 3600 * 1000),
        })
        .returning(),
    );
    const lab = one(await tx.insert(laboratory).values({ siteId, name: 'Hollin Vale Soils' }).returning());
    const bag = one(await tx.insert(sample).values({ siteId, plotId, takenOn: '2026-04-10' }).returning());
    const file = { fileKey, sha256, fileName: 'r.csv', contentType: 'text/csv', bytes: BYTES.length };
    const sheet = one(
      await tx
        .insert(report)
        .values({ siteId, state: 'in-review', uploadedBy: author.id, ...file })
        .returning(),
    );
    const reportId = sheet.id;
    const printed = one(
      await tx.insert(reportSample).values({ siteId, reportId, ordinal: 1, plotId, sampleId: bag.id }).returning(),
    );
    const row = one(
      await tx.insert(readingRow).values({ siteId, reportId, reportSampleId: printed.id, ordinal: 1 }).returning(),
    );
    const measured = one(
      await tx
        .insert(result)
        .values({
          siteId,
          sampleId: bag.id,
          reportId,
          reportSampleId: printed.id,
          plotId,
          takenOn: '2026-04-10',
          analyte: 'ph-water',
          unitBasis: 'none',
          value: '6.4',
          qualifier: '=',
          printed: '6.4',
          confirmedBy: owner,
        })
        .returning(),
    );
    const adopted = one(
      await tx.insert(plan).values({ siteId, plotId, year: 2026, state: 'spread', createdBy: owner }).returning(),
    );
    const line = one(
      await tx
        .insert(planLine)
        .values({ siteId, planId: adopted.id, material: MATERIAL, amountKg: '3', areaM2: '60' })
        .returning(),
    );
    const intent = one(
      await tx
        .insert(planIntent)
        .values({ siteId, planId: adopted.id, analyte: 'ph-water', fullChange: '-0.3', source: 'test' })
        .returning(),
    );
    const spread = one(
      await tx
        .insert(application)
        .values({
          siteId,
          plotId,
          planId: adopted.id,
          planLineId: line.id,
          material: MATERIAL,
          amountKg: '3',
          amountPrinted: '3 kg',
          areaM2: '60',
          appliedOn: '2026-05-02',
          recordedBy: author.id,
        })
        .returning(),
    );
    const rule = one(
      await tx.insert(reminderRule).values({ siteId, plotId, kind: 'after-sulfur', createdBy: owner }).returning(),
    );
    const due = one(
      await tx.insert(reminder).values({ siteId, plotId, ruleId: rule.id, dueOn: '2027-04-10' }).returning(),
    );
    const set = one(
      await tx
        .insert(targetSet)
        .values({ siteId, key: 'own-onions', name: 'Onions', validFrom: '2026-01-01', createdBy: owner })
        .returning(),
    );
    await tx.insert(target).values({ siteId, targetSetId: set.id, analyte: 'ph-water', low: '6.2', high: '6.8' });
    const cells = [
      {
        number: 1,
        name: null,
        rows: [
          ['Plot', 'Date', 'pH'],
          ['North', '2024-04-10', '6.4'],
        ],
      },
    ];
    const proposal = proposeMapping(cells);
    await tx
      .insert(ownSheet)
      .values({ siteId, reportId, cells, headerFingerprint: 'f', proposal: { doubts: [], ...proposal } });
    const learnt = one(
      await tx
        .insert(layoutMemory)
        .values({
          siteId,
          reportId,
          fingerprint: 'f',
          laboratory: 'hollin vale soils',
          shape: 'page-down',
          headings: ['ph', 'p'],
          lessons: [],
          learntBy: owner,
        })
        .returning(),
    );
    const now = new Date();
    const sent = { createdAt: now, mailChosenAt: now, movedAt: now };
    const batch = one(
      await tx
        .insert(uploadBatch)
        .values({ siteId, createdBy: author.id, ...sent })
        .returning(),
    );
    const announced = one(
      await tx
        .insert(uploadBatchFile)
        .values({ siteId, batchId: batch.id, ordinal: 1, fileName: 'old.csv', bytes: 20 })
        .returning(),
    );
    const lost = one(
      await tx
        .insert(failedJob)
        .values({ siteId, job: 'recheck-effects', subjectId: plotId, code: 'job-failed', sentence: 'x', gaveUpAt: now })
        .returning(),
    );
    const shot = { pictureKey: fileKey, pictureSha256: sha256, bundleKey: fileKey, bundleSha256: sha256 };
    const copy = one(
      await tx
        .insert(pageCopy)
        .values({ siteId, reportId, page: 1, state: 'ready', askedBy: author.id, askedAt: now, ...shot })
        .returning(),
    );
    const params: Record<string, string> = {
      batchId: batch.id,
      fileId: announced.id,
      failedJobId: lost.id,
      copyId: copy.id,
      siteId,
      plotId,
      token,
      memberId: member.id,
      invitationId: invited.id,
      laboratoryId: lab.id,
      sampleId: bag.id,
      reportId,
      reportSampleId: printed.id,
      layoutId: learnt.id,
      rowId: row.id,
      resultId: measured.id,
      planId: adopted.id,
      intentId: intent.id,
      applicationId: spread.id,
      ruleId: rule.id,
      reminderId: due.id,
      targetKey: set.key,
      year: '2026',
    };
    return params;
  });
}
