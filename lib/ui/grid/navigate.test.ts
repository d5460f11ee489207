import { describe, expect, it } from 'vitest';
import { moveFrom, nextDoubtful, nextEditable } from './navigate';

const size = { rows: 5, columns: 3 };

describe('moveFrom', () => {
  it('does not wrap at an edge', () => {
    expect(moveFrom({ row: 0, column: 2 }, 'right', size, 2)).toEqual({ row: 0, column: 2 });
    expect(moveFrom({ row: 0, column: 0 }, 'left', size, 2)).toEqual({ row: 0, column: 0 });
    expect(moveFrom({ row: 4, column: 1 }, 'down', size, 2)).toEqual({ row: 4, column: 1 });
    expect(moveFrom({ row: 0, column: 1 }, 'up', size, 2)).toEqual({ row: 0, column: 1 });
  });

  it('moves a screenful of rows and stops at the last', () => {
    expect(moveFrom({ row: 1, column: 1 }, 'page-down', size, 2)).toEqual({ row: 3, column: 1 });
    expect(moveFrom({ row: 3, column: 1 }, 'page-down', size, 9)).toEqual({ row: 4, column: 1 });
    expect(moveFrom({ row: 3, column: 1 }, 'page-up', size, 2)).toEqual({ row: 1, column: 1 });
  });

  it('reaches the corners', () => {
    expect(moveFrom({ row: 2, column: 1 }, 'grid-start', size, 2)).toEqual({ row: 0, column: 0 });
    expect(moveFrom({ row: 2, column: 1 }, 'grid-end', size, 2)).toEqual({ row: 4, column: 2 });
    expect(moveFrom({ row: 2, column: 1 }, 'row-end', size, 2)).toEqual({ row: 2, column: 2 });
  });
});

describe('nextEditable', () => {
  const editable = (point: { row: number; column: number }) => point.column > 0 && point.row !== 1;

  it('skips locked cells and goes on in the next row', () => {
    expect(nextEditable({ row: 0, column: 2 }, 1, size, editable)).toEqual({ row: 2, column: 1 });
    expect(nextEditable({ row: 2, column: 1 }, -1, size, editable)).toEqual({ row: 0, column: 2 });
  });

  it('ends at the last cell so that Tab can leave the grid', () => {
    expect(nextEditable({ row: 4, column: 2 }, 1, size, editable)).toBeNull();
    expect(nextEditable({ row: 0, column: 1 }, -1, size, editable)).toBeNull();
  });
});

describe('nextDoubtful', () => {
  const doubtful = (point: { row: number; column: number }) => point.row === 1 && point.column !== 0;

  it('walks through the doubtful cells and round to the first', () => {
    expect(nextDoubtful({ row: 0, column: 0 }, size, doubtful)).toEqual({ row: 1, column: 1 });
    expect(nextDoubtful({ row: 1, column: 1 }, size, doubtful)).toEqual({ row: 1, column: 2 });
    expect(nextDoubtful({ row: 1, column: 2 }, size, doubtful)).toEqual({ row: 1, column: 1 });
  });

  it('finds a single doubtful cell again and nothing where there is none', () => {
    const only = (point: { row: number; column: number }) => point.row === 2 && point.column === 2;
    expect(nextDoubtful({ row: 2, column: 2 }, size, only)).toEqual({ row: 2, column: 2 });
    expect(nextDoubtful({ row: 2, column: 2 }, size, () => false)).toBeNull();
    expect(nextDoubtful({ row: 0, column: 0 }, { rows: 0, columns: 3 }, () => true)).toBeNull();
  });
});
