// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { delay, HttpResponse, http } from 'msw';
import { setupServer } from 'msw/node';
import { SWRConfig } from 'swr';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import type { ApplicationAnswer } from '@/lib/schemas/applications';
import { PlotRecords, type PlotRecordsProps } from './plot-records';

const origin = 'http://loamline.test';
const at = (path: string) => `${origin}/api/v1/sites/site-1${path}`;
const server = setupServer();

beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterAll(() => server.close());
beforeEach(() => {
  // In a browser a path alone is enough; Node wants a whole address.
  const through = globalThis.fetch;
  vi.stubGlobal('fetch', (input: string, init?: RequestInit) => through(`${origin}${input}`, init));
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
  server.resetHandlers();
});

const record = (id: string, more: Partial<ApplicationAnswer> = {}): ApplicationAnswer => ({
  id,
  plotId: 'plot-1',
  planId: `plan-${id}`,
  material: { key: 'gypsum', name: 'Gypsum', reaction: 'soluble-salt', affects: ['calcium'] },
  amountKg: 4.0823,
  amountPrinted: '9 lb',
  plannedKg: 4.0823,
  areaM2: 60,
  appliedOn: '2026-04-20',
  depthCm: null,
  method: '',
  soilCondition: '',
  note: '',
  recordedBy: 'person-1',
  recordedByName: 'A grower',
  mine: false,
  intents: [],
  ...more,
});

const OWNER = { record: true, correctOwn: true, correctAny: true };
const HELPER = { record: true, correctOwn: true, correctAny: false };
const VIEWER = { record: false, correctOwn: false, correctAny: false };

function show(may: PlotRecordsProps['may'], applications: ApplicationAnswer[] = []) {
  return render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <PlotRecords
        siteId="site-1"
        plotId="plot-1"
        first={{ applications }}
        units="us"
        today="2026-12-01"
        plotAreaM2={60}
        may={may}
      />
    </SWRConfig>,
  );
}

const problem = (fields: Record<string, string>) =>
  HttpResponse.json(
    {
      type: 'about:blank',
      title: 'Something needs a change',
      status: 422,
      code: 'invalid',
      detail: 'Nothing was saved yet.',
      fields,
    },
    { status: 422, headers: { 'content-type': 'application/problem+json' } },
  );
const noSuggestion = http.get(at('/applications/expected-change'), () =>
  HttpResponse.json({ suggestions: [], sentence: 'No published rule says how far this moves a soil test.' }),
);
const open = () => userEvent.click(screen.getByRole('button', { name: 'Record what was spread' }));
const press = () => userEvent.click(screen.getByRole('button', { name: /^Record this application/ }));

describe('who is offered what', () => {
  const mine = record('1', { mine: true, note: 'my own' });
  const theirs = record('2', { note: 'somebody else’s' });
  const itemOf = (note: string) => within(screen.getByText(note).closest('li') ?? document.body);

  it('lets a viewer read, without a dead button', () => {
    show(VIEWER, [mine, theirs]);
    expect(screen.getAllByText('Gypsum, 9 lb')).toHaveLength(2);
    expect(screen.queryAllByRole('button')).toEqual([]);
  });

  it('lets a helper correct their own record only', () => {
    show(HELPER, [mine, theirs]);
    expect(itemOf('my own').getByRole('button', { name: 'Correct' })).toBeDefined();
    expect(itemOf('somebody else’s').queryByRole('button')).toBeNull();
  });

  it('lets an owner correct any', () => {
    show(OWNER, [mine, theirs]);
    expect(itemOf('somebody else’s').getByRole('button', { name: 'Remove' })).toBeDefined();
  });
});

describe('recording', () => {
  it('says at each field what the API says of it, and keeps what was typed', async () => {
    server.use(
      noSuggestion,
      http.post(at('/applications'), () =>
        problem({
          appliedOn: 'Give today or an earlier day.',
          'intents.0.fullChange': 'A change of nothing cannot be checked.',
        }),
      ),
    );
    show(HELPER);
    await open();
    await userEvent.selectOptions(screen.getByLabelText('Material'), 'gypsum');
    await userEvent.type(screen.getByLabelText('Amount spread'), '9');
    await userEvent.selectOptions(screen.getByLabelText('Analyte'), 'calcium');
    await userEvent.type(screen.getByLabelText('Change meant'), '0');
    await press();
    const summary = await screen.findByTestId('error-summary');
    expect(within(summary).getByText('Give today or an earlier day.')).toBeDefined();
    for (const label of ['Day', 'Change meant']) {
      expect(screen.getByLabelText(label).getAttribute('aria-invalid')).toBe('true');
    }
    expect(screen.getByLabelText('Amount spread')).toHaveProperty('value', '9');
  });

  it('asks nothing of the API while the material is missing', async () => {
    show(HELPER);
    await open();
    await press();
    expect(screen.getByLabelText('Material').getAttribute('aria-invalid')).toBe('true');
  });

  it('shows the cautions and their sources beside the amount, and what the amount comes to', async () => {
    server.use(noSuggestion);
    show(HELPER);
    await open();
    await userEvent.selectOptions(screen.getByLabelText('Material'), 'elemental-sulfur-90');
    await userEvent.type(screen.getByLabelText('Amount spread'), '9');
    await userEvent.type(screen.getByLabelText('Area treated'), '1000');
    const facts = within(screen.getByRole('complementary', { name: 'About this material' }));
    expect(facts.getByText('9 lb per 1,000 sq ft')).toBeDefined();
    expect(facts.getByText(/Dusty: spread on a still day/).textContent).toContain('Royal Horticultural Society');
    expect(facts.getByText(/product label, local rules and a licensed adviser/)).toBeDefined();
  });

  it('takes a published range as the change meant, with its source, and sends one record for two presses', async () => {
    const sent: unknown[] = [];
    let asked = '';
    server.use(
      http.get(at('/applications/expected-change'), ({ request }) => {
        asked = new URL(request.url).search;
        const one = {
          analyte: 'soil_ph_water',
          unit: 'pH',
          likely: -0.46,
          low: -0.28,
          high: -0.77,
          source: 'A publisher',
          weakSource: true,
        };
        return HttpResponse.json({ suggestions: [one], sentence: null });
      }),
      http.post(at('/applications'), async ({ request }) => {
        sent.push(await request.json());
        await delay(60);
        return HttpResponse.json({ id: 'new' }, { status: 201 });
      }),
      http.get(at('/applications'), () => HttpResponse.json({ applications: [record('new')] })),
    );
    show(HELPER);
    await open();
    await userEvent.selectOptions(screen.getByLabelText('Material'), 'elemental-sulfur-90');
    await userEvent.type(screen.getByLabelText('Amount spread'), '9');
    await userEvent.type(screen.getByLabelText(/^Worked in/), '6');
    await userEvent.click(await screen.findByRole('button', { name: 'Use -0.46 as the change meant' }));
    await waitFor(() => expect(new URLSearchParams(asked).get('depthCm')).toBe('15.24'));
    expect(screen.getByText(/weak source/, { selector: 'p' })).toBeDefined();
    await userEvent.dblClick(screen.getByRole('button', { name: 'Record this application' }));
    await screen.findByText('Gypsum, 9 lb');
    expect(sent).toHaveLength(1);
    expect(sent[0]).toMatchObject({
      plotId: 'plot-1',
      amount: 9,
      depthCm: 15.24,
      appliedOn: '2026-12-01',
      intents: [{ analyte: 'soil_ph_water', fullChange: -0.46, low: -0.28, high: -0.77, source: 'A publisher' }],
    });
  });
});

describe('correcting and removing', () => {
  it('sends the reason, and tells who was slower what stands there', async () => {
    const bodies: unknown[] = [];
    server.use(
      http.delete(at('/applications/1'), async ({ request }) => {
        bodies.push(await request.json());
        return HttpResponse.json(
          {
            title: 'Somebody was faster',
            status: 409,
            code: 'conflict',
            detail: 'Somebody else has just corrected this record.',
          },
          { status: 409 },
        );
      }),
    );
    show(OWNER, [record('1')]);
    await userEvent.click(screen.getByRole('button', { name: 'Remove' }));
    await userEvent.type(screen.getByLabelText('Why it is removed'), 'recorded twice');
    await userEvent.click(screen.getByRole('button', { name: 'Remove this record' }));
    expect(await screen.findByText('Somebody else has just corrected this record.')).toBeDefined();
    expect(bodies).toEqual([{ reason: 'recorded twice' }]);
  });

  it('begins a correction with what stands there', async () => {
    const bodies: unknown[] = [];
    server.use(
      http.put(at('/applications/1'), async ({ request }) => {
        bodies.push(await request.json());
        return HttpResponse.json({ id: '2' });
      }),
      http.get(at('/applications'), () =>
        HttpResponse.json({ applications: [record('2', { amountPrinted: '8 lb' })] }),
      ),
    );
    show(OWNER, [record('1', { note: 'windy' })]);
    await userEvent.click(screen.getByRole('button', { name: 'Correct' }));
    const amount = screen.getByLabelText('Amount spread');
    expect(amount).toHaveProperty('value', '9');
    await userEvent.clear(amount);
    await userEvent.type(amount, '8');
    await userEvent.type(screen.getByLabelText('Why it is corrected'), 'one bag was short');
    await userEvent.click(screen.getByRole('button', { name: 'Save the correction' }));
    await screen.findByText('Gypsum, 8 lb');
    expect(bodies).toEqual([
      expect.objectContaining({
        material: { key: 'gypsum' },
        amount: 8,
        amountUnit: 'lb',
        areaM2: 60,
        note: 'windy',
        reason: 'one bag was short',
      }),
    ]);
  });
});
