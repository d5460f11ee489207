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

describe('a workbook', () => {
  const cells = {
    sheets: [
      {
        number: 1,
        name: 'Main',
        rows: [
          ['Plot', 'pH'],
          ['North bed', '6.4'],
        ],
      },
      {
        number: 3,
        name: 'Trace',
        rows: [
          ['Plot', 'Zn'],
          ['North bed', '1.2'],
        ],
      },
    ],
  };
  const marks: readonly PageMark[] = [
    { rowId: 'a', label: 'pH', rowNumber: 1, page: null, box: null, cell: { sheet: 1, row: 2, column: 2 } },
    { rowId: 'b', label: 'Zinc', rowNumber: 2, page: null, box: null, cell: { sheet: 3, row: 2, column: 2 } },
  ];
  const shown = (over: Partial<PageViewProps>) =>
    show({
      source: { kind: 'cells', url: '/cells' },
      fileName: 'spring.xlsx',
      marks,
      load: async () => bytes(JSON.stringify(cells)),
      ...over,
    });

  it('brings the sheet of the focused row to the front and marks its cell', async () => {
    shown({ highlightedRowId: 'b' });
    expect((await screen.findByText('1.2')).hasAttribute('data-highlighted')).toBe(true);
    expect(screen.queryByText('6.4')).toBeNull();
    expect(screen.getByTestId('page-place').textContent).toBe('Sheet 3, line 2, column 2, row 2: Zinc');
  });

  it('shows another sheet when asked for it', async () => {
    shown({});
    await screen.findByText('6.4');
    await userEvent.click(screen.getByRole('button', { name: 'Trace' }));
    expect(screen.getByText('1.2')).toBeTruthy();
  });

  it('says so when its cells are not there', async () => {
    shown({ load: async () => ({ ok: false, reason: 'gone' }) });
    expect(await screen.findByText('This workbook cannot be shown here')).toBeTruthy();
  });
});

describe('a text', () => {
  const marks: readonly PageMark[] = [
    { rowId: 'a', label: 'P', rowNumber: 1, page: null, box: null, cell: { sheet: 1, row: 2, column: 4 } },
  ];
  const shown = (text: string, over: Partial<PageViewProps> = {}) =>
    show({
      source: { kind: 'text', url: '/text' },
      fileName: 'mail.txt',
      marks,
      load: async () => bytes(text),
      ...over,
    });

  it('stands line by line with the number marked', async () => {
    const onPick = shown('Results\nP: <0.5 ppm\n', { highlightedRowId: 'a' });
    const mark = await screen.findByText('<0.5');
    expect(mark.hasAttribute('data-highlighted')).toBe(true);
    await userEvent.click(mark);
    expect(onPick.mock.calls).toEqual([['a']]);
  });

  it('stands as a table when its cells are parted by tabs', async () => {
    shown('Plot\tpH\tP\nNorth\t6.4\t41\n', { marks: [] });
    expect((await screen.findByText('41')).tagName).toBe('TD');
  });

  it('never draws what stands in it', async () => {
    shown('<a>\n<b>9</b><script>alert(1)</script>\n', { fileName: 'data.xml' });
    expect(await screen.findByText(/script/)).toBeTruthy();
    expect(document.querySelector('script')).toBeNull();
  });
});
