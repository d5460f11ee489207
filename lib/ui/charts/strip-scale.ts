import { formatNumber, formatSigned } from './numbers';
import { niceStep, share } from './scale';

/** Left and right rim of a strip, in percent of its width, kept free for end marks and labels. */
const RIM = 5;

export interface StripScale {
  readonly min: number;
  readonly max: number;
  readonly ticks: readonly { readonly value: number; readonly label: string }[];
  /** Position in percent of the width; a value beyond the scale stops at its edge. */
  readonly at: (value: number) => number;
}

/** One common scale that holds every finite value, with a little air and few round ticks. */
export function stripScale(
  values: readonly (number | null)[],
  options: { readonly signed: boolean; readonly least: number },
): StripScale {
  const known = values.filter((v): v is number => v !== null && Number.isFinite(v));
  const low = known.length === 0 ? 0 : Math.min(...known);
  const high = known.length === 0 ? options.least : Math.max(...known);
  const span = Math.max(high - low, options.least);
  const middle = (low + high) / 2;
  const min = middle - span * 0.56;
  const max = middle + span * 0.56;
  const step = niceStep(max - min, 4);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const write = options.signed ? formatSigned : formatNumber;
  const ticks: { value: number; label: string }[] = [];
  for (let index = Math.ceil(min / step - 1e-9); index * step <= max + 1e-9; index += 1) {
    const value = Number((index * step).toFixed(10));
    ticks.push({ value, label: write(value, decimals) });
  }
  const at = (value: number): number => RIM + Math.min(1, Math.max(0, share(value, min, max))) * (100 - 2 * RIM);
  return { min, max, ticks, at };
}

/** Where a label at this place must be anchored so that it stays inside the strip. */
export function anchorAt(percent: number, rim = 22): 'start' | 'middle' | 'end' {
  if (percent < rim) return 'start';
  return percent > 100 - rim ? 'end' : 'middle';
}
