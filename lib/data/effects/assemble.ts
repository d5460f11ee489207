import { type AnalyteKey, isAnalyteKey } from '@/lib/domain/analytes';
import { asDay, type Day } from '@/lib/domain/days';
import type { ControlPlot, DisturbingEvent, EffectInput, Intent, TestPoint, UntreatedStep } from '@/lib/domain/effects';
import { asApplicationId, type PlotId } from '@/lib/domain/ids';
import type { ApplicationAnswer } from '@/lib/schemas/applications';
import type { SiteReadings } from '../history/points';

export type SitePicture = {
  today: Day;
  warmMonths: readonly boolean[];
  plots: readonly { id: PlotId; name: string }[];
  readings: SiteReadings;
  applications: readonly ApplicationAnswer[];
};

const affectedBy = (application: ApplicationAnswer): AnalyteKey[] =>
  [...application.material.affects, ...application.intents.map((intent) => intent.analyte)].filter(isAnalyteKey);

const eventOf = (application: ApplicationAnswer): DisturbingEvent => ({
  day: asDay(application.appliedOn),
  kind: 'other-application',
  applicationId: asApplicationId(application.id),
  label: application.material.name,
  affects: affectedBy(application),
});

/** Steps between neighbouring sampling days on which at least two plots that got nothing acting on this analyte were sampled. */
function untreatedSteps(picture: SitePicture, analyte: AnalyteKey): UntreatedStep[] {
  const points = picture.readings.points.filter((point) => point.analyte === analyte);
  const days = [...new Set(points.map((point) => point.day))].sort();
  const steps: UntreatedStep[] = [];
  for (let at = 1; at < days.length; at += 1) {
    const [from, to] = [days[at - 1], days[at]];
    if (from === undefined || to === undefined) continue;
    const pairs: { before: TestPoint; after: TestPoint }[] = [];
    for (const plot of picture.plots) {
      const touched = picture.applications.some(
        (one) => one.plotId === plot.id && one.appliedOn < to && affectedBy(one).includes(analyte),
      );
      const before = points.find((point) => point.plotId === plot.id && point.day === from);
      const after = points.find((point) => point.plotId === plot.id && point.day === to);
      if (!touched && before && after && before.method === after.method) pairs.push({ before, after });
    }
    if (pairs.length >= 2) steps.push({ pairs });
  }
  return steps;
}

type IntentRow = { intent: Intent; intentId: string; change: ApplicationAnswer['intents'][number] };

function intentOf(application: ApplicationAnswer, change: ApplicationAnswer['intents'][number]): IntentRow | null {
  const reaction = application.material.reaction;
  if (!reaction) return null;
  return {
    intentId: change.id,
    change,
    intent: {
      applicationId: asApplicationId(application.id),
      material: application.material.name,
      reaction,
      appliedOn: asDay(application.appliedOn),
      fullChange: change.fullChange,
      plannedAmount: application.plannedKg,
      spreadAmount: application.amountKg,
    },
  };
}

export type EffectQuestion = { intentIds: string[]; input: EffectInput };

/**
 * One question for each analyte and each stretch between two tests: what was spread in the same stretch with an
 * intention for the same analyte cannot be told apart, so it is asked about together.
 */
export function effectQuestions(picture: SitePicture, plotId: PlotId): EffectQuestion[] {
  const plot = picture.plots.find((one) => one.id === plotId);
  if (!plot) return [];
  const mine = picture.applications.filter((one) => one.plotId === plotId);
  const analytes = [...new Set(mine.flatMap((one) => one.intents.map((intent) => intent.analyte)))].filter(
    isAnalyteKey,
  );
  return analytes.flatMap((analyte) => {
    const tests = picture.readings.points.filter((point) => point.plotId === plotId && point.analyte === analyte);
    const stretches = new Map<number, IntentRow[]>();
    for (const application of mine) {
      for (const change of application.intents) {
        const row = change.analyte === analyte ? intentOf(application, change) : null;
        if (!row) continue;
        const stretch = tests.filter((test) => test.day <= row.intent.appliedOn).length;
        stretches.set(stretch, [...(stretches.get(stretch) ?? []), row]);
      }
    }
    return [...stretches.values()].map((rows) => question(picture, plot, analyte, tests, rows));
  });
}

function question(
  picture: SitePicture,
  plot: { id: PlotId; name: string },
  analyte: AnalyteKey,
  tests: readonly TestPoint[],
  rows: readonly IntentRow[],
): EffectQuestion {
  const [first, ...more] = rows.map((row) => row.intent);
  if (!first) throw new Error('A question without an intention.');
  const asked = new Set(rows.map((row) => row.intent.applicationId as string));
  const siteTests = picture.readings.points.filter((point) => point.analyte === analyte);
  const controls: ControlPlot[] = picture.plots
    .filter((other) => other.id !== plot.id)
    .map((other) => ({
      plotId: other.id,
      name: other.name,
      tests: siteTests.filter((point) => point.plotId === other.id),
      events: picture.applications.filter((one) => one.plotId === other.id).map(eventOf),
    }))
    .filter((control) => control.tests.length > 0);
  const ofAnalyte = (pair: { first: TestPoint }) => pair.first.analyte === analyte;
  return {
    intentIds: rows.map((row) => row.intentId),
    input: {
      analyte,
      today: picture.today,
      warmMonths: picture.warmMonths,
      plotId: plot.id,
      plotName: plot.name,
      intents: [first, ...more],
      tests,
      events: picture.applications.filter((one) => one.plotId === plot.id && !asked.has(one.id)).map(eventOf),
      controls,
      siteTests,
      noise: {
        labDuplicates: picture.readings.labDuplicates.filter(ofAnalyte),
        fieldDuplicates: picture.readings.fieldDuplicates.filter(ofAnalyte),
        untreatedSteps: untreatedSteps(picture, analyte),
      },
    },
  };
}
