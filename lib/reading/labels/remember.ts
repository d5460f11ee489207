/** Answers kept; a page asks the same few headings again and again. Emptied when full, so that it cannot grow. */
const MOST = 4_000;

/** The same pure function, with its answers remembered by their text. */
export function remembered<T>(answer: (text: string) => T): (text: string) => T {
  const known = new Map<string, { readonly answer: T }>();
  return (text) => {
    const before = known.get(text);
    if (before !== undefined) return before.answer;
    const now = { answer: answer(text) };
    if (known.size >= MOST) known.clear();
    known.set(text, now);
    return now.answer;
  };
}
