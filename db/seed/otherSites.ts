import type { DemoSite } from './types';

/** One plot, no neighbour to hold it against: limed, and less came of it than was meant. */
export const CINDER_LANE: DemoSite = {
  name: 'Cinder Lane',
  owner: 'tobias',
  since: '2023-04-08',
  plan: { widthM: 12, heightM: 9 },
  members: [{ who: 'hester', role: 'adviser' }],
  plots: [
    {
      name: 'Marrow mound',
      outline: [
        [2, 2],
        [6, 1.2],
        [9.5, 2.4],
        [10, 5.5],
        [6.5, 7.4],
        [2.6, 6],
      ],
      texture: 'medium',
      targetSetKey: 'pumpkin-and-squash-1',
      notes: 'Turf stacked in 2019, a barrow of stable manure each winter.',
      crops: [2023, 2024, 2025, 2026].map((year) => ({
        year,
        crop: 'Heavy marrow',
        targetSetKey: 'pumpkin-and-squash-1',
      })),
    },
  ],
  reports: [
    { file: 'cinder-lane-2023-spring.pdf', sentBy: 'tobias', sentOn: '2023-05-06', droppedOn: 'Marrow mound' },
    { file: 'cinder-lane-2024-spring.pdf', sentBy: 'tobias', sentOn: '2024-04-27', droppedOn: 'Marrow mound' },
    { file: 'cinder-lane-2025-spring.pdf', sentBy: 'tobias', sentOn: '2025-05-03', droppedOn: 'Marrow mound' },
    { file: 'cinder-lane-2026-spring.pdf', sentBy: 'hester', sentOn: '2026-04-24', droppedOn: 'Marrow mound' },
  ],
  events: [
    { on: '2023-05-07', by: 'hester', kind: 'confirm', file: 'cinder-lane-2023-spring.pdf', cores: 12 },
    { on: '2024-04-27', by: 'tobias', kind: 'confirm', file: 'cinder-lane-2024-spring.pdf', cores: 15 },
    {
      on: '2024-04-28',
      by: 'tobias',
      kind: 'spread',
      plot: 'Marrow mound',
      input: {
        material: { key: 'ground-limestone' },
        amount: 21,
        amountUnit: 'lb',
        depthCm: 15,
        method: 'dug in',
        intents: [
          {
            analyte: 'soil_ph_water',
            unit: 'pH',
            fullChange: 1,
            low: 0.6,
            high: 1,
            source: 'A gardening page: Raising pH with Limestone (weak source)',
          },
        ],
      },
    },
    { on: '2025-05-04', by: 'tobias', kind: 'confirm', file: 'cinder-lane-2025-spring.pdf', cores: 15 },
    { on: '2025-05-04', by: 'tobias', kind: 'rule', plot: 'Marrow mound', rule: 'after-lime' },
    { on: '2026-04-25', by: 'hester', kind: 'confirm', file: 'cinder-lane-2026-spring.pdf', cores: 15 },
    {
      on: '2026-05-30',
      by: 'tobias',
      kind: 'spread',
      plot: 'Marrow mound',
      input: {
        material: { key: 'ground-limestone' },
        amount: 12,
        amountUnit: 'lb',
        plannedAmount: 14,
        depthCm: 10,
        method: 'hoed in round the plants',
        note: 'The bag was short.',
        intents: [
          {
            analyte: 'soil_ph_water',
            unit: 'pH',
            fullChange: 0.6,
            low: 0.4,
            high: 0.65,
            source: 'A gardening page: Raising pH with Limestone (weak source)',
          },
        ],
      },
    },
  ],
};

/** Sampled each fall; a small step, few cores and one plot: the honest answer is that nobody can tell yet. */
export const WEIR_COTTAGE: DemoSite = {
  name: 'Weir Cottage',
  owner: 'agnes',
  since: '2023-11-20',
  plan: { widthM: 16, heightM: 8 },
  members: [{ who: 'hester', role: 'adviser' }],
  plots: [
    {
      name: 'Long bed',
      outline: [
        [1, 2],
        [14.5, 2],
        [14.5, 5],
        [1, 5],
      ],
      texture: 'medium',
      established: false,
      targetSetKey: 'vegetables-1',
      notes: 'Lawn until 2022.',
      crops: [
        { year: 2024, crop: 'Shallots and onions', targetSetKey: 'vegetables-1' },
        { year: 2025, crop: 'Trench leeks', targetSetKey: 'vegetables-1' },
        { year: 2026, crop: 'Onions from sets', targetSetKey: 'vegetables-1' },
      ],
    },
  ],
  reports: [
    { file: 'weir-cottage-2023-fall.pdf', sentBy: 'agnes', sentOn: '2023-12-01', droppedOn: 'Long bed' },
    { file: 'weir-cottage-2024-fall.pdf', sentBy: 'agnes', sentOn: '2024-11-29', droppedOn: 'Long bed' },
    { file: 'weir-cottage-2025-fall.pdf', sentBy: 'hester', sentOn: '2025-12-09', droppedOn: 'Long bed' },
  ],
  events: [
    { on: '2023-12-02', by: 'agnes', kind: 'confirm', file: 'weir-cottage-2023-fall.pdf', cores: 8 },
    { on: '2023-12-03', by: 'agnes', kind: 'rule', plot: 'Long bed', rule: 'yearly-same-season' },
    {
      on: '2024-04-06',
      by: 'agnes',
      kind: 'spread',
      plot: 'Long bed',
      input: {
        material: { key: 'elemental-sulfur-fine' },
        amount: 2,
        amountUnit: 'lb',
        depthCm: 15,
        method: 'raked in',
        intents: [
          {
            analyte: 'soil_ph_water',
            unit: 'pH',
            fullChange: -0.3,
            low: -0.11,
            high: -0.3,
            source: 'A gardening page: Changing soil pH (weak source)',
          },
        ],
      },
    },
    { on: '2024-11-30', by: 'hester', kind: 'confirm', file: 'weir-cottage-2024-fall.pdf', cores: 8 },
    { on: '2025-12-10', by: 'hester', kind: 'confirm', file: 'weir-cottage-2025-fall.pdf', cores: 10 },
  ],
};
