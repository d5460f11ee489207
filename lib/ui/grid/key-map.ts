/**
 * The keyboard map as data: a key press and the mode give a command, or null when the key is left to the browser.
 * Moving keys follow the data-grid pattern of the ARIA Authoring Practices Guide; the rest is spreadsheet habit.
 */
export type GridMode = 'moving' | 'editing';

export type MoveTarget =
  | 'up'
  | 'down'
  | 'left'
  | 'right'
  | 'row-start'
  | 'row-end'
  | 'grid-start'
  | 'grid-end'
  | 'page-up'
  | 'page-down';

export type GridCommand =
  | { readonly kind: 'move'; readonly to: MoveTarget; readonly extend: boolean }
  | { readonly kind: 'edit'; readonly replaceWith: string | null }
  | { readonly kind: 'commit'; readonly leave: 'down' | 'next' | 'previous' | 'stay' }
  | { readonly kind: 'cancel' }
  | { readonly kind: 'clear-selection' }
  | { readonly kind: 'select'; readonly what: 'all' | 'row' | 'column' }
  | { readonly kind: 'clear-cells' }
  | { readonly kind: 'undo' }
  | { readonly kind: 'redo' }
  | { readonly kind: 'fill-down' }
  | { readonly kind: 'accept-doubt' };

export interface KeyPress {
  readonly key: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly shiftKey: boolean;
  readonly altKey: boolean;
}

const ARROWS: Readonly<Record<string, MoveTarget>> = {
  ArrowUp: 'up',
  ArrowDown: 'down',
  ArrowLeft: 'left',
  ArrowRight: 'right',
};

function editingCommand(press: KeyPress): GridCommand | null {
  if (press.key === 'Enter') return { kind: 'commit', leave: 'down' };
  if (press.key === 'F2') return { kind: 'commit', leave: 'stay' };
  if (press.key === 'Escape') return { kind: 'cancel' };
  if (press.key === 'Tab') return { kind: 'commit', leave: press.shiftKey ? 'previous' : 'next' };
  return null;
}

function withCommandKey(press: KeyPress): GridCommand | null {
  if (press.key === 'Home') return { kind: 'move', to: 'grid-start', extend: press.shiftKey };
  if (press.key === 'End') return { kind: 'move', to: 'grid-end', extend: press.shiftKey };
  if (press.key === ' ') return { kind: 'select', what: 'column' };
  if (press.key === 'Enter') return { kind: 'accept-doubt' };
  const letter = press.key.toLowerCase();
  if (letter === 'a') return { kind: 'select', what: 'all' };
  if (letter === 'z') return press.shiftKey ? { kind: 'redo' } : { kind: 'undo' };
  if (letter === 'y') return { kind: 'redo' };
  if (letter === 'd') return { kind: 'fill-down' };
  // Copy, cut and paste come as clipboard events.
  return null;
}

function plainCommand(press: KeyPress): GridCommand | null {
  const arrow = ARROWS[press.key];
  if (arrow) return { kind: 'move', to: arrow, extend: press.shiftKey };
  switch (press.key) {
    case 'Home':
      return { kind: 'move', to: 'row-start', extend: press.shiftKey };
    case 'End':
      return { kind: 'move', to: 'row-end', extend: press.shiftKey };
    case 'PageUp':
      return { kind: 'move', to: 'page-up', extend: press.shiftKey };
    case 'PageDown':
      return { kind: 'move', to: 'page-down', extend: press.shiftKey };
    case 'Enter':
    case 'F2':
      return { kind: 'edit', replaceWith: null };
    case 'Escape':
      return { kind: 'clear-selection' };
    case 'Delete':
    case 'Backspace':
      return { kind: 'clear-cells' };
    case ' ':
      return press.shiftKey ? { kind: 'select', what: 'row' } : null;
    default:
      return [...press.key].length === 1 ? { kind: 'edit', replaceWith: press.key } : null;
  }
}

export function commandFor(press: KeyPress, mode: GridMode): GridCommand | null {
  if (press.altKey) return null;
  if (mode === 'editing') return press.ctrlKey || press.metaKey ? null : editingCommand(press);
  if (press.ctrlKey || press.metaKey) return withCommandKey(press);
  // Tab is not in the map: it leaves the grid.
  return plainCommand(press);
}
