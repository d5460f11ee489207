export type Tone = 'info' | 'look' | 'error' | 'saved';

/** The word that always stands beside the mark, so that colour never carries the meaning alone. */
export const toneWord: Record<Tone, string> = {
  info: 'Note',
  look: 'Look at this',
  error: 'Not done',
  saved: 'Saved',
};
