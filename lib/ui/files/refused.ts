export type RefusedFile = { name: string; reason: 'wrong-type' | 'too-large' | 'one-at-a-time' };

const megabytes = (bytes: number) => `${Math.round((bytes / 1024 / 1024) * 10) / 10} MB`;

/** A sentence for each file that was not taken: what happened, what was kept, what to do next. */
export function refusedSentence(file: RefusedFile, kinds: string, maxBytes: number): string {
  switch (file.reason) {
    case 'too-large':
      return `${file.name} is larger than ${megabytes(maxBytes)} and was not sent. Save the report's pages alone, or a smaller scan, and try again.`;
    case 'wrong-type':
      return `${file.name} was not sent: this takes ${kinds}. Your file is unchanged.`;
    case 'one-at-a-time':
      return `${file.name} was not sent: this takes one file at a time. Send it after the first.`;
  }
}
