// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Button } from '../actions/button';
import { DropZone } from './drop-zone';
import { FileButton } from './file-button';
import { refusedSentence } from './refused';

afterEach(cleanup);

const pdf = (name: string, bytes: number) => new File(['x'.repeat(bytes)], name, { type: 'application/pdf' });

function zone(onFiles: (files: File[]) => void, onRefused: (files: unknown[]) => void) {
  return (
    <DropZone
      accept={{ 'application/pdf': ['.pdf'] }}
      maxBytes={100}
      overLabel="Let go to send it"
      onFiles={onFiles}
      onRefused={onRefused}
    >
      {({ open }) => <Button onClick={open}>Pick a file</Button>}
    </DropZone>
  );
}

describe('DropZone', () => {
  it('takes a drop anywhere on the card and sorts out what it cannot send', async () => {
    const taken = vi.fn();
    const refused = vi.fn();
    const { container } = render(zone(taken, refused));
    const files = [
      pdf('spring.pdf', 10),
      pdf('scan.pdf', 500),
      new File(['x'], 'notes.exe', { type: 'application/x-msdownload' }),
    ];
    const card = container.firstElementChild;
    if (!card) throw new Error('no card');
    const data = {
      files,
      items: files.map((file) => ({ kind: 'file', type: file.type, getAsFile: () => file })),
      types: ['Files'],
    };
    fireEvent.drop(card, { dataTransfer: data });
    await waitFor(() => expect(taken).toHaveBeenCalled());
    expect(taken.mock.calls[0]?.[0].map((file: File) => file.name)).toEqual(['spring.pdf']);
    expect(refused.mock.calls[0]?.[0]).toEqual([
      { name: 'scan.pdf', reason: 'too-large' },
      { name: 'notes.exe', reason: 'wrong-type' },
    ]);
  });

  it('has one stop for the keyboard, the button, and no style attribute', async () => {
    const { container } = render(zone(vi.fn(), vi.fn()));
    await userEvent.tab();
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Pick a file' }));
    await userEvent.tab();
    expect(document.activeElement).toBe(document.body);
    expect(container.querySelectorAll('[style]')).toHaveLength(0);
  });
});

describe('FileButton', () => {
  it('hands over the same file twice in a row', async () => {
    const taken = vi.fn();
    const { container } = render(<FileButton onFiles={taken}>Pick</FileButton>);
    const input = container.querySelector('input');
    if (!input) throw new Error('no input');
    await userEvent.upload(input, pdf('spring.pdf', 10));
    await userEvent.upload(input, pdf('spring.pdf', 10));
    expect(taken).toHaveBeenCalledTimes(2);
  });
});

describe('refusedSentence', () => {
  it('names the file, the limit and what to do', () => {
    const said = refusedSentence({ name: 'scan.pdf', reason: 'too-large' }, 'PDF and CSV', 20 * 1024 * 1024);
    expect(said).toContain('scan.pdf');
    expect(said).toContain('20 MB');
    expect(said).toContain('try again');
  });
});
