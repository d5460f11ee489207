import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { addMonths, asDay } from '@/lib/domain/days';
import { type ControlPlot, checkEffect, type TestPoint } from '@/lib/domain/effects';
import { asPlotId } from '@/lib/domain/ids';
import { effectInput, intent, testPoint } from '../support/test-points';

/**
 * Open data: Glendining, Holland, McGrath and Goulding (2023), Rothamsted long-term liming experiment soil chemical
 * properties 1962-1996, doi:10.23637/rcs10-soil-01, CC BY 4.0. No intended change was published, so the only question is
 * whether a rise is seen (lower end of the interval above 0), which does not depend on the plan put in.
 */
type Row = { readonly day: string; readonly plot: string; readonly level: string; readonly ph: number };

const rows: readonly Row[] = readFileSync(
  join(process.cwd(), 'fixtures/tables/liming-trial-silty-clay/plot_occasion_ph.csv'),
  'utf8',
)
  .trim()
  .split('\n')
  .slice(1)
  .map((line) => line.split(','))
  .map(([, plot = '', level = '', ph = '', , day = '']) => ({ day: day.trim(), plot, level, ph: Number(ph) }))
  .filter((row) => row.day !== '');

const days = [...new Set(rows.map((row) => row.day))].toSorted();
const plotsAt = (level: string): readonly string[] => [
  ...new Set(rows.filter((row) => row.level === level).map((row) => row.plot)),
];
const design = { method: '1:2.5_water', cores: 16, depthCm: { from: 0, to: 23 } };

function point(plot: string, day: string): TestPoint {
  const row = rows.find((other) => other.plot === plot && other.day === day);
  if (row === undefined) throw new Error(`No reading of plot ${plot} on ${day}.`);
  return testPoint(plot, day, row.ph, design);
}

function riseSeen(plot: string, from: string, to: string, controls: readonly string[]): boolean {
  const others: ControlPlot[] = controls.map((name) => ({
    plotId: asPlotId(name),
    name,
    events: [],
    tests: [point(name, from), point(name, to)],
  }));
  const tests = [point(plot, from), point(plot, to)];
  const outcome = checkEffect(
    effectInput({
      plotId: asPlotId(plot),
      plotName: plot,
      today: asDay('2000-01-01'),
      tests,
      controls: others,
      siteTests: [...tests, ...others.flatMap((other) => other.tests)],
      intents: [intent(1, from, { reaction: 'soluble-salt', material: 'Ground limestone' })],
    }),
  );
  if (!outcome.ok) throw new Error(outcome.sentence);
  return outcome.reading.lo > 0;
}

describe('an open liming trial', () => {
  const limed = ['L', 'M', 'H'].flatMap(plotsAt);
  const untreated = plotsAt('0');

  it('holds 24 limed and 8 untreated plots', () => {
    expect([limed.length, untreated.length]).toEqual([24, 8]);
  });

  it('sees the first lime on every limed plot, alone and against three untreated plots', () => {
    for (const plot of limed) {
      expect(riseSeen(plot, '1962-02-14', '1962-11-09', []), `plot ${plot} alone`).toBe(true);
      expect(riseSeen(plot, '1962-02-14', '1962-11-09', untreated.slice(0, 3)), `plot ${plot} with controls`).toBe(
        true,
      );
    }
  });

  it('seldom sees lime where none was spread: nominally 5 % of steps, with untreated plots beside', () => {
    let [seen, steps] = [0, 0];
    for (const [index, from] of days.entries()) {
      const to = days[index + 1];
      if (to === undefined || to > addMonths(asDay(from), 24)) continue;
      for (const plot of untreated) {
        steps += 1;
        if (riseSeen(plot, from, to, untreated.filter((other) => other !== plot).slice(0, 3))) seen += 1;
      }
    }
    expect(steps).toBeGreaterThan(100);
    // 5 % nominal; 1.96 binomial standard errors above it at this number of steps.
    expect(seen / steps).toBeLessThan(0.05 + 1.96 * Math.sqrt((0.05 * 0.95) / steps));
  });
});
