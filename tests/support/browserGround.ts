import { newAddress, PASSWORD } from './browserPeople';
import { callAs, linkIn, newMail } from './browserStack';
import { cookieFor, makeLaboratory, makePlot, makeSite, makeTest, type TestSite } from './factory';

export type Ground = {
  site: TestSite;
  cookies: { owner: string; viewer: string };
  /** What stands for each part in square brackets of a page's folder. */
  parts: Record<string, string>;
};

const box = (left: number): [number, number][] => [
  [left, 1],
  [left + 8, 1],
  [left + 8, 4],
  [left, 4],
];

const values = (ph: string, phosphorus: string) => [
  { analyte: 'soil_ph_water', value: ph, unit: 'pH' },
  { analyte: 'phosphorus', value: phosphorus, unit: 'mg/kg', method: 'M3', basis: 'mass' as const },
  { analyte: 'organic_matter', value: '4.3', unit: '%', method: 'LOI' },
];

/** A site whose every page has something to show: tests, a treatment with its verdict, a reminder, a report in review. */
export async function makeGround(name: string): Promise<Ground> {
  const site = await makeSite(name);
  const cookies = { owner: await cookieFor(site.people.owner), viewer: await cookieFor(site.people.viewer) };
  const laboratoryId = await makeLaboratory(site.id);
  const plotId = await makePlot(site.id, { name: 'The long bed by the old brick wall', outline: box(1) });
  const beside = await makePlot(site.id, { name: 'Beside it', outline: box(12) });
  for (const [day, ph, besidePh] of [
    ['2024-10-05', '7.4', '7.4'],
    ['2025-04-12', '7.3', '7.4'],
    ['2026-04-11', '6.8', '7.4'],
  ] as const) {
    await makeTest(site, plotId, day, values(ph, '88'), { laboratoryId });
    await makeTest(site, beside, day, values(besidePh, '61'), { laboratoryId });
  }
  const owner = callAs(cookies.owner);
  await owner.send('POST', `/sites/${site.id}/applications`, {
    plotId,
    material: { key: 'elemental-sulfur-90' },
    amount: 2,
    amountUnit: 'lb',
    appliedOn: '2025-04-20',
    intents: [{ analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.5, low: null, high: null, source: 'typed' }],
  });
  await owner.send('PUT', `/sites/${site.id}/reminders/rules`, { plotId, kind: 'yearly-same-season', active: true });
  const { key: targetKey } = await owner.send<{ key: string }>('POST', `/sites/${site.id}/targets`, {
    name: 'Exhibition onions',
    bands: [{ analyte: 'soil_ph_water', low: 6.3, high: 6.8 }],
  });
  const { batchId, fileIds } = await owner.send<{ batchId: string; fileIds: string[] }>(
    'POST',
    `/sites/${site.id}/batches`,
    {
      files: [
        { name: 'last-spring.pdf', bytes: 3000 },
        { name: 'empty.pdf', bytes: 0, refusal: 'This file is empty, so nothing was sent.' },
        { name: 'a-report-with-a-very-long-name-from-the-drawer-of-the-shed-spring-2019.pdf', bytes: 90000 },
      ],
    },
  );
  const reportId = await owner.upload(site.id, 'fixtures/reports/main-job/last-spring.pdf', plotId, fileIds[0]);
  return { site, cookies, parts: { siteId: site.id, plotId, reportId, targetKey, batchId } };
}

/** One living link of each kind that a mail carries, by the folder of its page. */
export async function makeTokens({ site, cookies }: Ground): Promise<Record<string, string>> {
  const owner = callAs(cookies.owner);
  const nobody = callAs('');
  const invited = newAddress('invited');
  await owner.send('POST', `/sites/${site.id}/invitations`, { email: invited, role: 'helper' });
  const signedUp = newAddress('new');
  const surroundings = { timeZone: 'America/New_York', units: 'us' };
  await nobody.send('POST', '/people', { name: 'New Grower', email: signedUp, password: PASSWORD, ...surroundings });
  await nobody.send('POST', '/people/reset', { email: site.people.owner.email });
  const token = async (address: string, part: string) =>
    (linkIn(await newMail(address, /./), part).split(part)[1] ?? '').replace(/\?.*$/, '');
  return {
    invitation: await token(invited, '/invitation/'),
    verify: await token(signedUp, '/verify/'),
    reset: await token(site.people.owner.email, '/reset/'),
  };
}
