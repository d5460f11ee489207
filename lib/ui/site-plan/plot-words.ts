import { areaOf } from './geometry';
import { areaText, dayText } from './measure';
import type { LengthUnit, PlanOutline, PlanPlot } from './types';

export function plotArea(plot: PlanPlot, outline: PlanOutline | null, unit: LengthUnit): string {
  if (plot.typedAreaM2 !== undefined) return `${areaText(plot.typedAreaM2, unit)} (typed)`;
  return outline ? areaText(areaOf(outline), unit) : 'no area yet';
}

export function lastTestText(plot: PlanPlot): string {
  if (!plot.lastTest) return 'no test yet';
  const { date, ph, phDate = date } = plot.lastTest;
  if (ph === null) return `tested ${dayText(date)}, no pH`;
  return phDate === date ? `pH ${ph}, ${dayText(date)}` : `pH ${ph} on ${dayText(phDate)}, tested ${dayText(date)}`;
}

export function waitingText(plot: PlanPlot): string {
  if (!plot.waiting) return '';
  return plot.waiting.count === 1 ? '1 report to review' : `${plot.waiting.count} reports to review`;
}

/** The whole plot in one phrase, for the shape's name. */
export function plotPhrase(plot: PlanPlot, outline: PlanOutline | null, unit: LengthUnit): string {
  return [plot.name, plotArea(plot, outline, unit), lastTestText(plot), plot.crop, waitingText(plot)]
    .filter(Boolean)
    .join(', ');
}

/** About how wide bold text of this size is; enough to decide what fits into a plot. */
export function fitText(text: string, width: number, fontSize: number): string {
  const room = Math.floor(width / (fontSize * 0.53));
  if (text.length <= room) return text;
  return room >= 4 ? `${text.slice(0, room - 1)}…` : '';
}
