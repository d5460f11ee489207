import type { HistoryAnswer, SeriesAnswer } from '@/lib/schemas/history';
import type { ChartAnalyte, DriftAmendment, DriftChartProps, DriftPoint, MiniSeries } from '@/lib/ui/charts/types';

/** From the history's answer to what the charts draw. */

const SHORT: Readonly<Record<string, string>> = {
  soil_ph_water: 'pH in water',
  soil_ph_salt: 'pH in salt solution',
};

/** The chart already stands on a soil page, so "Soil" is left out. */
export const shortLabel = (key: string, label: string): string => SHORT[key] ?? label;

/** The analyte asked for, else pH, else the first that was measured. */
export function chosenSeries(series: readonly SeriesAnswer[], asked: string | null): SeriesAnswer | undefined {
  const find = (key: string | null) => series.find((one) => one.analyte === key);
  return find(asked) ?? find('soil_ph_water') ?? find('soil_ph_salt') ?? series[0];
}

export const chartAnalyte = (series: Pick<SeriesAnswer, 'analyte' | 'label' | 'unit' | 'isPh' | 'decimals'>) =>
  ({
    label: shortLabel(series.analyte, series.label),
    unit: series.unit,
    isPh: series.isPh,
    decimals: series.decimals,
  }) satisfies ChartAnalyte;

/** "The method changed here, so the line is not joined." → "the method changed here", to stand inside a sentence. */
export function breakWords(sentence: string | null): string | null {
  if (sentence === null) return null;
  const reason = sentence.replace(/, so the line is not joined/, '').replace(/\.$/, '');
  return reason.charAt(0).toLowerCase() + reason.slice(1);
}

function driftPoint(siteId: string, point: SeriesAnswer['points'][number]): DriftPoint {
  const { reportId, unit: _unit, ...rest } = point;
  return {
    ...rest,
    breakBefore: breakWords(point.breakBefore),
    ...(reportId === null ? {} : { href: `/sites/${siteId}/reports/${reportId}` }),
  };
}

const driftPoints = (siteId: string, series: SeriesAnswer): DriftPoint[] =>
  series.points.map((point) => driftPoint(siteId, point));

export const driftAmendments = (history: Pick<HistoryAnswer, 'amendments'>): DriftAmendment[] =>
  history.amendments.map(({ id, on, label, detail }) => {
    // The label ends with the amount that the detail begins with; once is enough.
    const amount = label.slice(label.lastIndexOf(', ') + 2);
    return { id, on, label, detail: detail.startsWith(`${amount} `) ? detail.slice(amount.length + 1) : detail };
  });

export const fileSlug = (text: string): string =>
  text
    .normalize('NFD')
    .replace(/[^\p{L}\p{N}\s-]/gu, '')
    .trim()
    .replace(/\s+/g, '-')
    .toLowerCase() || 'plot';

type Place = { siteId: string; siteName: string };

export function driftProps(history: HistoryAnswer, series: SeriesAnswer, place: Place): DriftChartProps {
  const analyte = chartAnalyte(series);
  return {
    title: `${analyte.label}, ${history.plot.name}`,
    analyte,
    points: driftPoints(place.siteId, series),
    amendments: driftAmendments(history),
    band: series.band,
    asOf: history.today,
    source: `Confirmed laboratory reports of ${place.siteName}`,
    fileName: fileSlug(`${history.plot.name} ${analyte.label}`),
  };
}

/** One time axis for all small charts: from the first test or application. */
export function firstDay(history: Pick<HistoryAnswer, 'series' | 'amendments' | 'today'>): string {
  const days = [
    ...history.series.flatMap((series) => series.points.map((point) => point.takenOn)),
    ...history.amendments.map((one) => one.on),
  ].sort();
  return days[0] ?? history.today;
}

export const miniSeries = (history: HistoryAnswer, siteId: string): MiniSeries[] =>
  history.series.map((series) => ({
    analyte: chartAnalyte(series),
    points: driftPoints(siteId, series),
    // There is room for the figures only; the large chart names crop and source.
    band: series.band && { ...series.band, label: series.band.label.split(',')[0] ?? series.band.label },
    href: `?analyte=${encodeURIComponent(series.analyte)}`,
  }));

/** The papers behind the numbers, newest first, each once with its days. */
export function papersOf(
  history: Pick<HistoryAnswer, 'series'>,
): { reportId: string; days: string[]; values: number }[] {
  const papers = new Map<string, { days: Set<string>; values: number }>();
  for (const { reportId, takenOn } of history.series.flatMap((series) => series.points)) {
    if (reportId === null) continue;
    const paper = papers.get(reportId) ?? { days: new Set<string>(), values: 0 };
    paper.days.add(takenOn);
    paper.values += 1;
    papers.set(reportId, paper);
  }
  return [...papers]
    .map(([reportId, { days, values }]) => ({ reportId, days: [...days].sort(), values }))
    .sort((a, b) => (b.days.at(-1) ?? '').localeCompare(a.days.at(-1) ?? ''));
}
