import type { Grey, Ink } from './types';

/** A break in a line this long is still the same line. */
const GAP = 3;

/**
 * Long thin strokes made white: table rules, boxes and underlines. A stroke is a run of at least `length` points no
 * thicker than `thick`; where a letter crosses it, the letter's points stay.
 */
function wipe(grey: Uint8Array, ink: Ink, length: number, thick: number, across: boolean): number {
  const { width, height, data } = ink;
  const [lines, along] = across ? [height, width] : [width, height];
  const [stepLine, stepAlong] = across ? [width, 1] : [1, width];
  let wiped = 0;
  for (let line = 0; line < lines; line++) {
    let [start, last] = [-1, -1];
    for (let at = 0; at <= along; at++) {
      const on = at < along && data[line * stepLine + at * stepAlong] === 1;
      if (on) {
        if (start < 0) start = at;
        last = at;
        continue;
      }
      if (start < 0 || (at < along && at - last <= GAP)) continue;
      if (last - start + 1 >= length) {
        for (let k = start; k <= last; k++) {
          let [low, high] = [line, line];
          while (low > 0 && line - low <= thick && data[(low - 1) * stepLine + k * stepAlong] === 1) low -= 1;
          while (high < lines - 1 && high - line <= thick && data[(high + 1) * stepLine + k * stepAlong] === 1)
            high += 1;
          if (high - low + 1 > thick) continue;
          // One point more on each side: the soft edge of the stroke.
          for (let l = Math.max(0, low - 2); l <= Math.min(lines - 1, high + 2); l++) {
            const place = l * stepLine + k * stepAlong;
            if (l < low || l > high) {
              if (data[place] === 1) continue;
            }
            grey[place] = 255;
          }
          wiped += 1;
        }
      }
      start = -1;
    }
  }
  return wiped;
}

/** The picture without ruling lines. `type` is the usual height of its letters, in points. */
export function withoutRules(picture: Grey, ink: Ink, type: number): Grey {
  const data = Uint8Array.from(picture.data);
  const thick = Math.max(3, Math.round(type * 0.3));
  wipe(data, ink, Math.round(type * 4.5), thick, true);
  wipe(data, ink, Math.round(type * 3), thick, false);
  return { ...picture, data };
}
