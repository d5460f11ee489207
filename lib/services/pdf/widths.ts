/**
 * Relative advance widths of a plain sans-serif, in thousandths of the type size. A text run of a PDF gives only the
 * width of the whole run; these share it out over its characters, so that each word of the run gets its own place.
 */
const NARROW = new Map<string, number>([
  [' ', 278],
  ['!', 278],
  ['"', 355],
  ["'", 191],
  ['(', 333],
  [')', 333],
  ['*', 389],
  ['+', 584],
  [',', 278],
  ['-', 333],
  ['.', 278],
  ['/', 278],
  [':', 278],
  [';', 278],
  ['<', 584],
  ['=', 584],
  ['>', 584],
  ['?', 556],
  ['%', 889],
  ['&', 667],
  ['[', 278],
  [']', 278],
  ['|', 260],
  ['f', 278],
  ['i', 222],
  ['j', 222],
  ['l', 222],
  ['r', 333],
  ['t', 278],
  ['m', 833],
  ['w', 722],
  ['c', 500],
  ['k', 500],
  ['s', 500],
  ['v', 500],
  ['x', 500],
  ['y', 500],
  ['z', 500],
  ['I', 278],
  ['J', 500],
  ['M', 833],
  ['W', 944],
  ['L', 556],
  ['T', 611],
  ['F', 611],
  ['Z', 611],
  ['G', 778],
  ['O', 778],
  ['Q', 778],
  ['C', 722],
  ['D', 722],
  ['H', 722],
  ['N', 722],
  ['R', 722],
  ['U', 722],
  ['@', 1015],
]);

/** Width of one character relative to the others of its run; `even` for type in which all are as wide. */
export function relativeWidth(character: string, even: boolean): number {
  if (even) return 600;
  const known = NARROW.get(character);
  if (known !== undefined) return known;
  return character >= 'A' && character <= 'Z' ? 667 : 556;
}
