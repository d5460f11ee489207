import { boundsOf, moveBy, resizeTo } from './geometry';
import type { PlanOutline } from './types';

export const KEY_STEP_METRES = 0.5;

const ARROWS: Readonly<Record<string, readonly [x: number, y: number]>> = {
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
};

export const isArrow = (key: string): boolean => key in ARROWS;

/** Arrows move by half a metre, with Shift they make the plot wider or narrower, longer or shorter. */
export function outlineAfterKey(outline: PlanOutline, key: string, shift: boolean): PlanOutline | null {
  const step = ARROWS[key];
  const bounds = boundsOf(outline);
  if (!step || !bounds) return null;
  const [x, y] = [step[0] * KEY_STEP_METRES, step[1] * KEY_STEP_METRES];
  if (!shift) return moveBy(outline, { x, y });
  return resizeTo(outline, bounds.maxX - bounds.minX + x, bounds.maxY - bounds.minY + y);
}
