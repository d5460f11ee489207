const LONGEST = 500_000;

/** Why this text cannot be a report, in a sentence; null when it may be one. */
export function pastedFault(text: string): string | null {
  if (text.trim() === '') return 'Paste the text of the mail here first.';
  if (!/\d/.test(text)) return 'There is no number in this text. Paste the part of the mail with the values.';
  if (text.length > LONGEST)
    return 'This is longer than any mail with a soil test. Paste only the part with the values.';
  return null;
}

/** The text as it was pasted, under a name that says where it came from. */
export function pastedFile(text: string, today: string): File {
  return new File([text], `pasted ${today}.txt`, { type: 'text/plain' });
}
