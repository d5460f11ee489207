import type { DemoSite } from './types';

const round = (file: string, sentOn: string) => ({ file, sentBy: 'maud', sentOn }) as const;
const years = (crop: string, targetSetKey: string) =>
  [2023, 2024, 2025, 2026].map((year) => ({ year, crop, targetSetKey }));

/** Three plots, one of them treated with sulfur and the other two left alone: what a verdict with controls needs. */
export const SLOE_BANK: DemoSite = {
  name: 'Sloe Bank',
  owner: 'maud',
  since: '2023-04-05',
  plan: { widthM: 22, heightM: 14 },
  members: [
    { who: 'hester', role: 'adviser' },
    { who: 'joss', role: 'helper' },
    { who: 'nell', role: 'viewer' },
  ],
  plots: [
    {
      name: 'Onion bed',
      outline: [
        [1.5, 8.5],
        [14, 8.5],
        [14, 12.5],
        [1.5, 12.5],
      ],
      texture: 'light',
      targetSetKey: 'vegetables-1',
      notes: 'Old coal-ash paths on both sides. The show onions stand here every year.',
      crops: years('Exhibition onions', 'vegetables-1'),
    },
    {
      name: 'Leek trench',
      outline: [
        [1.5, 1.5],
        [11.5, 1.5],
        [11.5, 5.5],
        [1.5, 5.5],
      ],
      texture: 'light',
      targetSetKey: 'vegetables-1',
      notes: 'Two rows of blanch leeks, trenched each winter.',
      crops: years('Blanch leeks', 'vegetables-1'),
    },
    {
      name: 'Pot leek bed',
      outline: [
        [13, 1.5],
        [20, 1.5],
        [20, 3.5],
        [18, 6.5],
        [13, 6.5],
      ],
      texture: 'medium',
      targetSetKey: 'vegetables-1',
      notes: 'The corner by the water butt was never dug.',
      crops: years('Pot leeks', 'vegetables-1'),
    },
  ],
  reports: [
    { file: 'old-report-2022.pdf', sentBy: 'joss', sentOn: '2024-03-12', droppedOn: 'Onion bed' },
    round('sloe-bank-2023-spring.pdf', '2023-04-27'),
    round('sloe-bank-2024-spring.pdf', '2024-04-18'),
    round('sloe-bank-2025-spring.pdf', '2025-04-17'),
    { file: 'sloe-bank-2025-spring-data.csv', sentBy: 'joss', sentOn: '2025-04-24' },
    round('sloe-bank-2025-fall.pdf', '2025-10-23'),
    round('sloe-bank-2026-spring.pdf', '2026-04-23'),
    { file: 'sloe-bank-2026-fall.pdf', sentBy: 'joss', sentOn: '2026-11-29' },
  ],
  events: [
    { on: '2023-04-29', by: 'maud', kind: 'confirm', file: 'sloe-bank-2023-spring.pdf', cores: 20 },
    { on: '2023-04-30', by: 'hester', kind: 'rule', plot: 'Onion bed', rule: 'after-sulfur' },
    { on: '2023-04-30', by: 'hester', kind: 'rule', plot: 'Onion bed', rule: 'yearly-same-season' },
    { on: '2023-04-30', by: 'hester', kind: 'rule', plot: 'Leek trench', rule: 'yearly-same-season' },
    { on: '2024-04-19', by: 'hester', kind: 'confirm', file: 'sloe-bank-2024-spring.pdf', cores: 20 },
    {
      on: '2024-04-20',
      by: 'maud',
      kind: 'spread',
      plot: 'Onion bed',
      input: {
        material: { key: 'elemental-sulfur-90' },
        amount: 5.4,
        amountUnit: 'lb',
        depthCm: 15,
        method: 'raked in before planting out',
        soilCondition: 'dry enough to till',
        note: 'Weighed in two passes, lengthwise and across.',
        intents: [
          {
            analyte: 'soil_ph_water',
            unit: 'pH',
            fullChange: -0.9,
            low: -0.33,
            high: -0.9,
            source:
              'eXtension: Soil pH for Blueberry Plantings, 2010 (10 lb of sulfur per 1,000 sq ft for one unit, light soil)',
          },
        ],
      },
    },
    { on: '2025-04-18', by: 'maud', kind: 'confirm', file: 'sloe-bank-2025-spring.pdf', cores: 20 },
    {
      on: '2025-04-19',
      by: 'joss',
      kind: 'spread',
      plot: 'Leek trench',
      input: {
        material: { key: 'potassium-sulfate' },
        amount: 4.3,
        amountUnit: 'lb',
        depthCm: 15,
        method: 'forked in along the trench',
        intents: [
          {
            analyte: 'potassium',
            unit: 'mg/kg',
            fullChange: 40,
            low: 25,
            high: 41,
            source: 'Tri-state build-up figures, as quoted by an extension writer, 2012',
          },
        ],
      },
    },
    {
      on: '2025-04-26',
      by: 'maud',
      kind: 'confirm',
      file: 'sloe-bank-2025-spring-data.csv',
      cores: 20,
      sameAs: 'sloe-bank-2025-spring.pdf',
    },
    { on: '2025-10-25', by: 'hester', kind: 'confirm', file: 'sloe-bank-2025-fall.pdf', cores: 20 },
    {
      on: '2026-02-14',
      by: 'hester',
      kind: 'targets',
      input: {
        name: 'Show onions, as we like them',
        bands: [
          { analyte: 'soil_ph_water', low: 6.3, high: 6.9, unit: 'pH' },
          { analyte: 'potassium', low: 180, high: 260, unit: 'mg/kg', method: 'M3' },
        ],
      },
    },
    { on: '2026-04-24', by: 'maud', kind: 'confirm', file: 'sloe-bank-2026-spring.pdf', cores: 20 },
    {
      on: '2026-08-01',
      by: 'joss',
      kind: 'spread',
      plot: 'Onion bed',
      input: {
        material: { key: 'elemental-sulfur-90' },
        amount: 2.4,
        amountUnit: 'lb',
        depthCm: 15,
        method: 'raked in after lifting',
        intents: [
          {
            analyte: 'soil_ph_water',
            unit: 'pH',
            fullChange: -0.4,
            low: -0.15,
            high: -0.4,
            source:
              'eXtension: Soil pH for Blueberry Plantings, 2010 (10 lb of sulfur per 1,000 sq ft for one unit, light soil)',
          },
        ],
      },
    },
  ],
};
