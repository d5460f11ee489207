/** Wall times of a repeated act in milliseconds, after some unmeasured turns that fill caches and let the compiler settle. */
export async function timesOf(turns: number, act: () => Promise<unknown>, warmUp = 3): Promise<number[]> {
  for (let turn = 0; turn < warmUp; turn += 1) await act();
  const times: number[] = [];
  for (let turn = 0; turn < turns; turn += 1) {
    const began = performance.now();
    await act();
    times.push(performance.now() - began);
  }
  return times.sort((a, b) => a - b);
}

/** Two acts turn by turn in one run, so that a busy moment of the machine falls on both. */
export async function sideBySide(
  turns: number,
  one: () => Promise<unknown>,
  other: () => Promise<unknown>,
): Promise<{ one: number[]; other: number[] }> {
  const times = { one: [] as number[], other: [] as number[] };
  for (let turn = -3; turn < turns; turn += 1) {
    for (const [name, act] of [
      ['one', one],
      ['other', other],
    ] as const) {
      const began = performance.now();
      await act();
      if (turn >= 0) times[name].push(performance.now() - began);
    }
  }
  times.one.sort((a, b) => a - b);
  times.other.sort((a, b) => a - b);
  return times;
}

export const quantile = (sorted: readonly number[], share: number): number =>
  sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? Number.NaN;

export const median = (sorted: readonly number[]): number => quantile(sorted, 0.5);

export const ms = (value: number): string => `${value.toFixed(value < 10 ? 2 : 1)} ms`;

export function line(what: string, figure: string, goal = ''): void {
  console.log(`${what.padEnd(62)} ${figure}${goal ? `   (goal: ${goal})` : ''}`);
}

export function verdict(met: boolean): string {
  if (!met) process.exitCode = 1;
  return met ? 'met' : 'NOT MET';
}
