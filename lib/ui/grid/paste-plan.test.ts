import { describe, expect, it } from 'vitest';
import { planFillDown, planPaste } from './paste-plan';
import { contains, type GridPoint, pointsOf, rectangleOf } from './rectangle';

const size = { rows: 4, columns: 3 };
const everywhere = () => true;
const single = (row: number, column: number) => rectangleOf({ row, column }, { row, column });

describe('rectangle', () => {
  it('is the same from any two opposite corners', () => {
    const expected = { top: 1, left: 0, bottom: 3, right: 2 };
    expect(rectangleOf({ row: 3, column: 0 }, { row: 1, column: 2 })).toEqual(expected);
    expect(rectangleOf({ row: 1, column: 2 }, { row: 3, column: 0 })).toEqual(expected);
    expect(pointsOf(expected)).toHaveLength(9);
    expect(contains(expected, { row: 0, column: 0 })).toBe(false);
    expect(contains(expected, { row: 3, column: 2 })).toBe(true);
  });
});

describe('planPaste', () => {
  it('fills the whole selection with a single cell', () => {
    const answer = planPaste({
      clipboard: [['ppm']],
      selection: rectangleOf({ row: 1, column: 1 }, { row: 2, column: 2 }),
      active: { row: 2, column: 2 },
      size,
      editable: everywhere,
    });
    expect(answer.ok && answer.plan.values.map((one) => [one.row, one.column, one.value])).toEqual([
      [1, 1, 'ppm'],
      [1, 2, 'ppm'],
      [2, 1, 'ppm'],
      [2, 2, 'ppm'],
    ]);
  });

  it('lays a block out from the active cell and clips it at the edge', () => {
    const answer = planPaste({
      clipboard: [
        ['a', 'b'],
        ['c', 'd'],
        ['e', 'f'],
      ],
      selection: single(2, 2),
      active: { row: 2, column: 2 },
      size,
      editable: everywhere,
    });
    expect(answer).toEqual({
      ok: true,
      plan: {
        values: [
          { row: 2, column: 2, value: 'a' },
          { row: 3, column: 2, value: 'c' },
        ],
        covered: { top: 2, left: 2, bottom: 3, right: 2 },
        clipped: 4,
        locked: 0,
      },
    });
  });

  it('leaves locked cells alone and counts them', () => {
    const answer = planPaste({
      clipboard: [['a', 'b', 'c']],
      selection: single(0, 0),
      active: { row: 0, column: 0 },
      size,
      editable: (point: GridPoint) => point.column !== 1,
    });
    expect(answer.ok && answer.plan.locked).toBe(1);
    expect(answer.ok && answer.plan.values.map((one) => one.value)).toEqual(['a', 'c']);
  });

  it('a short line leaves the cells it does not reach', () => {
    const answer = planPaste({
      clipboard: [['a', 'b'], ['c']],
      selection: single(0, 0),
      active: { row: 0, column: 0 },
      size,
      editable: everywhere,
    });
    expect(answer.ok && answer.plan.values).toHaveLength(3);
  });

  it('says why nothing is pasted', () => {
    const input = { selection: single(0, 0), active: { row: 0, column: 0 }, size };
    expect(planPaste({ ...input, clipboard: [], editable: everywhere })).toEqual({
      ok: false,
      reason: 'empty-clipboard',
    });
    expect(planPaste({ ...input, clipboard: [['a']], editable: () => false })).toEqual({
      ok: false,
      reason: 'all-locked',
    });
  });
});

describe('planFillDown', () => {
  const values = [
    ['ppm', '1'],
    ['', '2'],
    ['lb/acre', '3'],
  ];
  const valueAt = (point: GridPoint) => values[point.row]?.[point.column] ?? '';

  it('gives the first row of the selection to the rows under it', () => {
    expect(planFillDown(rectangleOf({ row: 0, column: 0 }, { row: 2, column: 0 }), valueAt, everywhere)).toEqual([
      { row: 1, column: 0, value: 'ppm' },
      { row: 2, column: 0, value: 'ppm' },
    ]);
  });

  it('takes the cell above for a single row', () => {
    expect(planFillDown(single(1, 0), valueAt, everywhere)).toEqual([{ row: 1, column: 0, value: 'ppm' }]);
  });

  it('does nothing in the first row, on locked cells and where the value is the same', () => {
    expect(planFillDown(single(0, 0), valueAt, everywhere)).toEqual([]);
    expect(planFillDown(single(1, 0), valueAt, () => false)).toEqual([]);
    expect(planFillDown(single(1, 0), () => 'ppm', everywhere)).toEqual([]);
  });
});
