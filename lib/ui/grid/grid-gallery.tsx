'use client';

import { useState } from 'react';
import { Grid } from './grid';
import type { GridColumn, GridEdit, GridEditOutcome, GridRow } from './types';

const columns: readonly GridColumn[] = [
  { id: 'analyte', header: 'Analyte', kind: 'readonly', rowHeader: true, widthClass: 'min-w-44' },
  { id: 'value', header: 'Value', kind: 'number', widthClass: 'min-w-28' },
  {
    id: 'unit',
    header: 'Unit',
    kind: 'select',
    widthClass: 'min-w-28',
    options: [
      { value: 'pH', label: 'pH' },
      { value: 'mg/kg', label: 'ppm' },
      { value: 'lb/acre', label: 'lb/acre' },
      { value: '%', label: '%' },
    ],
  },
  { id: 'method', header: 'Method', kind: 'text', widthClass: 'min-w-36' },
];

const row = (id: string, analyte: string, value: string, unit: string, more: Partial<GridRow> = {}): GridRow => ({
  id,
  version: 1,
  cells: { analyte, value, unit, method: '' },
  place: `Page 1, row ${id}`,
  ...more,
});

const START: readonly GridRow[] = [
  row('1', 'pH', '6.4', 'pH', { cells: { analyte: 'pH', value: '6.4', unit: 'pH', method: 'water' } }),
  row('2', 'Organic matter', '4.1', '%'),
  row('3', 'Phosphorus', '41', '', {
    doubts: { unit: [{ code: 'unit-missing', sentence: 'the page gives no unit' }] },
  }),
  row('10', 'Copper', '1.9', 'mg/kg', { notes: { unit: 'as you confirmed on 3 May 2025' } }),
  row('4', 'Potassium', '7.7', 'mg/kg', {
    doubts: { value: [{ code: 'two-readings', sentence: 'two readings differ: 7.1 / 7.7' }] },
  }),
  row('5', 'Magnesium', '95', 'mg/kg', {
    states: { value: { kind: 'conflict', mine: '95', theirs: '59', theirsBy: 'Ida Marsh', version: 3 } },
  }),
  row('6', 'Calcium', '1,240', 'mg/kg', {
    states: { value: { kind: 'error', sentence: 'the network did not answer; the text is kept here.' } },
  }),
  row('7', 'Boron', '<0.1', 'mg/kg', { states: { value: { kind: 'saving' } } }),
  row('8', 'Zinc', '2.2', 'mg/kg', { readOnly: true, place: 'confirmed' }),
  row('9', 'Sodium', '18', 'mg/kg', { place: 'entered by hand' }),
];

/** Every state of the grid, saving to nothing but this page. */
export function GridGallery() {
  const [rows, setRows] = useState(START);
  const [gone, setGone] = useState<readonly string[]>([]);
  const [focused, setFocused] = useState('');
  const shown = rows.filter((one) => !gone.includes(one.id));

  const onEdit = async (edits: readonly GridEdit[]): Promise<readonly GridEditOutcome[]> => {
    setRows((now) =>
      now.map((one) => {
        const mine = edits.filter((edit) => edit.rowId === one.id);
        if (mine.length === 0) return one;
        const cells = { ...one.cells, ...Object.fromEntries(mine.map((edit) => [edit.columnId, edit.value])) };
        return { ...one, cells, states: {}, doubts: {}, version: (one.version ?? 0) + 1 };
      }),
    );
    return [];
  };
  const accept = ({ rowId }: { rowId: string }) =>
    setRows((now) => now.map((one) => (one.id === rowId ? { ...one, doubts: {} } : one)));

  return (
    <div className="grid gap-8">
      <div className="grid gap-2">
        <h3 id="gallery-grid" className="text-lg">
          Values read
        </h3>
        <Grid
          labelledBy="gallery-grid"
          columns={columns}
          rows={shown}
          onEdit={onEdit}
          onFocusCell={(rowId, columnId) => setFocused(`${rowId}, ${columnId}`)}
          onAddRow={() => setRows((now) => [...now, row(String(now.length + 1), 'New row', '', 'mg/kg')])}
          onRemoveRows={(ids) => setGone((now) => [...now, ...ids])}
          onRestoreRows={(ids) => setGone((now) => now.filter((id) => !ids.includes(id)))}
          onAcceptDoubt={accept}
          onTakeTheirs={({ rowId }) =>
            setRows((now) =>
              now.map((one) =>
                one.id === rowId ? { ...one, states: {}, cells: { ...one.cells, value: '59' }, version: 3 } : one,
              ),
            )
          }
        />
        <p className="text-sm text-clay">Focused: {focused || 'nothing yet'}</p>
      </div>
      <div className="grid gap-2">
        <h3 id="gallery-grid-locked" className="text-lg">
          Confirmed, locked
        </h3>
        <Grid
          labelledBy="gallery-grid-locked"
          columns={columns}
          rows={START.slice(0, 2)}
          readOnly
          onEdit={async () => []}
        />
      </div>
      <div className="grid gap-2">
        <h3 id="gallery-grid-empty" className="text-lg">
          Nothing read
        </h3>
        <Grid labelledBy="gallery-grid-empty" columns={columns} rows={[]} onEdit={async () => []} onAddRow={() => {}} />
      </div>
    </div>
  );
}
