import { describe, expect, it } from 'vitest';
import { viewOf } from './cell-view';
import { type Overlay, withEdits } from './overlay';
import type { GridColumn, GridRow } from './types';

const column: GridColumn = { id: 'unit', header: 'Unit', kind: 'text' };
const row: GridRow = { id: 'a', cells: { unit: 'mg/kg' }, notes: { unit: 'as you confirmed on 3 May 2025' } };
const noteUnder = (overlay: Overlay) => viewOf({ row, column, overlay, header: undefined, readOnly: false }).note;

describe('a note under a cell', () => {
  it('says where the value comes from', () => {
    expect(noteUnder(new Map())).toBe('as you confirmed on 3 May 2025');
  });
  it('goes as soon as another value is typed', () => {
    const edit = { rowId: 'a', columnId: 'unit', value: 'lb/acre' };
    expect(noteUnder(withEdits(new Map(), [edit], () => row, { kind: 'saving' }))).toBeUndefined();
  });
});
