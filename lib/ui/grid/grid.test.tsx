// @vitest-environment happy-dom
import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { cell, focused, said, sent, setUp } from '@/tests/support/grid';

describe('roles and tab stop', () => {
  it('is a named grid of rows, headers and cells with one tab stop', () => {
    setUp();
    const grid = screen.getByRole('grid', { name: 'Values read' });
    expect(within(grid).getAllByRole('row')).toHaveLength(5);
    expect(within(grid).getAllByRole('columnheader')).toHaveLength(4);
    expect(within(grid).getByRole('rowheader', { name: /pH/ })).toBeTruthy();
    expect(grid.querySelectorAll('[tabindex="0"]')).toHaveLength(1);
    expect(grid.querySelectorAll('input, select')).toHaveLength(0);
  });

  it('Tab goes in at the active cell and leaves the grid', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.tab();
    expect(document.activeElement?.textContent).toBe('after');
    await user.tab({ shift: true });
    expect(focused()).toBe('pH, Value: 6.4');
  });

  it('marks doubtful and locked cells', () => {
    setUp();
    const doubtful = cell(/Phosphorus, Value/);
    expect(doubtful.getAttribute('aria-invalid')).toBe('true');
    const notes = document.getElementById(doubtful.getAttribute('aria-describedby') ?? '');
    expect(notes?.textContent).toContain('doubtful: unit missing');
    expect(cell(/pH, Value/).getAttribute('aria-invalid')).toBeNull();
    expect(cell(/Potassium, Value/).getAttribute('aria-readonly')).toBe('true');
    expect(cell(/pH, Value/).getAttribute('aria-readonly')).toBe('false');
  });
});

describe('moving mode', () => {
  it('arrows move one cell and stop at the edges', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{ArrowRight}');
    expect(focused()).toBe('pH, Unit: ppm');
    await user.keyboard('{ArrowDown}');
    expect(focused()).toBe('Phosphorus, Unit: ppm');
    await user.keyboard('{ArrowUp}{ArrowUp}{ArrowUp}');
    expect(focused()).toBe('pH, Unit: ppm');
    await user.keyboard('{ArrowLeft}{ArrowLeft}{ArrowLeft}{ArrowLeft}');
    expect(focused()).toBe('Analyte: pH');
  });

  it('Home, End, Ctrl+Home, Ctrl+End, PageUp and PageDown', async () => {
    const { user } = setUp();
    await user.click(cell('Phosphorus, Value: 41'));
    await user.keyboard('{End}');
    expect(focused()).toBe('Phosphorus, Note: empty');
    await user.keyboard('{Home}');
    expect(focused()).toBe('Analyte: Phosphorus');
    await user.keyboard('{Control>}{End}{/Control}');
    expect(focused()).toBe('Magnesium, Note: empty');
    await user.keyboard('{Control>}{Home}{/Control}');
    expect(focused()).toBe('Analyte: pH');
    await user.keyboard('{PageDown}');
    expect(focused()).toBe('Analyte: Magnesium');
    await user.keyboard('{PageUp}');
    expect(focused()).toBe('Analyte: pH');
  });

  it('tells which cell has the focus, once a cell', async () => {
    const { user, onFocusCell } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{ArrowDown}');
    expect(onFocusCell.mock.calls).toEqual([
      ['ph', 'value'],
      ['p', 'value'],
    ]);
  });

  it('Shift+arrows extend; Esc, Ctrl+A, Shift+Space and Ctrl+Space', async () => {
    const { user } = setUp();
    const selected = () => screen.getByRole('grid').querySelectorAll('[aria-selected="true"]').length;
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Shift>}{ArrowRight}{ArrowDown}{/Shift}');
    expect(selected()).toBe(4);
    expect(focused()).toBe('Phosphorus, Unit: ppm');
    await user.keyboard('{Escape}');
    expect(selected()).toBe(0);
    await user.keyboard('{Control>}a{/Control}');
    expect(selected()).toBe(16);
    await user.keyboard('{Escape}{Shift>} {/Shift}');
    expect(selected()).toBe(4);
    await user.keyboard('{Escape}{Control>} {/Control}');
    expect(selected()).toBe(4);
    expect(cell(/Magnesium, Unit/).getAttribute('aria-selected')).toBe('true');
  });

  it('Alt+N and the button go to the next doubtful cell and round', async () => {
    const { user } = setUp();
    await user.keyboard('{Alt>}n{/Alt}');
    expect(focused()).toBe('Phosphorus, Value: 41');
    await user.click(screen.getByRole('button', { name: /Next doubtful \(2\)/ }));
    expect(focused()).toBe('Magnesium, Unit: ppm');
    await user.keyboard('{Alt>}n{/Alt}');
    expect(focused()).toBe('Phosphorus, Value: 41');
  });

  it('takes the focus when asked from outside, once a key', async () => {
    const { rerender, user } = setUp();
    rerender({ focusRequest: { rowId: 'mg', columnId: 'value', key: 1 } });
    expect(focused()).toBe('Magnesium, Value: 95');
    await user.keyboard('{ArrowUp}');
    rerender({ focusRequest: { rowId: 'mg', columnId: 'value', key: 1 } });
    expect(focused()).toBe('Potassium, Value: 180');
    rerender({ focusRequest: { rowId: 'ph', key: 2 } });
    expect(focused()).toBe('pH, Value: 6.4');
  });
});

describe('editing mode', () => {
  it('Enter starts, Enter commits and moves down', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Enter}');
    const field = screen.getByRole('textbox', { name: 'pH, Value' });
    expect(field).toHaveProperty('value', '6.4');
    expect(field.getAttribute('inputmode')).toBe('decimal');
    await user.keyboard('{Backspace}7{Enter}');
    expect(focused()).toBe('Phosphorus, Value: 41');
    await waitFor(() => expect(sent(onEdit)).toEqual([['ph.value=6.7']]));
    expect(onEdit.mock.calls[0]?.[0][0]).toMatchObject({ before: '6.4', version: 1 });
    expect(cell('pH, Value: 6.7')).toBeTruthy();
  });

  it('F2 starts with the caret at the end and goes back to moving', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{F2}');
    const field = screen.getByRole('textbox', { name: 'pH, Value' });
    expect(field).toHaveProperty('selectionStart', 3);
    await user.keyboard('{F2}');
    expect(focused()).toBe('pH, Value: 6.4');
  });

  it('a letter or digit replaces the value; Esc brings the old one back', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('7.1');
    expect(screen.getByRole('textbox')).toHaveProperty('value', '7.1');
    await user.keyboard('{Escape}');
    expect(focused()).toBe('pH, Value: 6.4');
    expect(onEdit).not.toHaveBeenCalled();
  });

  it('arrows stay in the field', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Enter}{ArrowLeft}{ArrowDown}');
    expect(document.activeElement?.tagName).toBe('INPUT');
  });

  it('Tab commits and goes to the next editable cell, past locked ones; Shift+Tab back', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('Phosphorus, Note: empty'));
    await user.keyboard('low{Tab}');
    expect(focused()).toBe('Magnesium, Value: 95');
    await user.keyboard('{Enter}{Shift>}{Tab}{/Shift}');
    expect(focused()).toBe('Phosphorus, Note: low');
    await waitFor(() => expect(sent(onEdit)).toEqual([['p.note=low']]));
  });

  it('Tab in the last cell commits and leaves the grid', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('Magnesium, Note: empty'));
    await user.keyboard('x{Tab}');
    expect(document.activeElement?.textContent).toBe('after');
    await waitFor(() => expect(sent(onEdit)).toEqual([['mg.note=x']]));
  });

  it('a choice is a list; a letter picks the first that begins with it', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Unit: ppm'));
    await user.keyboard('l');
    expect(screen.getByRole('combobox', { name: 'pH, Unit' })).toHaveProperty('value', 'lb/acre');
    await user.keyboard('{Enter}');
    await waitFor(() => expect(sent(onEdit)).toEqual([['ph.unit=lb/acre']]));
  });

  it('says that a locked cell is locked', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('Potassium, Value: 180'));
    await user.keyboard('5');
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(said()).toBe('This cell is locked.');
    await user.keyboard('{Delete}');
    expect(onEdit).not.toHaveBeenCalled();
  });

  it('keeps an unreadable number on screen, says so and does not send it', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('six{Enter}');
    const bad = cell('pH, Value: six');
    expect(bad.getAttribute('aria-invalid')).toBe('true');
    expect(bad.textContent).toContain('Not a number');
    expect(screen.getByTestId('grid-saved').textContent).toContain('1 to mend');
    await user.keyboard('{Control>}z{/Control}');
    expect(cell('pH, Value: 6.4').getAttribute('aria-invalid')).toBeNull();
    expect(onEdit).not.toHaveBeenCalled();
  });
});

describe('clipboard, fill, clear, undo', () => {
  const clipboard = (text: string) => {
    const held = { text };
    return {
      held,
      clipboardData: { getData: () => held.text, setData: (_: string, value: string) => (held.text = value) },
    };
  };
  const active = () => document.activeElement ?? document.body;

  it('copies the rectangle as tabs and line breaks', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Shift>}{ArrowRight}{ArrowDown}{/Shift}');
    const board = clipboard('');
    fireEvent.copy(active(), board);
    expect(board.held.text).toBe('6.4\tppm\n41\tppm');
  });

  it('a block is one action: one save, one undo, one redo', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    fireEvent.paste(active(), clipboard('6.8\tlb/acre\n44\tlb/acre\n'));
    await waitFor(() =>
      expect(sent(onEdit)).toEqual([['ph.value=6.8', 'ph.unit=lb/acre', 'p.value=44', 'p.unit=lb/acre']]),
    );
    await user.keyboard('{Control>}z{/Control}');
    expect(cell('pH, Value: 6.4')).toBeTruthy();
    expect(cell('Phosphorus, Unit: ppm')).toBeTruthy();
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(2));
    await user.keyboard('{Control>}{Shift>}z{/Shift}{/Control}');
    expect(cell('Phosphorus, Value: 44')).toBeTruthy();
    await user.keyboard('{Control>}z{/Control}');
    await user.keyboard('{Control>}y{/Control}');
    expect(cell('pH, Value: 6.8')).toBeTruthy();
  });

  it('one value fills the selection and leaves locked cells alone', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('Phosphorus, Unit: ppm'));
    await user.keyboard('{Shift>}{ArrowDown}{ArrowDown}{/Shift}');
    fireEvent.paste(active(), clipboard('lb/acre'));
    await waitFor(() => expect(sent(onEdit)).toEqual([['p.unit=lb/acre', 'mg.unit=lb/acre']]));
    expect(said()).toBe('2 pasted. 1 locked were left alone.');
  });

  it('cuts, clears and fills down', async () => {
    const { user, onEdit } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    const board = clipboard('');
    fireEvent.cut(active(), board);
    expect(board.held.text).toBe('6.4');
    expect(cell('pH, Value: empty')).toBeTruthy();
    await user.keyboard('{ArrowDown}{Delete}');
    expect(cell('Phosphorus, Value: empty')).toBeTruthy();
    await user.keyboard('{ArrowUp}7{Enter}{Control>}d{/Control}');
    expect(cell('Phosphorus, Value: 7')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Undo' }));
    expect(cell('Phosphorus, Value: empty')).toBeTruthy();
    await waitFor(() => expect(onEdit).toHaveBeenCalledTimes(5));
  });

  it('Undo says when there is nothing', async () => {
    const { user } = setUp();
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Control>}z{/Control}');
    expect(said()).toBe('Nothing to undo.');
  });

  it('removes the selected rows and can bring them back', async () => {
    const onRemoveRows = vi.fn();
    const onRestoreRows = vi.fn();
    const { user } = setUp({ onRemoveRows, onRestoreRows });
    await user.click(cell('pH, Value: 6.4'));
    await user.keyboard('{Shift>}{ArrowDown}{/Shift}');
    await user.click(screen.getByRole('button', { name: 'Remove 2 rows' }));
    expect(onRemoveRows).toHaveBeenCalledWith(['ph', 'p']);
    await user.click(screen.getByRole('button', { name: 'Undo' }));
    expect(onRestoreRows).toHaveBeenCalledWith(['ph', 'p']);
  });
});
