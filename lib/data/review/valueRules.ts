import type { Doubt, Qualifier } from '@/db/schema';
import { type AnalyteKey, analyte, isAnalyteKey, isMethodKey, isUnitKey } from '@/lib/domain/analytes';
import { plausibleDoubt } from '@/lib/reading/checks/plausible';

export type ValueFacts = {
  analyte: string | null;
  printed: string;
  value: string | null;
  qualifier: Qualifier;
  unit: string | null;
  method: string | null;
  form: string | null;
};

const PH: ReadonlySet<AnalyteKey> = new Set(['soil_ph_water', 'soil_ph_salt', 'buffer_ph']);

/** Shares of the soil itself; a saturation or a moisture can be printed above 100 and is only doubted. */
const PARTS_OF_THE_SOIL: ReadonlySet<AnalyteKey> = new Set([
  'organic_matter',
  'organic_carbon',
  'total_carbon',
  'humic_matter',
  'total_n',
  'sand',
  'silt',
  'clay',
]);

const LARGEST = 10_000_000;

/** A sentence for what no soil can show; null for everything else, odd values included. */
export function impossibleSentence(facts: ValueFacts): string | null {
  if (facts.value === null || facts.analyte === null || !isAnalyteKey(facts.analyte)) return null;
  const value = Number(facts.value);
  const { label } = analyte(facts.analyte);
  if (!Number.isFinite(value) || value > LARGEST) return `${label} of ${facts.printed} is more than any soil can show.`;
  if (value < 0) return `${label} cannot be below 0; ${facts.printed} stands there.`;
  if ((PH.has(facts.analyte) || facts.unit === 'pH') && value > 14) {
    return `The pH scale ends at 14, so ${facts.printed} is no pH. Is a decimal point missing?`;
  }
  if (PARTS_OF_THE_SOIL.has(facts.analyte) && facts.unit === '%' && value > 100) {
    return `${label} is a share of the soil and cannot be more than 100 %; ${facts.printed} stands there.`;
  }
  return null;
}

/** What is possible but seldom: pointed out, never refused. */
export function oddDoubts(facts: ValueFacts): Doubt[] {
  if (facts.analyte === null || !isAnalyteKey(facts.analyte) || facts.value === null) return [];
  const unit = facts.unit !== null && isUnitKey(facts.unit) ? facts.unit : PH.has(facts.analyte) ? 'pH' : null;
  const doubt = plausibleDoubt({
    analyte: facts.analyte,
    label: '',
    printed: facts.printed,
    value: Number(facts.value),
    qualifier: facts.qualifier,
    unit,
    unitPrinted: null,
    form: facts.form,
    method: facts.method !== null && isMethodKey(facts.method) ? facts.method : null,
    methodPrinted: null,
    rating: null,
    primary: true,
    page: null,
    box: null,
    cell: null,
    confidence: 1,
    doubts: [],
  });
  return doubt ? [{ code: doubt.code, sentence: doubt.sentence }] : [];
}
