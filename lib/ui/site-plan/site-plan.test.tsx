// @vitest-environment happy-dom
import { act, cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { areaOf, boundsOf, outlineOf } from './geometry';
import { SitePlan } from './site-plan';
import type { PlanOutline, PlanPlot, SitePlanProps } from './types';

beforeEach(() => {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      disconnect() {}
    },
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const PLOTS: readonly PlanPlot[] = [
  {
    id: 'north',
    name: 'North bed',
    outline: outlineOf({ x: 2, y: 2, width: 10, height: 4 }),
    lastTest: { date: '2026-05-03', ph: '6.3' },
    crop: 'Onion',
  },
  { id: 'south', name: 'South bed', outline: outlineOf({ x: 14, y: 2, width: 3, height: 3 }) },
  { id: 'far', name: 'Far field', outline: null, typedAreaM2: 400 },
];

function Held(props: Partial<SitePlanProps>) {
  const [selected, setSelected] = useState<string | null>(null);
  return (
    <SitePlan
      siteName="Mill Lane"
      plots={PLOTS}
      unit="m"
      selectedPlotId={selected}
      onSelect={setSelected}
      plotHref={(id) => `/plots/${id}`}
      canEdit
      canUpload
      {...props}
    />
  );
}

const shape = (name: RegExp) => within(screen.getByTestId('site-plan-drawing')).getByRole('button', { name });
const press = async (target: Element, key: string, shiftKey = false) => {
  fireEvent.keyDown(target, { key, shiftKey });
  await act(async () => fireEvent.keyUp(target, { key, shiftKey }));
};
const changes = () => vi.fn<(plotId: string, outline: PlanOutline) => Promise<void>>(async () => {});

describe('plots', () => {
  it('say name, area, last test and crop', () => {
    render(<Held />);
    expect(shape(/North bed/).getAttribute('aria-label')).toBe('North bed, 40 m², pH 6.3, 3 May 2026, Onion');
    expect(shape(/South bed/).getAttribute('aria-label')).toBe('South bed, 9 m², no test yet');
  });

  it('all stand in the list, also the one that is not drawn, with its typed area', () => {
    render(<Held />);
    const items = within(screen.getByRole('list', { name: 'Plots' })).getAllByRole('listitem');
    expect(items).toHaveLength(3);
    expect(items[2]?.textContent).toContain('400 m² (typed)');
    expect(items[2]?.textContent).toContain('Not drawn');
    expect(screen.getByRole('link', { name: 'Far field' }).getAttribute('href')).toBe('/plots/far');
  });

  it('open by Enter once selected', async () => {
    const onOpen = vi.fn();
    render(<Held onOpen={onOpen} />);
    await press(shape(/North/), 'Enter');
    expect(shape(/North/).getAttribute('aria-pressed')).toBe('true');
    expect(onOpen).not.toHaveBeenCalled();
    await press(shape(/North/), 'Enter');
    expect(onOpen).toHaveBeenCalledWith('north');
  });
});

describe('by keyboard', () => {
  it('arrows move by half a metre, a held key is one change, undo takes it back', async () => {
    const onChangeOutline = changes();
    render(<Held onChangeOutline={onChangeOutline} onCreate={() => {}} />);
    const north = shape(/North/);
    await press(north, ' ');
    fireEvent.keyDown(north, { key: 'ArrowRight' });
    fireEvent.keyDown(north, { key: 'ArrowRight' });
    await press(north, 'ArrowUp');
    expect(onChangeOutline).toHaveBeenCalledTimes(1);
    expect(boundsOf(onChangeOutline.mock.calls[0]?.[1] ?? [])).toEqual({ minX: 3, minY: 2.5, maxX: 13, maxY: 6.5 });
    await userEvent.click(screen.getByRole('button', { name: /Undo/ }));
    await waitFor(() => expect(onChangeOutline).toHaveBeenCalledTimes(2));
    expect(onChangeOutline.mock.calls[1]?.[1]).toEqual(PLOTS[0]?.outline);
  });

  it('Shift and arrows resize', async () => {
    const onChangeOutline = changes();
    render(<Held onChangeOutline={onChangeOutline} />);
    await press(shape(/North/), ' ');
    await press(shape(/North/), 'ArrowDown', true);
    expect(areaOf(onChangeOutline.mock.calls[0]?.[1] ?? [])).toBe(10 * 3.5);
    expect(shape(/North/).getAttribute('aria-label')).toContain('35 m²');
  });

  it('a plot that is not selected, or that may not be edited, stays', async () => {
    const onChangeOutline = changes();
    const { rerender } = render(<Held onChangeOutline={onChangeOutline} />);
    await press(shape(/North/), 'ArrowRight');
    rerender(<Held onChangeOutline={onChangeOutline} canEdit={false} />);
    await press(shape(/North/), ' ');
    await press(shape(/North/), 'ArrowRight');
    expect(onChangeOutline).not.toHaveBeenCalled();
  });

  it('a change that is refused goes back and says so', async () => {
    const onChangeOutline = changes();
    onChangeOutline.mockRejectedValueOnce(new Error('offline'));
    render(<Held onChangeOutline={onChangeOutline} />);
    await press(shape(/North/), ' ');
    await press(shape(/North/), 'ArrowDown', true);
    await waitFor(() => expect(screen.getByTestId('site-plan-said').textContent).toContain('was not saved'));
    expect(shape(/North/).getAttribute('aria-label')).toContain('40 m²');
  });
});

describe('by numbers', () => {
  it('sets place and size exactly, in feet where feet are wanted', async () => {
    const onChangeOutline = changes();
    render(<Held unit="ft" onChangeOutline={onChangeOutline} />);
    await press(shape(/North/), ' ');
    const width = screen.getByRole('textbox', { name: 'Width' });
    await userEvent.clear(width);
    await userEvent.type(width, '41');
    await userEvent.click(screen.getByRole('button', { name: 'Save place and size' }));
    const bounds = boundsOf(onChangeOutline.mock.calls[0]?.[1] ?? []);
    expect(bounds?.minX).toBe(2);
    expect((bounds?.maxX ?? 0) - (bounds?.minX ?? 0)).toBeCloseTo(41 * 0.3048, 10);
    expect((bounds?.maxY ?? 0) - (bounds?.minY ?? 0)).toBeCloseTo(4, 10);
  });

  it('refuses what is no length, at the field', async () => {
    const onChangeOutline = changes();
    render(<Held onChangeOutline={onChangeOutline} />);
    await press(shape(/North/), ' ');
    const width = screen.getByRole('textbox', { name: 'Width' });
    await userEvent.clear(width);
    await userEvent.type(width, 'wide');
    await userEvent.click(screen.getByRole('button', { name: 'Save place and size' }));
    expect(screen.getByText(/Write a length like/)).toBeTruthy();
    expect(width.getAttribute('aria-invalid')).toBe('true');
    expect(onChangeOutline).not.toHaveBeenCalled();
  });

  it('adds a plot', async () => {
    const onCreate = vi.fn();
    render(<Held onCreate={onCreate} />);
    await userEvent.click(screen.getByRole('button', { name: 'Add by numbers' }));
    await userEvent.click(screen.getByRole('button', { name: 'Add this plot' }));
    expect(onCreate).toHaveBeenCalledWith(outlineOf({ x: 1, y: 1, width: 6, height: 3 }));
  });

  it('hints at an overlap and refuses nothing', async () => {
    const plots = PLOTS.map((plot) =>
      plot.id === 'south' ? { ...plot, outline: outlineOf({ x: 11, y: 3, width: 3, height: 3 }) } : plot,
    );
    render(<Held plots={plots} onChangeOutline={changes()} />);
    await press(shape(/North/), ' ');
    expect(screen.getByText(/it overlaps South bed/)).toBeTruthy();
  });
});

describe('files', () => {
  const spring = () => new File(['x'], 'spring.pdf', { type: 'application/pdf' });
  const carried = () => ({ dataTransfer: { files: [spring()], dropEffect: 'none' } });

  it('let go over a plot go to it', () => {
    const onDropFiles = vi.fn();
    render(<Held onDropFiles={onDropFiles} />);
    fireEvent.dragOver(shape(/North/), carried());
    expect(screen.getByText('Let go here')).toBeTruthy();
    fireEvent.drop(shape(/North/), carried());
    expect(onDropFiles.mock.calls[0]?.[0]).toBe('north');
    expect(onDropFiles.mock.calls[0]?.[1][0].name).toBe('spring.pdf');
  });

  it('let go beside every plot go to the site', () => {
    const onDropFiles = vi.fn();
    render(<Held onDropFiles={onDropFiles} />);
    fireEvent.drop(screen.getByTestId('site-plan-drawing'), carried());
    expect(onDropFiles.mock.calls).toEqual([[null, [expect.objectContaining({ name: 'spring.pdf' })]]]);
  });

  it('let go over a row of the list go to its plot, also one that is not drawn', () => {
    const onDropFiles = vi.fn();
    render(<Held onDropFiles={onDropFiles} />);
    fireEvent.drop(screen.getByRole('link', { name: 'Far field' }), carried());
    expect(onDropFiles.mock.calls[0]?.[0]).toBe('far');
  });

  it('a viewer lets go are sent nowhere', () => {
    const onDropFiles = vi.fn();
    render(<Held onDropFiles={onDropFiles} canUpload={false} />);
    fireEvent.drop(shape(/North/), carried());
    fireEvent.drop(screen.getByTestId('site-plan-drawing'), carried());
    fireEvent.drop(screen.getByRole('link', { name: 'Far field' }), carried());
    expect(onDropFiles).not.toHaveBeenCalled();
  });

  it('show beside their plot how far they are and what comes next', () => {
    const plots = PLOTS.map((plot) =>
      plot.id === 'south'
        ? {
            ...plot,
            waiting: { count: 2, href: '/reports' },
            uploads: [
              {
                fileName: 'spring.pdf',
                text: '3 samples to review',
                share: null,
                link: { href: '/r', label: 'Review' },
              },
            ],
          }
        : plot,
    );
    render(<Held plots={plots} />);
    expect(screen.getByRole('link', { name: '2 reports to review for South bed' }).getAttribute('href')).toBe(
      '/reports',
    );
    expect(screen.getByRole('link', { name: 'Review spring.pdf' }).getAttribute('href')).toBe('/r');
    expect(shape(/South bed/).getAttribute('aria-label')).toContain('2 reports to review');
  });

  it('are picked by a button in the list, and a viewer has none', () => {
    const { rerender } = render(<Held onDropFiles={vi.fn()} />);
    expect(screen.getAllByRole('button', { name: /Upload a report to/ })).toHaveLength(3);
    rerender(<Held onDropFiles={vi.fn()} canUpload={false} />);
    expect(screen.queryByRole('button', { name: /Upload a report to/ })).toBeNull();
  });
});
