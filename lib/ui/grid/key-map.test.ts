import { describe, expect, it } from 'vitest';
import { commandFor, type GridCommand, type GridMode, type KeyPress } from './key-map';

type Modifier = 'ctrl' | 'meta' | 'shift' | 'alt';

function press(key: string, ...modifiers: Modifier[]): KeyPress {
  return {
    key,
    ctrlKey: modifiers.includes('ctrl'),
    metaKey: modifiers.includes('meta'),
    shiftKey: modifiers.includes('shift'),
    altKey: modifiers.includes('alt'),
  };
}

type Line = readonly [mode: GridMode, press: KeyPress, command: GridCommand | null];

// Moving keys: ARIA Authoring Practices Guide, "Grid Pattern", keyboard interaction for data grids (W3C WAI).
const PUBLISHED: readonly Line[] = [
  ['moving', press('ArrowRight'), { kind: 'move', to: 'right', extend: false }],
  ['moving', press('ArrowLeft'), { kind: 'move', to: 'left', extend: false }],
  ['moving', press('ArrowDown'), { kind: 'move', to: 'down', extend: false }],
  ['moving', press('ArrowUp'), { kind: 'move', to: 'up', extend: false }],
  ['moving', press('PageDown'), { kind: 'move', to: 'page-down', extend: false }],
  ['moving', press('PageUp'), { kind: 'move', to: 'page-up', extend: false }],
  ['moving', press('Home'), { kind: 'move', to: 'row-start', extend: false }],
  ['moving', press('End'), { kind: 'move', to: 'row-end', extend: false }],
  ['moving', press('Home', 'ctrl'), { kind: 'move', to: 'grid-start', extend: false }],
  ['moving', press('End', 'ctrl'), { kind: 'move', to: 'grid-end', extend: false }],
  ['moving', press(' ', 'ctrl'), { kind: 'select', what: 'column' }],
  ['moving', press(' ', 'shift'), { kind: 'select', what: 'row' }],
  ['moving', press('a', 'ctrl'), { kind: 'select', what: 'all' }],
  ['moving', press('ArrowRight', 'shift'), { kind: 'move', to: 'right', extend: true }],
  ['moving', press('ArrowUp', 'shift'), { kind: 'move', to: 'up', extend: true }],
  ['moving', press('Enter'), { kind: 'edit', replaceWith: null }],
  ['moving', press('F2'), { kind: 'edit', replaceWith: null }],
  ['moving', press('7'), { kind: 'edit', replaceWith: '7' }],
  ['moving', press('<', 'shift'), { kind: 'edit', replaceWith: '<' }],
  ['editing', press('Escape'), { kind: 'cancel' }],
  ['editing', press('F2'), { kind: 'commit', leave: 'stay' }],
];

const SPREADSHEET_HABIT: readonly Line[] = [
  ['editing', press('Enter'), { kind: 'commit', leave: 'down' }],
  ['editing', press('Tab'), { kind: 'commit', leave: 'next' }],
  ['editing', press('Tab', 'shift'), { kind: 'commit', leave: 'previous' }],
  ['moving', press('Escape'), { kind: 'clear-selection' }],
  ['moving', press('Delete'), { kind: 'clear-cells' }],
  ['moving', press('Backspace'), { kind: 'clear-cells' }],
  ['moving', press('z', 'ctrl'), { kind: 'undo' }],
  ['moving', press('Z', 'meta', 'shift'), { kind: 'redo' }],
  ['moving', press('y', 'ctrl'), { kind: 'redo' }],
  ['moving', press('d', 'ctrl'), { kind: 'fill-down' }],
  ['moving', press('Enter', 'ctrl'), { kind: 'accept-doubt' }],
];

const LEFT_TO_THE_BROWSER: readonly Line[] = [
  ['moving', press('Tab'), null],
  ['moving', press('Tab', 'shift'), null],
  ['moving', press('c', 'ctrl'), null],
  ['moving', press('v', 'meta'), null],
  ['moving', press('n', 'alt'), null],
  ['moving', press('F5'), null],
  ['editing', press('ArrowLeft'), null],
  ['editing', press('Home'), null],
  ['editing', press('Delete'), null],
  ['editing', press('z', 'ctrl'), null],
  ['editing', press('5'), null],
];

describe('keyboard map', () => {
  it.each([...PUBLISHED, ...SPREADSHEET_HABIT, ...LEFT_TO_THE_BROWSER])('%s %o', (mode, key, command) => {
    expect(commandFor(key, mode)).toEqual(command);
  });
});
