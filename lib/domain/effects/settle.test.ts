import { describe, expect, it } from 'vitest';
import { asDay } from '../days';
import { asLaboratoryId, asPlotId, asResultId } from '../ids';
import { learnSiteError } from './learn';
import { remediesFor } from './settle';
import type { TestPoint, Verdict } from './types';

const learnt = learnSiteError('soil_ph_water', { labDuplicates: [], fieldDuplicates: [], untreatedSteps: [] });

const after = (cores: number): TestPoint => ({
  resultId: asResultId('r'),
  plotId: asPlotId('p'),
  analyte: 'soil_ph_water',
  day: asDay('2026-04-10'),
  value: 7,
  unit: 'pH',
  qualifier: 'exact',
  reportingLimit: null,
  method: '1:1_water',
  testName: null,
  laboratoryId: asLaboratoryId('l'),
  depthCm: null,
  basis: 'none',
  form: null,
  printedStep: null,
  cores,
  labDuplicates: 1,
  composites: 1,
  confirmed: true,
});

const remedies = (verdict: Verdict, intended: number, cores: number, controls = 0) => {
  if (!learnt.ok) throw new Error(learnt.reason);
  return remediesFor({
    verdict,
    error: learnt.error,
    after: after(cores),
    intendedOnScale: intended,
    rho: 1,
    controls,
  });
};

describe('what would settle it', () => {
  it('asks for cores first: 0.5 planned, 8 cores', () => {
    // s at most 0.5 / 2.487 = 0.2011; v = 0.2011^2/2 - 0.08^2 = 0.01382; 0.0625 / (0.01382 - 0.0072) = 9.4: ten cores.
    expect(remedies('cannot tell yet', 0.5, 8)[0]).toMatchObject({ kind: 'cores', count: 10 });
    expect(remedies('cannot tell yet', 0.5, 8)[0]?.text).toBe('Next time 10 cores in each sample would settle it.');
  });

  it('turns to untreated plots where the day’s own shift is too large for cores', () => {
    // 0.3 planned: s at most 0.1206, but the occasion alone makes sqrt(2) x 0.08 = 0.113, and v would have to be 0.0009.
    const kinds = remedies('cannot tell yet', 0.3, 8).map((remedy) => remedy.kind);
    expect(kinds).not.toContain('cores');
    expect(kinds[0]).toBe('controls');
  });

  it('says so when nothing would', () => {
    expect(remedies('right way, size not settled', 0.3, 8).map((remedy) => remedy.kind)).toEqual(['larger-step']);
  });

  it('has nothing to say once it is settled', () => {
    expect(remedies('as intended', 0.5, 8)).toEqual([]);
    expect(remedies('went the other way', 0.5, 8)).toEqual([]);
  });
});
