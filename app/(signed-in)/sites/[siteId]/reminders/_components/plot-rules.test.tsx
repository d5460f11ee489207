// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { RuleAnswer } from '@/lib/schemas/reminders';
import { dayOrWhyNot, PlotRules } from './plot-rules';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const rule = (over: Partial<RuleAnswer>): RuleAnswer => ({
  id: 'rule-1',
  plotId: 'plot-1',
  plotName: 'North bed',
  kind: 'after-sulfur',
  active: false,
  dueOn: null,
  why: 'No sulfur is recorded on this plot yet.',
  ...over,
});

describe('the rules of a plot', () => {
  it('say the day, or what is missing', () => {
    expect(dayOrWhyNot(rule({}))).toBe('No sulfur is recorded on this plot yet.');
    expect(dayOrWhyNot(rule({ dueOn: '2026-07-17', why: 'x' }))).toBe('Off. It would come due 17 July 2026.');
    expect(dayOrWhyNot(rule({ active: true, dueOn: '2026-07-17', why: 'Half of it can have acted.' }))).toBe(
      'Comes due 17 July 2026. Half of it can have acted.',
    );
  });

  it('are switched on by keyboard, once however often they are pressed while it is saved', async () => {
    let answer: (response: Response) => void = () => {};
    const ask = vi.fn((_path: string, _init: RequestInit) => new Promise<Response>((resolve) => (answer = resolve)));
    vi.stubGlobal('fetch', ask);
    const changed = vi.fn(() => Promise.resolve());
    render(<PlotRules siteId="site-1" plots={[[rule({})]]} mayEdit onChanged={changed} />);
    const box = screen.getByRole<HTMLInputElement>('checkbox', { name: 'After sulfur' });
    expect(screen.getByRole('group', { name: 'North bed' }).contains(box)).toBe(true);
    box.focus();
    await userEvent.keyboard(' ');
    await userEvent.keyboard(' ');
    expect(ask).toHaveBeenCalledTimes(1);
    expect(JSON.parse(String(ask.mock.calls[0]?.[1].body))).toEqual({
      plotId: 'plot-1',
      kind: 'after-sulfur',
      active: true,
    });
    answer(new Response(JSON.stringify({ id: 'rule-1' })));
    await waitFor(() => expect(changed).toHaveBeenCalledTimes(1));
  });

  it('fall back to what is saved when saving fails, with the sentence', async () => {
    vi.stubGlobal(
      'fetch',
      vi.fn(() =>
        Promise.resolve(new Response(JSON.stringify({ code: 'x', detail: 'It was not saved.' }), { status: 403 })),
      ),
    );
    render(<PlotRules siteId="site-1" plots={[[rule({})]]} mayEdit onChanged={() => Promise.resolve()} />);
    const box = screen.getByRole<HTMLInputElement>('checkbox', { name: 'After sulfur' });
    await userEvent.click(box);
    expect(await screen.findByText('It was not saved.')).toBeTruthy();
    expect(box.checked).toBe(false);
  });

  it('are only read by those who may not set them', () => {
    render(
      <PlotRules
        siteId="site-1"
        plots={[[rule({ active: true, dueOn: '2026-07-17', why: 'x' })]]}
        mayEdit={false}
        onChanged={() => Promise.resolve()}
      />,
    );
    expect(screen.queryAllByRole('checkbox')).toEqual([]);
    expect(screen.getByText('On')).toBeTruthy();
    expect(screen.getByText('Comes due 17 July 2026. x')).toBeTruthy();
  });
});
