import { recordApplication } from '@/lib/data/applications/recordApplication';
import { closeDatabase } from '@/lib/data/database';
import { getEffects } from '@/lib/data/effects/getEffects';
import { compareResults } from '@/lib/data/history/compareResults';
import { getHistory } from '@/lib/data/history/getHistory';
import { listPlots } from '@/lib/data/plots/listPlots';
import { collectDue } from '@/lib/data/reminders/collectDue';
import { listReports } from '@/lib/data/reports/listReports';
import { latestResults } from '@/lib/data/results/latestResults';
import { cookieFor, ctxAs, ctxWorker, makeLaboratory, makePlot, makeSite, makeTest } from '../support/factory';
import { benchFuzz } from './fuzz';
import { captureQueries, explainAll } from './hotQueries';
import { line, median, ms, quantile, verdict } from './measure';
import { fillMillion } from './million';
import { benchReading } from './reading';
import { benchForms, benchLayout } from './sets';
import { benchUpload, pageTimes } from './web';

const need = (name: string): string => {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: run this with \`npm run bench\`.`);
  return value;
};

const ONE_PAGE = 'fixtures/reports/main-job/last-spring.pdf';
const SIX_PAGES = 'fixtures/reports/matrix/six-pages.pdf';
const RATIO_GOAL = 1.5;
const YEARS = [2022, 2023, 2024, 2025, 2026];
const ANALYTES = [
  'soil_ph_water',
  'phosphorus',
  'potassium',
  'calcium',
  'magnesium',
  'sulfur',
  'boron',
  'zinc',
  'manganese',
  'copper',
];

/** One grower's plot with 100 results: ten analytes, spring and fall of five years. */
async function smallGround() {
  const site = await makeSite('Bench ground');
  const plotId = await makePlot(site.id, { name: 'Measured plot', targetSetKey: 'vegetables-1' });
  const laboratoryId = await makeLaboratory(site.id);
  const phs: string[] = [];
  for (const year of YEARS) {
    for (const day of [`${year}-04-10`, `${year}-10-05`]) {
      const values = ANALYTES.map((analyte, at) =>
        analyte === 'soil_ph_water'
          ? { analyte, value: (6 + (year % 5) / 10).toFixed(1), unit: 'pH' }
          : {
              analyte,
              value: String(20 + at * 7 + (year % 5)),
              unit: 'mg/kg',
              method: 'Mehlich_3',
              basis: 'mass' as const,
            },
      );
      const [ph] = await makeTest(site, plotId, day, values, { laboratoryId });
      if (ph) phs.push(ph);
    }
  }
  await recordApplication({
    ctx: await ctxAs(site.people.owner),
    input: {
      siteId: site.id,
      plotId,
      material: { key: 'elemental-sulfur-90' },
      amount: 8,
      amountUnit: 'lb',
      appliedOn: '2025-04-20',
      intents: [{ analyte: 'soil_ph_water', unit: 'pH', fullChange: -0.5, low: null, high: null, source: 'typed' }],
    },
  });
  return { site, plotId, phs };
}

async function main(): Promise<void> {
  const [, , only, mutants, seed] = process.argv;
  // Hurt reports: `npm run bench -- fuzz 5000 1` tries 5,000 from seed 1 on.
  if (only === 'fuzz') return benchFuzz(Number(mutants ?? 3_000), Number(seed ?? 1));
  const url = need('DATABASE_URL');
  if (!only || only === 'reading') {
    await benchReading([
      { name: '1-page PDF', path: ONE_PAGE },
      { name: '6-page PDF', path: SIX_PAGES },
    ]);
  }
  if (!only || only === 'reading' || only === 'forms') {
    await benchLayout([
      { name: '1-page.pdf', path: ONE_PAGE },
      { name: '6-page.pdf', path: SIX_PAGES },
    ]);
    await benchForms();
  }
  if (only === 'reading' || only === 'forms') return;
  const { site, plotId, phs } = await smallGround();
  const web = { origin: need('APP_ORIGIN'), cookie: await cookieFor(site.people.owner) };
  await benchUpload(web, site.id, '1-page PDF', ONE_PAGE);
  await benchUpload(web, site.id, '6-page PDF', SIX_PAGES);

  const paths = {
    'plot page (HTML)': `/sites/${site.id}/plots/${plotId}`,
    'plot history (JSON)': `/api/v1/sites/${site.id}/plots/${plotId}/history`,
  };
  const before: Record<string, number[]> = {};
  for (const [name, path] of Object.entries(paths)) before[name] = await pageTimes(web, path);
  const count = await fillMillion(need('DATABASE_SUPERUSER_URL'), site.people.owner.id);
  line('results in the table now', count.toLocaleString('en'));
  for (const [name, path] of Object.entries(paths)) {
    const [small, large] = [before[name] ?? [], await pageTimes(web, path)];
    const ratio = median(large) / median(small);
    line(`${name}: 100 results / a million, median`, `${ms(median(small))} / ${ms(median(large))}`);
    line(`${name}: 95th of 100, a million`, `${ms(quantile(small, 0.95))} / ${ms(quantile(large, 0.95))}`);
    line(`${name}: ratio of medians`, `${ratio.toFixed(2)}  ${verdict(ratio <= RATIO_GOAL)}`, `at most ${RATIO_GOAL}`);
  }
  const ctx = await ctxAs(site.people.owner);
  const worker = await ctxWorker();
  const here = { siteId: site.id };
  const [a = '', b = ''] = phs.slice(-2);
  const captured = await captureQueries(url, {
    'all series of a plot': () => getHistory({ ctx, input: { ...here, plotId } }),
    'one series': () => compareResults({ ctx, input: { ...here, analyte: 'soil_ph_water', a, b } }),
    'latest per plot and analyte': () => latestResults({ ctx, input: here }),
    'last test of all my plots': () => listPlots({ ctx, input: here }),
    'effect checks of the site': () => getEffects({ ctx, input: here }),
    inbox: () => listReports({ ctx, input: here }),
    'due reminders': () => collectDue({ ctx: worker, input: {} }),
  });
  await explainAll(url, site.id, captured);
}

try {
  await main();
} finally {
  await closeDatabase();
}
