import { readFile as load } from 'node:fs/promises';
import Papa from 'papaparse';
import { beforeAll, describe, expect, it } from 'vitest';
import type { RouteHandler } from '@/app/api/v1/_route';
import { POST as confirm } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/confirm/route';
import { GET as getReview } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/review/route';
import { GET as getReport } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/route';
import { PATCH as editRow } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/rows/[rowId]/route';
import { PATCH as editRows } from '@/app/api/v1/sites/[siteId]/reports/[reportId]/rows/route';
import { GET as getCsv } from '@/app/api/v1/sites/[siteId]/results/csv/route';
import { GET as getResults } from '@/app/api/v1/sites/[siteId]/results/route';
import { POST as upload } from '@/app/api/v1/sites/[siteId]/uploads/route';
import { readFile } from '@/lib/jobs/readFile/readFile';
import { readReportWith } from '@/lib/jobs/readReport/handler';
import type { ResultList } from '@/lib/schemas/results';
import type { Review } from '@/lib/schemas/review';
import { cookieFor, ctxWorker, makePlot, makeSite, type TestSite, useWorld } from '../support/factory';
import { call, fileForm } from '../support/reports';

useWorld();

let here: TestSite;
const cookies = { owner: '', adviser: '', helper: '' };
const FOLDER = 'fixtures/reports/main-job';

beforeAll(async () => {
  here = await makeSite('Here');
  for (const role of ['owner', 'adviser', 'helper'] as const) cookies[role] = await cookieFor(here.people[role]);
  for (const name of ['Top bed', 'Long border', '=Wall bed']) await makePlot(here.id, { name });
});

type Expected = {
  samples: { sampleId: string; dateSampled: string; results: { analyte: string; printed: string }[] }[];
};

async function json<T>(handler: RouteHandler, init: Parameters<typeof call>[1], params: Record<string, string> = {}) {
  const answer = await call(handler, { cookie: cookies.helper, ...init }, { siteId: here.id, ...params });
  return { status: answer.status, body: (await answer.json()) as T };
}
const sending = (method: string, body: unknown) => ({
  method,
  body: JSON.stringify(body),
  headers: { 'content-type': 'application/json' },
});

async function read(name: string): Promise<string> {
  const form = fileForm(await load(`${FOLDER}/${name}`), name);
  const { body } = await json<{ reportId: string }>(upload, { method: 'POST', body: form });
  await readReportWith(readFile)({
    ctx: await ctxWorker(),
    payload: { siteId: here.id, id: body.reportId },
    signal: new AbortController().signal,
  });
  return body.reportId;
}

describe('from a file to confirmed results, over the routes', () => {
  it.each([
    ['last-spring.pdf', '73', '7,3', '7.3'],
    ['this-spring.csv', '6.8', '6,9', '6.9'],
  ])('%s', async (name, printed, typed, value) => {
    const reportId = await read(name);
    const expected: Expected = JSON.parse(await load(`${FOLDER}/${name.replace(/\.\w+$/, '')}.expected.json`, 'utf8'));
    const { body: state } = await json<{ state: string; pagesRead: number }>(getReport, {}, { reportId });
    expect(state).toMatchObject({ state: 'in-review' });
    const { body: seen } = await json<Review>(getReview, {}, { reportId });
    expect(seen.samples.map((one) => one.takenOn)).toEqual(expected.samples.map((one) => one.dateSampled));
    // "Wall bed" stands inside "=Wall bed"; the other two are named exactly.
    expect(seen.samples.every((one) => one.plotId !== null)).toBe(true);
    expect(seen.samples.map((one) => [one.depthFromCm, one.depthToCm])).toEqual(Array(3).fill(['0', '15.24']));
    const cells = seen.samples.map((sample) =>
      Object.fromEntries(
        seen.rows.filter((row) => row.reportSampleId === sample.id).map((row) => [row.analyte, row.printed]),
      ),
    );
    expect(cells).toEqual(
      expected.samples.map((sample) => Object.fromEntries(sample.results.map((row) => [row.analyte, row.printed]))),
    );

    // The page lost a decimal point once: that row comes first and cannot be confirmed as it stands.
    const row = seen.rows[0];
    if (!row) throw new Error('A row was expected.');
    expect(row.printed).toBe(printed);
    expect(seen.blockers.map((one) => one.rowId)).toEqual(row.impossible ? [row.id] : []);
    const cell = { reportId, rowId: row.id };
    const edited = await json(editRow, sending('PATCH', { version: 1, value: typed }), cell);
    expect([edited.status, edited.body]).toMatchObject([200, { printed: typed, value, state: 'edited' }]);
    const stale = await json<{ current: unknown }>(editRow, sending('PATCH', { version: 1, value: '7' }), cell);
    expect([stale.status, stale.body.current]).toEqual([409, edited.body]);
    const paste = async (version: number, text: string) => {
      const edits = [{ rowId: row.id, version, value: text }];
      return (await json(editRows, sending('PATCH', { edits }), { reportId })).body;
    };
    const saved = (state: string) => ({ outcomes: [{ rowId: row.id, outcome: { kind: 'saved', row: { state } } }] });
    expect(await paste(2, printed)).toMatchObject(saved('proposed'));
    expect(await paste(3, typed)).toMatchObject(saved('edited'));

    const clicks = await Promise.all([
      json<{ detail: string }>(confirm, { ...sending('POST', {}), cookie: cookies.owner }, { reportId }),
      json<{ detail: string }>(confirm, { ...sending('POST', {}), cookie: cookies.adviser }, { reportId }),
    ]);
    expect(clicks.map((click) => click.status).sort()).toEqual([200, 409]);
    const told = clicks.find((click) => click.status === 409)?.body.detail;
    expect(told).toMatch(/^This report is already confirmed by Grower /);
  });

  it('counts every value once and hands it out as a data file that no spreadsheet mistakes for a formula', async () => {
    const { body } = await json<ResultList>(getResults, {});
    expect(body.results).toHaveLength(2 * 3 * 13);
    const answer = await call(getCsv, { cookie: cookies.helper }, { siteId: here.id });
    expect(answer.headers.get('content-type')).toBe('text/csv; charset=utf-8; header=present');
    expect(answer.headers.get('content-disposition')).toContain('attachment; filename="Here soil results.csv"');
    const { data } = Papa.parse<Record<string, string>>((await answer.text()).replace(/^\ufeff/, ''), {
      header: true,
      skipEmptyLines: true,
    });
    expect(data).toHaveLength(2 * 3 * 13);
    expect(new Set(data.map((row) => row.plot))).toEqual(new Set(['Top bed', 'Long border', "'=Wall bed"]));
    const calcium = data.find(
      (row) => row['analyte key'] === 'calcium' && row.plot === 'Top bed' && row['taken on'] === '2026-04-11',
    );
    expect(calcium).toMatchObject({
      value: '2260',
      unit: 'mg/kg',
      'value mg/kg': '2260',
      'as printed': '2260',
      analysis: '1',
    });
    const one = await call(getCsv, { cookie: cookies.helper, url: '/?analyte=soil_ph_water' }, { siteId: here.id });
    expect((await one.text()).trim().split('\r\n')).toHaveLength(1 + 6);
  });
});
