import { type AnalyteKey, analyte } from '../analytes';
import type { RefusalCode, TestPoint } from './types';

/**
 * May two tests be set side by side as a change? Refused here are different extractants or pH solutions (Mehlich-3 P reads
 * about 35 % above Bray in Ohio and Indiana: Culman et al., Ohio State ANR-75, 2019, and the slope varies by soil; water and
 * salt pH of 1,186 samples were 0.67 apart in the median), other depths, other bases of the unit, other methods of organic
 * matter or CEC, and rows nobody has confirmed. A new laboratory with the same method is allowed; its cost is an error term.
 */
export type Comparability =
  | { readonly ok: true }
  | { readonly ok: false; readonly reason: RefusalCode; readonly sentence: string };

const DEPTH_CM = 2.54;
const DEPTH_SHARE = 0.2;
const OXIDES: Readonly<Record<string, string>> = {
  P2O5: 'P',
  K2O: 'K',
  MgO: 'Mg',
  CaO: 'Ca',
  SO4: 'S',
  SO3: 'S',
  NO3: 'N',
};

const refuse = (reason: RefusalCode, sentence: string): Comparability => ({ ok: false, reason, sentence });

const isPh = (key: AnalyteKey): boolean => key === 'soil_ph_water' || key === 'soil_ph_salt' || key === 'buffer_ph';

/** What no soil can read; the registry's narrower plausible range only asks a question in the review. */
function isPossible(test: TestPoint): boolean {
  if (!Number.isFinite(test.value) || test.value < 0) return false;
  if (isPh(test.analyte)) return test.value > 0 && test.value <= 14;
  return test.basis !== 'share' || test.value <= 100;
}

export function differentDepth(a: TestPoint, b: TestPoint): boolean {
  if (a.depthCm === null || b.depthCm === null) return false;
  const slack = 1e-9;
  const apart = Math.max(Math.abs(a.depthCm.from - b.depthCm.from), Math.abs(a.depthCm.to - b.depthCm.to));
  const [thin, thick] = [a.depthCm.to - a.depthCm.from, b.depthCm.to - b.depthCm.from].sort((x, y) => x - y);
  return apart > DEPTH_CM + slack || ((thick ?? 0) - (thin ?? 0)) / (thick || 1) > DEPTH_SHARE + slack;
}

function methodRefusal(a: TestPoint, b: TestPoint): Comparability {
  const name = analyte(a.analyte).label;
  if (a.method === null || b.method === null) {
    const sameName = a.testName !== null && a.testName.trim().toLowerCase() === b.testName?.trim().toLowerCase();
    if (a.laboratoryId !== null && a.laboratoryId === b.laboratoryId && sameName) return { ok: true };
    return refuse(
      'method-unknown',
      `At least one report does not name its method for ${name}, and laboratory and test name do not make up for it. Ask the laboratory which method it used and add it to the result.`,
    );
  }
  if (a.method === b.method) return { ok: true };
  if (isPh(a.analyte)) {
    return refuse(
      'ph-medium',
      'The two pH values were measured in different solutions. Each is right for its own scale; subtracting them says nothing about the soil. Have the next sample measured the same way.',
    );
  }
  if (a.analyte === 'organic_matter' || a.analyte === 'cec') {
    return refuse(
      a.analyte === 'cec' ? 'cec-method' : 'om-method',
      `${name} was found by two different methods, which read differently on the same soil. Have the next sample measured the same way.`,
    );
  }
  return refuse(
    'extractant',
    `${name} was drawn out of the soil by two different solutions. Each number holds by itself, but their difference is not a change in the soil. Have the next sample tested by the same method.`,
  );
}

function unitRefusal(a: TestPoint, b: TestPoint): Comparability {
  // pH has one unit, which reports print as pH, SU or not at all.
  if (isPh(a.analyte)) return { ok: true };
  const bases = [a.basis, b.basis];
  if (a.basis !== b.basis || a.unit !== b.unit) {
    const missing = bases.includes('volume')
      ? 'the soil density on that report'
      : bases.includes('area')
        ? 'the sampling depth of that report'
        : 'a common unit';
    return refuse(
      'unit-basis',
      `One value is in ${a.unit}, the other in ${b.unit}. They cannot be turned into each other without ${missing}.`,
    );
  }
  if (a.basis === 'area' && (a.depthCm === null || b.depthCm === null)) {
    return refuse(
      'unit-basis',
      `${a.unit} depends on how deep the sample went, and at least one report does not say. Add the sampling depth.`,
    );
  }
  const declared = (form: string | null): string => form ?? 'element';
  const oxide = (form: string | null): boolean => form !== null && OXIDES[form] !== undefined;
  if (declared(a.form) !== declared(b.form) && (oxide(a.form) || oxide(b.form))) {
    return refuse(
      'unit-basis',
      `One value counts the element, the other its oxide (${a.form ?? 'not stated'} and ${b.form ?? 'not stated'}). Correct the form on the result first.`,
    );
  }
  return { ok: true };
}

export function comparable(a: TestPoint, b: TestPoint): Comparability {
  if (a.analyte !== b.analyte) {
    return isPh(a.analyte) && isPh(b.analyte)
      ? refuse(
          'ph-medium',
          'One pH was measured in water, the other in a salt or buffer solution. Each is right for its own scale; subtracting them says nothing about the soil.',
        )
      : refuse('other-analyte', 'These are two different analytes.');
  }
  for (const test of [a, b]) {
    if (!test.confirmed)
      return refuse(
        'unconfirmed',
        'One of the two values still waits for your confirmation. Confirm its report first.',
      );
    if (!isPossible(test))
      return refuse(
        'out-of-range',
        `A reading of ${test.value} ${test.unit} is not possible for ${analyte(test.analyte).label}. Correct the result first.`,
      );
    if (test.qualifier === 'above')
      return refuse(
        'above-limit',
        `One value is only known to be above ${test.value} ${test.unit}, so no difference can be given.`,
      );
    if (test.qualifier === 'below-unknown')
      return refuse(
        'unknown-limit',
        'One value is printed as nothing found, without the limit of the method. Ask the laboratory for its reporting limit.',
      );
  }
  const unit = unitRefusal(a, b);
  if (!unit.ok) return unit;
  const method = methodRefusal(a, b);
  if (!method.ok) return method;
  if (differentDepth(a, b)) {
    return refuse(
      'depth',
      'The two samples were taken to different depths, so they do not hold the same soil. Sample to the same depth next time.',
    );
  }
  return { ok: true };
}

export const sameLaboratory = (a: TestPoint, b: TestPoint): boolean => a.laboratoryId === b.laboratoryId;
