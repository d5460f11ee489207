// @vitest-environment happy-dom
import { render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { cell, columns, focused, makeRow, narrowScreen, type OnEdit, ROWS, sent, setUp } from '@/tests/support/grid';
import { Grid } from './grid';
import type { GridEditOutcome } from './types';

describe('saving and the server', () => {
  it('new server rows do not overwrite what is being typed, and the edit carries what was seen', async () => {
    const { user, onEdit, rerender } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7.');
    rerender({ rows: [makeRow('ph', 'pH', '9.9', { version: 2 }), ...ROWS.slice(1)] });
    expect(screen.getByRole('textbox')).toHaveProperty('value', '7.');
    await user.keyboard('1{Enter}');
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(1));
    expect(onEdit.mock.calls[0]?.[0][0]).toEqual({
      rowId: 'ph',
      columnId: 'value',
      value: '7.1',
      before: '6.4',
      version: 1,
    });
  });

  it('other cells take the new server rows', async () => {
    const { user, rerender } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7');
    rerender({ rows: [ROWS[0] ?? makeRow('ph', 'pH', ''), makeRow('p', 'Phosphorus', '55', { version: 2 })] });
    expect(cell('Phosphorus, Value: 55')).toBeTruthy();
    expect(screen.getByRole('textbox')).toHaveProperty('value', '7');
  });

  it('keeps the focus on its row when rows are sorted anew', async () => {
    const { user, rerender } = setUp();
    await user.click(cell('Phosphorus, Value: 41'));
    rerender({ rows: [...ROWS].reverse() });
    await user.keyboard('{ArrowDown}');
    expect(focused()).toBe('pH, Value: 6.4');
  });

  it('shows saving until the answer, and sends one call at a time with the own version moved on', async () => {
    const answers: ((outcomes: readonly GridEditOutcome[]) => void)[] = [];
    const onEdit = vi.fn<OnEdit>(() => new Promise((resolve) => answers.push(resolve)));
    const { user } = setUp({ onEdit });
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7{Tab}l{Enter}');
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(1));
    expect(screen.getByTestId('grid-saved').textContent).toContain('saving 2');
    answers[0]?.([{ rowId: 'ph', columnId: 'value', state: { kind: 'saved' }, version: 2 }]);
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(2));
    expect(onEdit.mock.calls[1]?.[0][0]).toMatchObject({ columnId: 'unit', version: 2 });
    answers[1]?.([]);
    await waitFor(() => expect(screen.getByTestId('grid-saved').textContent).toBe('All saved.'));
  });

  const conflict: GridEditOutcome = {
    rowId: 'ph',
    columnId: 'value',
    state: { kind: 'conflict', mine: '7', theirs: '6.9', theirsBy: 'Ada Brook', version: 4 },
  };

  it('shows both values of a conflict; keep mine sends it again on their version', async () => {
    const onEdit = vi.fn<OnEdit>(async () => []);
    onEdit.mockResolvedValueOnce([conflict]);
    const { user } = setUp({ onEdit });
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7{Enter}');
    await screen.findByText(/Ada Brook wrote 6.9, you wrote 7/);
    await user.keyboard('{ArrowUp}{Enter}');
    expect(document.activeElement?.textContent).toContain('Keep mine');
    await user.keyboard('{ArrowRight}');
    expect(document.activeElement?.textContent).toContain('Take theirs');
    await user.keyboard('{ArrowLeft}{Enter}');
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(2));
    expect(onEdit.mock.calls[1]?.[0][0]).toEqual({
      rowId: 'ph',
      columnId: 'value',
      value: '7',
      before: '6.9',
      version: 4,
    });
    expect(focused()).toBe('pH, Value: 7');
  });

  it('take theirs shows theirs and sends nothing', async () => {
    const onEdit = vi.fn<OnEdit>(async () => [conflict]);
    const onTakeTheirs = vi.fn();
    const { user } = setUp({ onEdit, onTakeTheirs });
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7{Enter}');
    await user.click(await screen.findByRole('button', { name: /Take theirs/ }));
    expect(cell('pH, Value: 6.9')).toBeTruthy();
    expect(onTakeTheirs).toHaveBeenCalledWith({ rowId: 'ph', columnId: 'value' });
    expect(onEdit).toHaveBeenCalledTimes(1);
  });

  it('keeps the text when saving fails, and tries again on the version that was seen', async () => {
    const onEdit = vi.fn<OnEdit>(async () => []);
    onEdit.mockRejectedValueOnce(new Error('no network'));
    const { user, rerender } = setUp({ onEdit });
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7{Enter}');
    await screen.findByRole('button', { name: 'Try again' });
    rerender({ onEdit, rows: [makeRow('ph', 'pH', '6.5', { version: 8 }), ...ROWS.slice(1)] });
    expect(cell('pH, Value: 7')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(2));
    expect(onEdit.mock.calls[1]?.[0][0]).toMatchObject({ value: '7', before: '6.4', version: 1 });
  });
});

describe('checking a doubtful value', () => {
  it('Ctrl+Enter and the button say that it is right', async () => {
    const onAcceptDoubt = vi.fn();
    const { user } = setUp({ onAcceptDoubt });
    await user.keyboard('{Alt>}n{/Alt}');
    await user.keyboard('{Control>}{Enter}{/Control}');
    await user.click(screen.getByRole('button', { name: /It is right/ }));
    expect(onAcceptDoubt.mock.calls).toEqual([
      [{ rowId: 'p', columnId: 'value' }],
      [{ rowId: 'p', columnId: 'value' }],
    ]);
  });
});

describe('cards on a narrow screen', () => {
  beforeEach(narrowScreen);

  it('one analyte a card, the same edits and undo', async () => {
    const { user, onEdit } = setUp();
    expect(screen.queryByRole('grid')).toBeNull();
    expect(within(screen.getByRole('list', { name: 'Values read' })).getAllByRole('listitem')).toHaveLength(4);
    const field = screen.getByRole('textbox', { name: 'pH, Value' });
    await user.clear(field);
    await user.type(field, '6.9{Enter}');
    await waitFor(() => expect(sent(onEdit)).toEqual([['ph.value=6.9']]));
    await user.selectOptions(screen.getByRole('combobox', { name: 'pH, Unit' }), 'lb/acre');
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(2));
    await user.click(screen.getByRole('button', { name: 'Undo' }));
    expect(screen.getByRole('combobox', { name: 'pH, Unit' })).toHaveProperty('value', 'mg/kg');
  });

  it('a field being typed in is not overwritten', async () => {
    const { user, onEdit, rerender } = setUp();
    const field = screen.getByRole('textbox', { name: 'pH, Value' });
    await user.type(field, '5');
    rerender({ rows: [makeRow('ph', 'pH', '9.9', { version: 2 }), ...ROWS.slice(1)] });
    expect(field).toHaveProperty('value', '6.45');
    await user.tab();
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(1));
    expect(onEdit.mock.calls[0]?.[0][0]).toMatchObject({ value: '6.45', before: '6.4', version: 1 });
  });

  it('Next doubtful puts the focus on the field, with its reason', async () => {
    const { user } = setUp();
    await user.click(screen.getByRole('button', { name: /Next doubtful/ }));
    expect(focused()).toBe('Phosphorus, Value');
    const notes = document.getElementById(document.activeElement?.getAttribute('aria-describedby') ?? '');
    expect(notes?.textContent).toContain('unit missing');
  });
});

function Served() {
  const [rows, setRows] = useState(ROWS);
  const onEdit: OnEdit = async (edits) => {
    setRows((now) =>
      now.map((row) => {
        const mine = edits.filter((edit) => edit.rowId === row.id);
        if (mine.length === 0) return row;
        const cells = { ...row.cells, ...Object.fromEntries(mine.map((edit) => [edit.columnId, `${edit.value}0`])) };
        return { ...row, cells, version: (row.version ?? 0) + 1 };
      }),
    );
    return [];
  };
  return <Grid labelledBy="title" columns={columns} rows={rows} onEdit={onEdit} />;
}

describe('a server that answers late', () => {
  it('shows what the server made of the value', async () => {
    const user = userEvent.setup();
    render(<Served />);
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('6.5{Enter}');
    await waitFor(() => expect(cell('pH, Value: 6.50')).toBeTruthy());
  });
});
