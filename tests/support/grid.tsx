import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, vi } from 'vitest';
import { Grid } from '@/lib/ui/grid/grid';
import type { GridColumn, GridEdit, GridProps, GridRow } from '@/lib/ui/grid/types';

export const columns: readonly GridColumn[] = [
  { id: 'analyte', header: 'Analyte', kind: 'readonly', rowHeader: true },
  { id: 'value', header: 'Value', kind: 'number' },
  {
    id: 'unit',
    header: 'Unit',
    kind: 'select',
    options: [
      { value: 'mg/kg', label: 'ppm' },
      { value: 'lb/acre', label: 'lb/acre' },
    ],
  },
  { id: 'note', header: 'Note', kind: 'text' },
];

export const makeRow = (id: string, analyte: string, value: string, more: Partial<GridRow> = {}): GridRow => ({
  id,
  version: 1,
  cells: { analyte, value, unit: 'mg/kg', note: '' },
  ...more,
});

export const ROWS: readonly GridRow[] = [
  makeRow('ph', 'pH', '6.4'),
  makeRow('p', 'Phosphorus', '41', { doubts: { value: [{ code: 'unit', sentence: 'unit missing' }] } }),
  makeRow('k', 'Potassium', '180', { readOnly: true }),
  makeRow('mg', 'Magnesium', '95', { doubts: { unit: [{ code: 'two', sentence: 'two readings differ' }] } }),
];

let matches = false;

/** Makes the next render a narrow screen. */
export function narrowScreen(): void {
  matches = true;
}

beforeEach(() => {
  matches = false;
  vi.stubGlobal('matchMedia', () => ({ matches, addEventListener: () => {}, removeEventListener: () => {} }));
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

export type OnEdit = GridProps['onEdit'];
export const saves = () => vi.fn<OnEdit>(async () => []);

export function setUp(over: Partial<GridProps> = {}) {
  const onEdit = saves();
  const onFocusCell = vi.fn();
  const props: GridProps = { labelledBy: 'title', columns, rows: ROWS, onEdit, onFocusCell, ...over };
  const page = (now: GridProps) => (
    <>
      <h2 id="title">Values read</h2>
      <button type="button">before</button>
      <Grid {...now} />
      <button type="button">after</button>
    </>
  );
  const user = userEvent.setup();
  const view = render(page(props));
  return {
    onEdit,
    onFocusCell,
    user,
    rerender: (next: Partial<GridProps>) => view.rerender(page({ ...props, ...next })),
  };
}

export const cell = (name: RegExp | string) => screen.getByRole('gridcell', { name });
export const focused = () => document.activeElement?.getAttribute('aria-label');
export const sent = (onEdit: ReturnType<typeof saves>) =>
  onEdit.mock.calls.map(([edits]) => edits.map((edit: GridEdit) => `${edit.rowId}.${edit.columnId}=${edit.value}`));
export const said = () => screen.getByTestId('grid-said').textContent?.trim();
