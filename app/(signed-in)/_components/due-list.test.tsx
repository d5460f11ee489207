// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { DueAnswer } from '@/lib/schemas/reminders';
import { DueList } from './due-list';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const due = (over: Partial<DueAnswer>): DueAnswer => ({
  id: 'reminder-1',
  siteId: 'site-1',
  siteName: 'Hill Field',
  plotId: 'plot-1',
  plotName: 'North bed',
  kind: 'yearly-same-season',
  dueOn: '2026-04-12',
  reason: 'A year after the last sample.',
  inDays: -8,
  snoozedUntil: null,
  mayClose: true,
  ...over,
});

/** The list as the first page holds it: asked again after a change. */
function Board({ first, then }: { first: DueAnswer[]; then: DueAnswer[] }) {
  const [shown, setShown] = useState(first);
  return (
    <>
      <h2 id="heading" tabIndex={-1}>
        Hill Field
      </h2>
      <DueList
        due={shown}
        today="2026-04-20"
        focusId="heading"
        onChanged={() => {
          setShown(then);
          return Promise.resolve();
        }}
      />
    </>
  );
}

const answering = (value: unknown, status = 200) => {
  const ask = vi.fn((_path: string, _init: RequestInit) =>
    Promise.resolve(new Response(JSON.stringify(value), { status })),
  );
  vi.stubGlobal('fetch', ask);
  return ask;
};

const pressAlreadySampled = async () => {
  await userEvent.click(screen.getByRole('button', { name: 'Already sampled' }));
  await userEvent.click(within(screen.getByRole('dialog')).getByRole('button', { name: 'Already sampled' }));
};

describe('samples that are due', () => {
  it('asks once more before it ends a reminder for everybody, then gives the focus to the heading', async () => {
    const ask = answering({ done: true });
    render(<Board first={[due({})]} then={[]} />);
    await userEvent.click(screen.getByRole('button', { name: 'Already sampled' }));
    expect(ask).not.toHaveBeenCalled();
    await userEvent.click(screen.getByRole('button', { name: 'Not yet' }));
    expect(ask).not.toHaveBeenCalled();
    await pressAlreadySampled();
    expect(ask.mock.calls.map(([path, init]) => [path, init.method])).toEqual([
      ['/api/v1/sites/site-1/reminders/reminder-1/done', 'POST'],
    ]);
    await waitFor(() => expect(screen.queryByRole('link', { name: 'North bed' })).toBeNull());
    await waitFor(() => expect(document.activeElement?.id).toBe('heading'));
  });

  it('says so when it cannot be done, and keeps the row', async () => {
    answering({ title: 'Not now', code: 'internal', detail: 'Loamline could not do this.' }, 500);
    render(<Board first={[due({})]} then={[]} />);
    await pressAlreadySampled();
    expect(await screen.findByText('Loamline could not do this.')).toBeTruthy();
    expect(screen.getByText('North bed', { selector: 'a *' })).toBeTruthy();
  });

  it('puts it off from today, for the reader alone', async () => {
    const ask = answering({ done: true });
    render(<Board first={[due({})]} then={[due({ snoozedUntil: '2026-05-04' })]} />);
    await userEvent.click(screen.getByRole('button', { name: 'Ask later about North bed' }));
    await userEvent.click(await screen.findByRole('menuitem', { name: /In two weeks/ }));
    expect(await screen.findByText('Resting until 4 May 2026')).toBeTruthy();
    expect(JSON.parse(String(ask.mock.calls[0]?.[1].body))).toEqual({ until: '2026-05-04' });
  });

  it('offers a viewer no end to it, and nobody anything long before the day', () => {
    const { rerender } = render(<Board key="viewer" first={[due({ mayClose: false })]} then={[]} />);
    expect(screen.queryByRole('button', { name: 'Already sampled' })).toBeNull();
    expect(screen.getByRole('button', { name: 'Ask later about North bed' })).toBeTruthy();
    rerender(<Board key="far" first={[due({ inDays: 131 })]} then={[]} />);
    expect(screen.queryAllByRole('button')).toEqual([]);
  });
});
