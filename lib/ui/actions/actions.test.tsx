// @vitest-environment happy-dom
import { cleanup, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { type ApiResult, localProblem } from '../api';
import { AnnounceProvider, useAnnounce } from '../feedback/announce';
import { Button } from './button';
import { ConfirmButton } from './confirm-button';

afterEach(cleanup);

describe('Button', () => {
  it('keeps its place in the tab order while busy and ignores presses', async () => {
    const press = vi.fn();
    render(
      <Button busy busyLabel="Saving" onClick={press}>
        Save
      </Button>,
    );
    const button = screen.getByRole('button', { name: 'Saving' });
    await userEvent.tab();
    expect(document.activeElement).toBe(button);
    await userEvent.click(button);
    await userEvent.keyboard('{Enter}');
    expect(press).not.toHaveBeenCalled();
    expect(button.getAttribute('aria-busy')).toBe('true');
  });

  it('says why it cannot be pressed', async () => {
    const press = vi.fn();
    render(
      <Button unavailable="Two values have no unit" onClick={press}>
        Confirm
      </Button>,
    );
    const button = screen.getByRole('button', { name: 'Confirm (Two values have no unit)' });
    await userEvent.click(button);
    expect(press).not.toHaveBeenCalled();
  });
});

function Confirming({ answer }: { answer: () => Promise<ApiResult<unknown>> }) {
  return (
    <ConfirmButton
      title="Withdraw this report?"
      sentence="The file is kept."
      confirmLabel="Withdraw it"
      onConfirm={answer}
    >
      Withdraw
    </ConfirmButton>
  );
}

describe('ConfirmButton', () => {
  it('acts only after the question, once, and gives the focus back', async () => {
    const act = vi.fn(async () => ({ ok: true as const, status: 200, data: null }));
    render(<Confirming answer={act} />);
    const opener = screen.getByRole('button', { name: 'Withdraw' });
    await userEvent.click(opener);
    const dialog = screen.getByRole('dialog', { name: 'Withdraw this report?' });
    expect(act).not.toHaveBeenCalled();
    await userEvent.click(within(dialog).getByRole('button', { name: 'Withdraw it' }));
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(act).toHaveBeenCalledTimes(1);
    await waitFor(() => expect(document.activeElement).toBe(opener));
  });

  it('stays open with the refusal', async () => {
    render(<Confirming answer={async () => ({ ok: false, problem: localProblem('unreachable', 'POST') })} />);
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw' }));
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw it' }));
    expect(await screen.findByText('No connection')).toBeDefined();
    expect(screen.getByRole('dialog')).toBeDefined();
  });

  it('does nothing when left with Escape', async () => {
    const act = vi.fn(async () => ({ ok: true as const, status: 200, data: null }));
    render(<Confirming answer={act} />);
    await userEvent.click(screen.getByRole('button', { name: 'Withdraw' }));
    await userEvent.keyboard('{Escape}');
    await waitFor(() => expect(screen.queryByRole('dialog')).toBeNull());
    expect(act).not.toHaveBeenCalled();
  });
});

function Speaker() {
  const announce = useAnnounce();
  return (
    <>
      <button type="button" onClick={() => announce('Three values saved.', { tone: 'saved' })}>
        save
      </button>
      <button type="button" onClick={() => announce('Not saved.', { tone: 'error' })}>
        fail
      </button>
    </>
  );
}

describe('useAnnounce', () => {
  it('speaks politely, shows the message, and the same sentence twice is spoken twice', async () => {
    render(
      <AnnounceProvider>
        <Speaker />
      </AnnounceProvider>,
    );
    const polite = screen.getByTestId('announce-polite');
    await userEvent.click(screen.getByText('save'));
    const first = polite.textContent;
    expect(first?.trim()).toBe('Three values saved.');
    await userEvent.click(screen.getByText('save'));
    expect(polite.textContent?.trim()).toBe('Three values saved.');
    expect(polite.textContent).not.toBe(first);
    const shown = within(screen.getByRole('region', { name: 'Messages' }));
    expect(shown.getAllByText('Three values saved.')).toHaveLength(2);
    await userEvent.click(shown.getAllByRole('button', { name: 'Put this message away' })[0] ?? document.body);
    expect(shown.getAllByText('Three values saved.')).toHaveLength(1);
  });

  it('speaks an error at once', async () => {
    render(
      <AnnounceProvider>
        <Speaker />
      </AnnounceProvider>,
    );
    await userEvent.click(screen.getByText('fail'));
    expect(screen.getByTestId('announce-now').textContent?.trim()).toBe('Not saved.');
    expect(screen.getByTestId('announce-polite').textContent).toBe('');
  });
});
