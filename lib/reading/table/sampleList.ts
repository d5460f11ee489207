import type { Identity, SamplePart } from '../candidate';
import type { Facts } from './facts';
import { dateText, depthText, fieldOf, joinDepth, nameRank } from './fields';
import { isNoSample } from './names';

/** A heading line that names samples and something else of them, and no analyte. */
function isListHead(facts: Facts, row: number): boolean {
  const one = facts.rows[row];
  if (one === undefined || one.values > 0 || one.dates > 0 || one.labels.length > 0 || one.fields < 2) return false;
  const fields = new Set((facts.grid[row] ?? []).map((cell) => fieldOf(cell)));
  const named = fields.has('sampleId') || fields.has('labNumber');
  const told = ['sampleId', 'labNumber', 'fieldName', 'dateSampled', 'depth', 'depthTop'] as const;
  return named && told.filter((field) => fields.has(field)).length >= 2;
}

function identityAt(facts: Facts, head: number, row: number): Identity {
  const identity: Identity = {};
  let [rank, heading] = [0, ''];
  for (const [at, name] of (facts.grid[head] ?? []).entries()) {
    const field = fieldOf(name);
    const cell = facts.at(row, at);
    if (field === null || field === 'other' || cell === '') continue;
    if (field === 'sampleId') {
      if (nameRank(name) <= rank) continue;
      rank = nameRank(name);
      identity.sampleId = cell;
    } else if (field === 'depth') identity.depth ??= depthText(cell, name);
    else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else {
      identity[field] ??= cell;
      heading += ` ${name}`;
    }
  }
  return joinDepth(identity, heading);
}

/** A list of samples without numbers, beside the tables of numbers: their names, days and depths. */
export function sampleList(facts: Facts, free: readonly number[]): SamplePart[] {
  const parts: SamplePart[] = [];
  let head: number | null = null;
  for (const row of free) {
    if (isListHead(facts, row)) head = row;
    else if (head !== null && (facts.rows[row]?.filled ?? 0) < 2) head = null;
    else if (head !== null) {
      const identity = identityAt(facts, head, row);
      const name = identity.sampleId ?? identity.labNumber;
      if (name !== undefined && !isNoSample(name, identity)) parts.push({ identity, candidates: [] });
    }
  }
  return parts;
}
