import { describe, expect, it } from 'vitest';
import type { GridEdit } from '@/lib/ui/grid/types';
import { makeRow } from '@/tests/support/review-rows';
import { fromProblem, gatherByRow, mayFollow, outcomesOf, withRows } from './review-edits';

const edit = (columnId: string, value: string, more: Partial<GridEdit> = {}): GridEdit => ({
  rowId: 'a',
  columnId,
  value,
  before: '6.4',
  version: 3,
  ...more,
});

describe('gatherByRow', () => {
  it('makes one save of the cells of a row; an empty choice is null, an empty value stays a value', () => {
    const rows = gatherByRow([edit('value', ''), edit('unit', ''), edit('method', 'M3', { rowId: 'b' })]);
    expect(rows).toEqual([
      { rowId: 'a', version: 3, value: '', unit: null },
      { rowId: 'b', version: 3, method: 'M3' },
    ]);
  });
});

describe('a stale row', () => {
  const seen = makeRow('a');
  it('is followed where the other person left this cell alone', () => {
    expect(mayFollow([edit('value', '6.7')], seen, { ...seen, unit: null, version: 4 })).toBe(true);
  });
  it('is asked about where they wrote the same cell, took the row for something else, or removed it', () => {
    expect(mayFollow([edit('value', '6.7')], seen, { ...seen, printed: '6.5' })).toBe(false);
    expect(mayFollow([edit('value', '6.7')], seen, { ...seen, analyte: 'buffer_ph' })).toBe(false);
    expect(mayFollow([edit('value', '6.7')], seen, { ...seen, state: 'removed' })).toBe(false);
  });
  it('is no conflict when both wrote the same', () => {
    const current = makeRow('a', { printed: '6.7', version: 9 });
    const [outcome] = outcomesOf([edit('value', '6.7')], { kind: 'stale', row: current });
    expect(outcome).toMatchObject({ state: { kind: 'saved' }, version: 9 });
  });
  it('that is gone says who removed it', () => {
    const current = makeRow('a', { state: 'removed', editedBy: 'Tom Ridge' });
    const [outcome] = outcomesOf([edit('value', '6.7')], { kind: 'stale', row: current });
    expect(outcome?.state).toEqual({ kind: 'invalid', sentence: 'Tom Ridge removed this row. Bring it back first.' });
  });
});

describe('fromProblem', () => {
  const base = { type: '', title: '', detail: 'All of it.' };
  it('tells refused from failed', () => {
    expect(fromProblem({ ...base, status: 422, code: 'invalid', fields: { value: 'No.' } })).toEqual({
      kind: 'refused',
      sentence: 'No.',
    });
    expect(fromProblem({ ...base, status: 0, code: 'unreachable' })).toEqual({
      kind: 'failed',
      sentence: 'All of it.',
    });
  });
  it('takes a stale answer only with the row that stands there', () => {
    const stale = { ...base, status: 409, code: 'conflict', reason: 'stale-version' };
    expect(fromProblem({ ...stale, current: makeRow('a', { version: 4 }) }).kind).toBe('stale');
    expect(fromProblem({ ...stale, current: { id: 'a' } }).kind).toBe('failed');
  });
});

describe('withRows', () => {
  it('takes newer rows, ignores overtaken ones, and adds what is new', () => {
    const review = { rows: [makeRow('a', { version: 3 }), makeRow('b', { version: 3 })] };
    const next = withRows(review, [
      makeRow('a', { version: 2, printed: 'old' }),
      makeRow('b', { version: 4, printed: 'new' }),
      makeRow('c'),
    ]);
    expect(next.rows.map((row) => `${row.id} ${row.printed}`)).toEqual(['a 6.4', 'b new', 'c 6.4']);
  });
});
