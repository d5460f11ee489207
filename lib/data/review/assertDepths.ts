import { Problem } from '@/lib/errors';

export function assertDepths(from: string | number | null, to: string | number | null): void {
  if (from === null || to === null || Number(from) < Number(to)) return;
  const sentence = 'The depth must end deeper than it begins.';
  throw new Problem('invalid', sentence, { fields: { depthToCm: sentence } });
}
