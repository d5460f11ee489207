import { type AnalyteKey, analyte } from '@/lib/domain/analytes';
import { asDay } from '@/lib/domain/days';
import type { EffectInput, Intent, SiteNoise, TestPoint } from '@/lib/domain/effects';
import { asApplicationId, asLaboratoryId, asPlotId, asResultId } from '@/lib/domain/ids';
import { defaultWarmMonths } from '@/lib/domain/sampling';

/** Plain test points and effect inputs for tests: one laboratory, 0-6 in, 15 cores, everything stated. */
export const NO_LEARNING: SiteNoise = { labDuplicates: [], fieldDuplicates: [], untreatedSteps: [] };

const METHOD: Partial<Record<AnalyteKey, string>> = {
  soil_ph_water: '1:1_water',
  soil_ph_salt: '0.01M_CaCl2',
  phosphorus: 'M3_ICP',
  boron: 'hot_water',
  sulfur: 'M3',
  ec: '1:2',
};

let made = 0;

export function testPoint(plot: string, day: string, value: number, more: Partial<TestPoint> = {}): TestPoint {
  const key = more.analyte ?? 'soil_ph_water';
  made += 1;
  return {
    resultId: asResultId(`result-${made}`),
    plotId: asPlotId(plot),
    analyte: key,
    day: asDay(day),
    value,
    unit: analyte(key).unit,
    qualifier: 'exact',
    reportingLimit: null,
    method: METHOD[key] ?? 'M3',
    testName: null,
    laboratoryId: asLaboratoryId('laboratory-1'),
    depthCm: { from: 0, to: 15.24 },
    basis: key.includes('ph') ? 'none' : 'mass',
    form: null,
    printedStep: null,
    cores: 15,
    labDuplicates: 1,
    composites: 1,
    confirmed: true,
    ...more,
  };
}

export function intent(fullChange: number, appliedOn: string, more: Partial<Intent> = {}): Intent {
  return {
    applicationId: asApplicationId('application-1'),
    material: 'Elemental sulfur, 90 %',
    reaction: 'sulfur',
    appliedOn: asDay(appliedOn),
    fullChange,
    plannedAmount: 10,
    spreadAmount: 10,
    ...more,
  };
}

/** Plot "a", treated on 15 April 2025 in the north, judged "today", 1 December 2026. */
export function effectInput(more: Partial<EffectInput> & Pick<EffectInput, 'tests'>): EffectInput {
  return {
    analyte: 'soil_ph_water',
    today: asDay('2026-12-01'),
    warmMonths: defaultWarmMonths('north'),
    plotId: asPlotId('a'),
    plotName: 'Plot A',
    intents: [intent(-0.8, '2025-04-15')],
    events: [],
    controls: [],
    siteTests: [],
    noise: NO_LEARNING,
    ...more,
  };
}
