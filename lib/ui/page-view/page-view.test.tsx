// @vitest-environment happy-dom
import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { liveLine } from './live-line';
import { PageView } from './page-view';
import type { FetchedFile, PageMark, PageViewProps } from './types';

afterEach(cleanup);

const bytes = (text: string): FetchedFile => ({ ok: true, bytes: new TextEncoder().encode(text) });
const MARKS: readonly PageMark[] = [
  { rowId: 'a', label: 'pH, North bed', rowNumber: 1, page: null, box: null, cell: { row: 2, column: 2 } },
  { rowId: 'b', label: 'P, North bed', rowNumber: 2, page: null, box: null, cell: { row: 2, column: 3 } },
];

function show(over: Partial<PageViewProps>) {
  const onPick = vi.fn();
  render(
    <PageView
      source={{ kind: 'csv', url: '/file' }}
      fileName="spring.csv"
      marks={MARKS}
      highlightedRowId={null}
      onPick={onPick}
      load={async () => bytes('Plot;pH;P\nNorth bed;6,4;41\n')}
      {...over}
    />,
  );
  return onPick;
}

describe('a data file', () => {
  it('stands as a table, the focused cell marked and said', async () => {
    show({ highlightedRowId: 'a' });
    const cell = await screen.findByText('6,4');
    expect(cell.hasAttribute('data-highlighted')).toBe(true);
    expect(screen.getByText('41').hasAttribute('data-highlighted')).toBe(false);
    expect(screen.getByTestId('page-place').textContent).toBe('Line 2, column 2, row 1: pH, North bed');
  });

  it('a click on a marked cell picks its row, on any other cell nothing', async () => {
    const onPick = show({});
    await userEvent.click(await screen.findByText('41'));
    await userEvent.click(screen.getByText('North bed'));
    expect(onPick.mock.calls).toEqual([['b']]);
  });
});

describe('what cannot be shown', () => {
  it('the store not answering is said, and asking again shows the file', async () => {
    const load = vi.fn(async (): Promise<FetchedFile> => bytes('pH\n6.4'));
    load.mockResolvedValueOnce({ ok: false, reason: 'store-silent' });
    show({ load });
    expect((await screen.findByRole('alert')).textContent).toContain('The file store does not answer');
    await userEvent.click(screen.getByRole('button', { name: 'Fetch it again' }));
    expect(await screen.findByText('6.4')).toBeTruthy();
  });

  it('a role that may not open the original is told so, with nothing to press', async () => {
    show({ load: async () => ({ ok: false, reason: 'not-allowed' }) });
    expect((await screen.findByRole('alert')).textContent).toContain('not open to you');
    expect(screen.queryByRole('button')).toBeNull();
  });

  it('an unsupported file and no file', () => {
    show({ source: { kind: 'unsupported', sentence: 'It is a picture of an unknown kind.' } });
    expect(screen.getByText('It is a picture of an unknown kind.')).toBeTruthy();
    cleanup();
    show({ source: { kind: 'none' } });
    expect(screen.getByText('Entered by hand')).toBeTruthy();
  });
});

describe('liveLine', () => {
  it('says page and row, line and column, or that there is no place', () => {
    const mark: PageMark = { rowId: 'x', label: 'pH', rowNumber: 7, page: 2, box: [0, 0, 1, 1], cell: null };
    expect(liveLine(mark)).toBe('Page 2, row 7: pH');
    expect(liveLine({ ...mark, box: null, page: null })).toBe('Row 7: pH, entered by hand');
    expect(liveLine(undefined)).toBe('');
  });
});
