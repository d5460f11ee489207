import { describe, expect, it } from 'vitest';
import type { Reading } from '../../domain/effects/types';
import { asPlotId } from '../../domain/ids';
import { type JudgedEffect, stripOfEffect } from './from-effect';
import { ph, potassium } from './sample-data';

const reading: Reading = {
  withControls: false,
  scale: 'additive',
  D: -0.46,
  s: 0.08,
  nu: 12,
  q: 1.782,
  lo: -0.6,
  hi: -0.32,
  verdict: 'as intended',
  change: -0.46,
  changeLo: -0.6,
  changeHi: -0.32,
  correctedBefore: 6.9,
  correction: 0.02,
  rho: 0.8,
  components: [],
  sentence: '',
};

function outcome(own: Partial<Reading>, intended: number): JudgedEffect {
  return {
    reading: { ...reading, ...own },
    intended,
    controls: [
      { plotId: asPlotId('west'), name: 'West bed', used: true },
      { plotId: asPlotId('east'), name: 'East bed', used: false, why: 'other-laboratory' },
    ],
  };
}

describe('stripOfEffect', () => {
  it('puts the zone at half and one and a half times the plan', () => {
    const strip = stripOfEffect(outcome({}, -0.5), ph);
    expect([strip.planned, strip.half, strip.oneAndHalf]).toEqual([-0.5, -0.25, -0.75]);
    expect(strip.change).toEqual({ estimate: -0.46, low: -0.6, high: -0.32 });
    expect(strip.comparedWith).toBeUndefined();
  });

  it('names only the controls that were used, and only for a reading that used them', () => {
    expect(stripOfEffect(outcome({ withControls: true }, -0.5), ph).comparedWith).toBe(
      'compared with 1 untreated plot',
    );
  });

  it('leaves a planned fall on logs open where it would go below nothing', () => {
    expect(stripOfEffect(outcome({ scale: 'log', correctedBefore: 60 }, -40), potassium).oneAndHalf).toBeNull();
    expect(stripOfEffect(outcome({ scale: 'log', correctedBefore: 100 }, -40), potassium).oneAndHalf).toBe(-60);
  });

  it('leaves a missing bound open', () => {
    const strip = stripOfEffect(outcome({ changeLo: Number.NEGATIVE_INFINITY }, -0.5), ph);
    expect(strip.change.low).toBeNull();
  });
});
