// @vitest-environment happy-dom
import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { plotDifferences } from './plot-differences';
import { plotValues } from './plot-values';
import { VersionConflict } from './version-conflict';

afterEach(cleanup);

const NO_SETS = { builtIn: [], own: [] };
const before = { ...plotValues(null, 'm'), name: 'North bed', texture: 'light' };

describe('plotDifferences', () => {
  it('asks only about what both changed, and not to the same', () => {
    const mine = { ...before, name: 'Upper bed', texture: 'heavy', freeLimeSeen: 'on', crop: 'Leek' };
    const theirs = { ...before, name: 'Top bed', texture: 'heavy', notes: 'stony', freeLimeSeen: '' };
    expect(plotDifferences(mine, before, theirs, NO_SETS)).toEqual([
      { field: 'Name', yours: 'Upper bed', theirs: 'Top bed' },
    ]);
  });
});

describe('VersionConflict', () => {
  const show = (differences: Parameters<typeof VersionConflict>[0]['differences']) => {
    const calls = { mine: vi.fn(), theirs: vi.fn() };
    render(
      <VersionConflict
        subject="North bed"
        differences={differences}
        onSaveYours={calls.mine}
        onKeepTheirs={calls.theirs}
      />,
    );
    return calls;
  };

  it('shows both values and does nothing until somebody chooses', async () => {
    const calls = show([{ field: 'Notes', yours: '', theirs: 'stony' }]);
    const cells = screen.getAllByRole('cell').map((cell) => cell.textContent);
    expect(cells).toEqual(['nothing', 'stony']);
    expect(screen.getByRole('status').textContent).toContain('Yours is not saved yet');
    expect(calls.mine).not.toHaveBeenCalled();
    await userEvent.click(screen.getByRole('button', { name: 'Keep theirs' }));
    expect(calls.theirs).toHaveBeenCalledTimes(1);
  });

  it('says that both can stand where they changed other things', async () => {
    const calls = show([]);
    expect(screen.queryByRole('table')).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: 'Save yours beside it' }));
    expect(calls.mine).toHaveBeenCalledTimes(1);
  });
});
