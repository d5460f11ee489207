import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { GET as getFileRoute } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/file/route';
import { POST as upload } from '@/app/api/v1/sites/[siteId]/uploads/route';
import { auditEvent, report } from '@/db/schema';
import { withSite } from '@/lib/data/transaction';
import type { SiteId } from '@/lib/domain/ids';
import { cookieFor, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { call, calmStore, fileForm, pdfBytes, tellStore } from '../support/reports';

const world = useWorld();

let here: TestSite;
let there: TestSite;
let helper: string;

beforeAll(async () => {
  here = await makeSite('Here');
  there = await makeSite('There');
  helper = await cookieFor(here.people.helper);
});
afterEach(calmStore);

const send = (
  bytes: Uint8Array,
  name: string,
  fields: Record<string, string> = {},
  cookie = helper,
  siteId = here.id,
) => call(upload, { method: 'POST', body: fileForm(bytes, name, fields), cookie }, { siteId });

const rowsOf = (siteId: SiteId, id: string) =>
  withSite(siteId, (tx) => tx.select().from(report).where(eq(report.id, id)));
const countOf = async (siteId: SiteId) =>
  (await withSite(siteId, (tx) => tx.select({ id: report.id }).from(report))).length;
const jobsOf = (id: string) =>
  world.owner()<{ name: string }[]>`select name from queue.job where data ->> 'id' = ${id}`;

describe('sending a report', () => {
  it('keeps the file under a key of its own, and writes row, job and audit together', async () => {
    const plotId = await makePlot(here.id);
    const bytes = pdfBytes();
    const answer = await send(bytes, 'spring.pdf', { plotId });
    expect(answer.status).toBe(201);
    const body = await answer.json();
    expect(body).toEqual({
      kind: 'received',
      reportId: expect.any(String),
      fileName: 'spring.pdf',
      bytes: bytes.length,
    });
    const [row] = await rowsOf(here.id, body.reportId);
    expect(row).toMatchObject({
      state: 'received',
      contentType: 'application/pdf',
      droppedOnPlotId: plotId,
      uploadedBy: here.people.helper.id,
      revision: 1,
    });
    expect(row?.fileKey).toMatch(
      new RegExp(`^site/${here.id}/[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}\\.pdf$`),
    );
    expect((await jobsOf(body.reportId)).map((job) => job.name)).toEqual(['read-report']);
    const trail = await withSite(here.id, (tx) =>
      tx.select().from(auditEvent).where(eq(auditEvent.objectId, body.reportId)),
    );
    expect(trail.map((event) => [event.act, event.personId])).toEqual([['report.upload', here.people.helper.id]]);

    const got = await call(getFileRoute, { cookie: helper }, { siteId: here.id, reportId: body.reportId });
    expect(new Uint8Array(await got.arrayBuffer())).toEqual(bytes);
    expect(Object.fromEntries(got.headers)).toMatchObject({
      'content-type': 'application/pdf',
      'content-disposition': `attachment; filename="spring.pdf"; filename*=UTF-8''spring.pdf`,
      'x-content-type-options': 'nosniff',
      'content-security-policy': "sandbox; default-src 'none'",
      'cache-control': 'private, no-store',
    });
  });

  it('recognises the same file on this site, and keeps quiet about other sites', async () => {
    const bytes = pdfBytes();
    const first = await (await send(bytes, 'a.pdf')).json();
    const before = await countOf(here.id);
    const again = await send(bytes, 'b.pdf');
    expect(again.status).toBe(200);
    expect(await again.json()).toMatchObject({
      kind: 'seen-before',
      reportId: first.reportId,
      fileName: 'a.pdf',
      state: 'received',
    });
    expect(await countOf(here.id)).toBe(before);
    const elsewhere = await send(bytes, 'a.pdf', {}, await cookieFor(there.people.owner), there.id);
    expect(await elsewhere.json()).toMatchObject({ kind: 'received' });
    const revision = await (await send(bytes, 'a.pdf', { asRevision: 'true' })).json();
    expect(revision.kind).toBe('received');
    const [row] = await rowsOf(here.id, revision.reportId);
    expect(row?.revision).toBe(2);
  });

  it('makes one report of two uploads of the same file at the same time', async () => {
    const bytes = pdfBytes();
    const answers = await Promise.all([send(bytes, 'one.pdf'), send(bytes, 'two.pdf'), send(bytes, 'three.pdf')]);
    const bodies = await Promise.all(answers.map((answer) => answer.json()));
    expect(bodies.filter((body) => body.kind === 'received')).toHaveLength(1);
    expect(new Set(bodies.map((body) => body.reportId)).size).toBe(1);
    const rows = await withSite(here.id, (tx) => tx.select().from(report).where(eq(report.id, bodies[0].reportId)));
    const got = await call(getFileRoute, { cookie: helper }, { siteId: here.id, reportId: rows[0]?.id ?? '' });
    expect(got.status).toBe(200);
  });

  it.each([
    ['an empty file', new Uint8Array(0), 'empty.pdf', 422, 'empty'],
    ['a page that calls itself PDF', new TextEncoder().encode('<!doctype html><p>hello'), 'page.pdf', 415, 'not-a-pdf'],
    ['a PDF that calls itself CSV', pdfBytes(), 'report.csv', 415, 'not-what-it-says'],
    ['a program', new Uint8Array([0x7f, 0x45, 0x4c, 0x46, 0, 0, 0]), 'tool.exe', 415, 'type-not-accepted'],
    ['a data file over 5 MB', new Uint8Array(5 * 1024 * 1024 + 1).fill(0x61), 'big.csv', 413, 'too-large'],
  ])('refuses %s with a sentence and keeps nothing', async (_, bytes, name, status, reason) => {
    const before = await countOf(here.id);
    const answer = await send(bytes, name);
    const body = await answer.json();
    expect([answer.status, body.reason]).toEqual([status, reason]);
    expect(body.detail).toMatch(/Nothing was kept\.$/);
    expect(await countOf(here.id)).toBe(before);
  });

  it('takes exactly 20 MB and not a byte more, however the body arrives', async () => {
    const limit = 20 * 1024 * 1024;
    const full = new Uint8Array(limit);
    full.set(pdfBytes());
    expect((await send(full, 'full.pdf')).status).toBe(201);
    const over = new Uint8Array(limit + 1);
    over.set(pdfBytes());
    const known = await send(over, 'over.pdf');
    expect(known.status).toBe(413);

    let pulled = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        pulled += 1;
        controller.enqueue(new Uint8Array(1024 * 1024));
      },
    });
    const init = { method: 'POST', body: endless, duplex: 'half', cookie: helper } as const;
    const headers = { 'content-type': 'multipart/form-data; boundary=x' };
    const streamed = await call(upload, { ...init, headers }, { siteId: here.id });
    expect(streamed.status).toBe(413);
    expect((await streamed.json()).detail).toContain('20 MB');
    expect(pulled).toBeLessThan(40);
  });

  it('says in three seconds that the store is not answering, and writes no row', async () => {
    const before = await countOf(here.id);
    await tellStore({ fail: 10, method: 'PUT' });
    const started = performance.now();
    const answer = await send(pdfBytes(), 'kept.pdf');
    expect(answer.status).toBe(503);
    expect(performance.now() - started).toBeLessThan(3000);
    expect(await answer.json()).toMatchObject({
      reason: 'file-store',
      detail: expect.stringContaining('still with you'),
    });
    expect(await countOf(here.id)).toBe(before);
  });

  it('never hands on other bytes than were stored', async () => {
    const { reportId } = await (await send(pdfBytes(), 'a.pdf')).json();
    await tellStore({ garbage: 1, method: 'GET' });
    const answer = await call(getFileRoute, { cookie: helper }, { siteId: here.id, reportId });
    expect(answer.status).toBe(503);
    expect((await answer.json()).reason).toBe('file-changed');
  });

  it.each([
    ['../../etc/passwd.pdf', 'passwd.pdf'],
    ['C:\\scans\\soil.pdf', 'soil.pdf'],
    ['a\u202ecod.exe.pdf', 'a cod.exe.pdf'],
    [`${'x'.repeat(300)}.pdf`, `${'x'.repeat(116)}.pdf`],
  ])('cleans the name %j', async (given, kept) => {
    const body = await (await send(pdfBytes(), given)).json();
    expect(body.fileName).toBe(kept);
  });

  it('[E 56] writes names into headers so that nothing breaks out of them', async () => {
    const { reportId } = await (await send(pdfBytes(), 'Frühling "2026"; x.pdf')).json();
    const got = await call(getFileRoute, { cookie: helper }, { siteId: here.id, reportId });
    expect(got.headers.get('content-disposition')).toBe(
      `attachment; filename="Fr_hling _2026__ x.pdf"; filename*=UTF-8''Fr%C3%BChling%20%222026%22%3B%20x.pdf`,
    );
  });

  it('wants one file in the field called file', async () => {
    const none = await call(upload, { method: 'POST', body: new FormData(), cookie: helper }, { siteId: here.id });
    expect([none.status, (await none.json()).reason]).toEqual([422, 'no-file']);
    const two = fileForm(pdfBytes(), 'a.pdf');
    two.append('file', new File(['%PDF-'], 'b.pdf'));
    const both = await call(upload, { method: 'POST', body: two, cookie: helper }, { siteId: here.id });
    expect(both.status).toBe(422);
    const json = { method: 'POST', body: '{}', headers: { 'content-type': 'application/json' }, cookie: helper };
    expect((await call(upload, json, { siteId: here.id })).status).toBe(415);
    const forged = await send(pdfBytes(), 'a.pdf', { siteId: there.id, state: 'confirmed' });
    expect(forged.status).toBe(422);
  });

  it('stands behind the same doors as every route', async () => {
    const bytes = pdfBytes();
    const foreign = { headers: { 'sec-fetch-site': 'cross-site' } };
    const crossSite = await call(
      upload,
      { method: 'POST', body: fileForm(bytes, 'a.pdf'), cookie: helper, ...foreign },
      { siteId: here.id },
    );
    expect([crossSite.status, (await crossSite.json()).reason]).toEqual([403, 'cross-site']);
    expect((await send(bytes, 'a.pdf', {}, '')).status).toBe(401);
    expect((await send(bytes, 'a.pdf', {}, await cookieFor(here.people.viewer))).status).toBe(403);
    expect((await send(bytes, 'a.pdf', {}, await cookieFor(there.people.owner))).status).toBe(404);
    const foreignPlot = await makePlot(there.id);
    expect((await send(bytes, 'a.pdf', { plotId: foreignPlot })).status).toBe(404);
    expect((await send(bytes, 'a.pdf', { plotId: randomUUID() })).status).toBe(404);
  });

  it('[E 48] opens the original for owner, adviser and helper only, and only on its own site', async () => {
    const { reportId } = await (await send(pdfBytes(), 'a.pdf')).json();
    const at = async (cookie: string, siteId: string) =>
      (await call(getFileRoute, { cookie }, { siteId, reportId })).status;
    expect(await at(await cookieFor(here.people.viewer), here.id)).toBe(403);
    expect(await at(await cookieFor(here.people.adviser), here.id)).toBe(200);
    expect(await at(await cookieFor(there.people.owner), there.id)).toBe(404);
    // A key that leads to another site is not followed, whatever the row says.
    await withSite(here.id, (tx) =>
      tx
        .update(report)
        .set({ fileKey: `site/${there.id}/x.pdf` })
        .where(eq(report.id, reportId)),
    );
    expect(await at(helper, here.id)).toBe(404);
  });
});
