import type { Identity, SamplePart } from '../candidate';

function keysOf(identity: Identity): string[] {
  const keys = [
    identity.labNumber === undefined ? '' : `lab ${identity.labNumber}`,
    identity.sampleId === undefined ? '' : `name ${identity.sampleId}`,
  ];
  return keys.filter((key) => key !== '').map((key) => key.toLowerCase());
}

/**
 * A list of samples without numbers (names, days, depths) beside tables of numbers: what it says of a sample is given to
 * the parts of that laboratory number or name. A name that two such lines bear says nothing.
 */
export function joinSamples(parts: readonly SamplePart[]): SamplePart[] {
  const told = new Map<string, Identity | null>();
  for (const part of parts) {
    if (part.candidates.length > 0) continue;
    for (const key of keysOf(part.identity)) told.set(key, told.has(key) ? null : part.identity);
  }
  return parts
    .filter((part) => part.candidates.length > 0)
    .map((part) => {
      const more = keysOf(part.identity)
        .map((key) => told.get(key))
        .find((one) => one != null);
      return more == null ? part : { ...part, identity: { ...more, ...part.identity } };
    });
}
