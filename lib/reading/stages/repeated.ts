/**
 * Columns in groups that repeat one another ("found, target | found, target", "lb/acre, ppm | lb/acre, ppm"): a caption
 * over them belongs to a whole group. Empty when nothing repeats.
 */
export function repeatedGroups<T>(columns: readonly T[], words: (column: T) => string): T[][] {
  const said = columns.map((column) => ({ column, text: words(column).toLowerCase() }));
  const repeating = said.filter(({ text }) => text !== '' && said.filter((other) => other.text === text).length >= 2);
  const groups: { column: T; text: string }[][] = [];
  for (const one of repeating) {
    const last = groups[groups.length - 1];
    if (last === undefined || last.some((other) => other.text === one.text)) groups.push([one]);
    else last.push(one);
  }
  // A column without a partner (one unit only) may stand before, between or after the groups.
  const model = [...groups].sort((a, b) => b.length - a.length)[0];
  const again = groups.every((group) => group.every(({ text }) => model?.some((other) => other.text === text)));
  const wide = groups.filter((group) => group.length >= 2).length >= 2;
  return groups.length >= 2 && again && wide ? groups.map((group) => group.map(({ column }) => column)) : [];
}
