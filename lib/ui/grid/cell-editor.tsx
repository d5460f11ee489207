'use client';

import { type FocusEvent, type KeyboardEvent, useEffect, useRef, useState } from 'react';
import { commandFor } from './key-map';
import type { GridColumn } from './types';

export type LeaveEditor = 'down' | 'next' | 'previous' | 'stay' | 'blur';

interface CellEditorProps {
  readonly column: GridColumn;
  readonly name: string;
  readonly value: string;
  /** The key that started the edit and replaces the value; null keeps the value. */
  readonly replaceWith: string | null;
  readonly onCommit: (value: string, leave: LeaveEditor, event: KeyboardEvent | null) => void;
  readonly onCancel: () => void;
}

/** The field inside a cell. Its text is its own, so that new rows from the server never reach it. */
export function CellEditor({ column, name, value, replaceWith, onCommit, onCancel }: CellEditorProps) {
  const [draft, setDraft] = useState(() => startOf(column, value, replaceWith));
  const input = useRef<HTMLInputElement>(null);
  const select = useRef<HTMLSelectElement>(null);
  const closed = useRef(false);

  useEffect(() => {
    closed.current = false;
    select.current?.focus();
    const field = input.current;
    if (!field) return;
    field.focus();
    field.setSelectionRange(field.value.length, field.value.length);
  }, []);

  const close = (leave: LeaveEditor, event: KeyboardEvent | null) => {
    if (closed.current) return;
    closed.current = true;
    onCommit(draft, leave, event);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    // Keys of the field stay in the field.
    event.stopPropagation();
    if (event.nativeEvent.isComposing) return;
    const command = commandFor(event, 'editing');
    if (command?.kind === 'cancel') {
      event.preventDefault();
      closed.current = true;
      onCancel();
    }
    if (command?.kind === 'commit') close(command.leave, event);
  };
  const onBlur = (event: FocusEvent) => {
    // The window itself losing the focus is no decision.
    if (event.relatedTarget === null && !document.hasFocus()) return;
    close('blur', null);
  };
  const shared = {
    'aria-label': name,
    onKeyDown,
    onBlur,
    className:
      'block w-full min-h-9 min-w-16 rounded-sm border border-gley bg-white px-1.5 font-figures text-base text-humus',
  };
  if (column.kind === 'select') {
    return (
      <select {...shared} ref={select} value={draft} onChange={(event) => setDraft(event.target.value)}>
        {column.options?.some((one) => one.value === draft) ? null : (
          <option value={draft}>{draft || '(empty)'}</option>
        )}
        {column.options?.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    );
  }
  return (
    <input
      {...shared}
      ref={input}
      type="text"
      inputMode={column.kind === 'number' ? 'decimal' : 'text'}
      autoComplete="off"
      spellCheck={false}
      value={draft}
      onChange={(event) => setDraft(event.target.value)}
    />
  );
}

function startOf(column: GridColumn, value: string, replaceWith: string | null): string {
  if (replaceWith === null) return value;
  if (column.kind !== 'select') return replaceWith;
  const letter = replaceWith.toLowerCase();
  return column.options?.find((one) => one.label.toLowerCase().startsWith(letter))?.value ?? value;
}
