/** Line breaks and other control characters, and the marks that turn the direction of writing around. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are exactly what must be found
const CONTROL = /[\u0000-\u001F\u007F-\u009F\u2028\u2029]/g;
const LINE_BREAK = /[\r\n\u0085\u2028\u2029]/;
const DIRECTION = /[\u202A-\u202E\u2066-\u2069]/g;
const LONGEST_SUBJECT = 180;
const LONGEST_NAME = 80;

export class UnsafeSubjectError extends Error {
  constructor() {
    super('A mail subject may not hold a line break: it could add headers of its own.');
    this.name = 'UnsafeSubjectError';
  }
}

/**
 * The one way to make a subject. A part with a line break is refused, not repaired: it never comes from a form of ours, so
 * somebody is trying something. Tabs become spaces, writing-direction marks go, very long subjects end in an ellipsis.
 */
export function subjectLine(...parts: readonly string[]): string {
  const text = parts.join('');
  if (LINE_BREAK.test(text)) throw new UnsafeSubjectError();
  const calm = text.replace(CONTROL, ' ').replace(DIRECTION, '').replace(/ {2,}/g, ' ').trim();
  return clip(calm, LONGEST_SUBJECT);
}

/** A user's words inside a sentence: one line, no hidden marks, not endless. */
export function oneLine(text: string, longest = LONGEST_NAME): string {
  return clip(text.replace(CONTROL, ' ').replace(DIRECTION, '').replace(/ {2,}/g, ' ').trim(), longest);
}

function clip(text: string, longest: number): string {
  const letters = Array.from(text);
  return letters.length <= longest ? text : `${letters.slice(0, longest - 1).join('')}…`;
}

/** Anyone can type any name at sign-up; one that reads like an address is not repeated to a stranger. */
export function greeting(name: string): string {
  const calm = oneLine(name, 60);
  const likeAddress = /:\/\/|www\.|@|\.[a-z]{2,}(?:\/|\b)/i.test(calm);
  return calm === '' || likeAddress ? 'Hello,' : `Hello ${calm},`;
}

/** Only absolute web addresses go into a mail. They are built by the sender from the configured origin. */
export function webAddress(url: string): string {
  const parsed = new URL(url);
  if (parsed.protocol !== 'https:' && parsed.protocol !== 'http:') {
    throw new TypeError('A link in a mail must be a web address.');
  }
  return parsed.href;
}

/** Paragraphs of a plain-text mail, one blank line between them, ending in a line break. */
export function plainLetter(paragraphs: readonly (string | null)[]): string {
  return `${paragraphs.filter((p): p is string => p !== null && p !== '').join('\n\n')}\n`;
}

/** "1 value", "18 values" */
export function count(n: number, one: string, many = `${one}s`): string {
  return `${n} ${n === 1 ? one : many}`;
}
