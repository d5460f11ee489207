'use client';

import { type KeyboardEvent, type RefObject, useCallback, useRef, useState } from 'react';

export type Rows = {
  selected: ReadonlySet<string>;
  active: number;
  setSelected: (ids: Iterable<string>) => void;
  toggle: (at: number, extend: boolean) => void;
  onKeyDown: (event: KeyboardEvent) => void;
  focusActive: () => void;
  grid: RefObject<HTMLTableElement | null>;
};

const within = (at: number, count: number) => Math.max(0, Math.min(count - 1, at));

/**
 * Rows chosen with keys or pointer, one tab stop for all of them: arrows move, Shift and an arrow or a click stretches
 * the choice, the space bar adds or takes off one, Ctrl+A takes all, Escape none, Enter goes on with what is chosen.
 */
export function useRows(ids: readonly string[], onEnter: () => void): Rows {
  const [selected, choose] = useState<ReadonlySet<string>>(new Set());
  const [active, setActive] = useState(0);
  const anchor = useRef(0);
  const grid = useRef<HTMLTableElement>(null);

  const focusRow = useCallback((at: number) => {
    grid.current?.querySelector<HTMLElement>(`[data-row="${at}"]`)?.focus();
  }, []);
  const stretch = (to: number) => {
    const [from, until] = [Math.min(anchor.current, to), Math.max(anchor.current, to)];
    choose(new Set([...selected, ...ids.slice(from, until + 1)]));
  };
  const move = (to: number, extend: boolean) => {
    const at = within(to, ids.length);
    if (extend) stretch(at);
    else anchor.current = at;
    setActive(at);
    focusRow(at);
  };
  const toggle = (at: number, extend: boolean) => {
    setActive(at);
    if (extend) return stretch(at);
    anchor.current = at;
    const id = ids[at];
    if (id === undefined) return;
    const next = new Set(selected);
    if (!next.delete(id)) next.add(id);
    choose(next);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const { key, shiftKey, altKey } = event;
    const command = event.ctrlKey || event.metaKey;
    if (altKey) return;
    const steps: Record<string, number> = {
      ArrowUp: active - 1,
      ArrowDown: active + 1,
      PageUp: active - 10,
      PageDown: active + 10,
      Home: 0,
      End: ids.length - 1,
    };
    const to = steps[key];
    if (to !== undefined && !command) move(to, shiftKey);
    else if (key === ' ') toggle(active, shiftKey);
    else if (command && key.toLowerCase() === 'a') choose(new Set(ids));
    else if (key === 'Escape') choose(new Set());
    else if (key === 'Enter') {
      const id = ids[active];
      if (selected.size === 0 && id !== undefined) choose(new Set([id]));
      onEnter();
    } else return;
    event.preventDefault();
  };
  return {
    selected,
    active: within(active, ids.length),
    setSelected: (list) => choose(new Set(list)),
    toggle,
    onKeyDown,
    focusActive: () => focusRow(within(active, ids.length)),
    grid,
  };
}
