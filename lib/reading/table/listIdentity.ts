import type { Identity, IdentityField } from '../candidate';
import { unitOnly } from '../labels/label';
import { fieldWithValue } from '../stages/identity';
import { roleOf } from '../stages/roles';
import type { Facts } from './facts';
import { dateText, depthText, fieldOf, isBareDate, joinDepth, nameRank } from './fields';
import { roleIn } from './headingRole';
import { ANALYTE_HEAD, type ListColumn } from './listColumns';
import { spoken } from './spoken';

/** What the lines of a transposed table say of the sample of one column: "Lab No" with that column's number. */
export function identityOfColumn(
  facts: Facts,
  free: readonly number[],
  last: number,
  labelAt: number,
  at: number,
): Identity {
  const identity: Identity = {};
  let [top, bottom, rank] = ['', '', 0];
  let heading = '';
  for (const row of free) {
    if (row > last) break;
    const name = facts.at(row, labelAt) || facts.at(row, 0);
    const field = fieldOf(name);
    const cell = facts.at(row, at);
    if (field === null || cell === '') continue;
    if (field === 'sampleId') {
      if (nameRank(name) <= rank) continue;
      rank = nameRank(name);
      identity.sampleId = cell;
    } else if (field === 'depth')
      identity.depth ??= depthText(
        cell,
        `${name} ${facts.at(row, labelAt + 1) === cell ? '' : facts.at(row, labelAt + 1)}`,
      );
    else if (field === 'depthTop') [top, heading] = [cell, name];
    else if (field === 'depthBottom') [bottom, heading] = [cell, `${heading} ${name}`];
    else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else identity[field] ??= cell;
  }
  return top !== '' && bottom !== ''
    ? joinDepth({ ...identity, depthTop: top, depthBottom: bottom }, heading)
    : identity;
}

/** A bare "Date" beside each sample is the day of sampling when no other column is; the reading says so. */
export function fieldIn(columns: readonly ListColumn[], head: string): IdentityField | null {
  if (!isBareDate(head)) return fieldOf(head);
  return columns.some((one) => fieldOf(one.head) === 'dateSampled') ? 'other' : 'dateSampled';
}

export function rowIdentity(facts: Facts, columns: readonly ListColumn[], row: number): Identity {
  const identity: Identity = {};
  let rank = 0;
  let heading = '';
  for (const column of columns) {
    if (column.kind !== 'identity') continue;
    const cell = facts.at(row, column.at);
    const field = fieldIn(columns, column.head);
    if (cell === '' || field === null) continue;
    if (field === 'sampleId') {
      if (nameRank(column.head) <= rank) continue;
      rank = nameRank(column.head);
      identity.sampleId = cell;
    } else if (field === 'depth') identity.depth ??= depthText(cell, column.head);
    else if (field === 'dateSampled' || field === 'dateReported') identity[field] ??= dateText(cell);
    else {
      identity[field] ??= cell;
      if (field === 'depthTop' || field === 'depthBottom') heading += ` ${column.head}`;
    }
  }
  return joinDepth(identity, heading);
}

/** Lines of one sample after another: a "Sample: North bed" line starts the next one. */
export function sectionAt(facts: Facts, free: ReadonlySet<number>, row: number, since: number): Identity {
  const identity: Identity = {};
  for (let at = since + 1; at < row; at++) {
    if (!free.has(at)) continue;
    for (const [column, cell] of (facts.grid[at] ?? []).entries()) {
      if (cell === '') continue;
      const whole = fieldWithValue(cell);
      const field = whole?.field ?? fieldOf(cell);
      const value = whole?.value ?? facts.at(at, column + 1);
      if (field === null || value === '' || fieldOf(value) !== null) continue;
      identity[field] = field === 'depth' ? depthText(value, cell) : /^date/.test(field) ? dateText(value) : value;
    }
  }
  return identity;
}

/** The name of a sample over its column, or over the words "Result" and "Rating" that stand under it. */
export function sampleOver(column: ListColumn): Identity {
  const name = column.kind === 'number' ? column.head : column.over;
  const says = name !== '' && unitOnly(spoken(name)) === null && roleIn(name) === null && roleOf(name, false) === null;
  return says && !ANALYTE_HEAD.test(spoken(name)) ? { sampleId: name } : {};
}

export const isNamed = (identity: Identity): boolean =>
  identity.sampleId !== undefined || identity.labNumber !== undefined;

/** What holds for all samples of a list: everything but their names. */
export function sharedOf(identity: Identity): Identity {
  const { sampleId: _sample, labNumber: _number, ...rest } = identity;
  return rest;
}
