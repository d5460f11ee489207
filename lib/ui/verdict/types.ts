/** The seven verdicts of the effect check, word for word. */
export const VERDICT_WORDS = [
  'as intended',
  'short of it',
  'beyond it',
  'no change seen',
  'went the other way',
  'right way, size not settled',
  'cannot tell yet',
] as const;
export type VerdictWord = (typeof VERDICT_WORDS)[number];

/** Refusals are not verdicts: another kind of sample would cure them, more samples would not. */
export const REFUSAL_WORDS = ['not comparable', 'planned change too small to check', 'too early'] as const;
export type RefusalWord = (typeof REFUSAL_WORDS)[number];

export interface VerdictLineProps {
  readonly verdict: VerdictWord;
  /** One sentence with the numbers: "pH fell by 0.46 (0.32 to 0.60); 0.5 was planned." */
  readonly sentence: string;
  /** Only where untreated plots were sampled too: "compared with the untreated plots". */
  readonly comparedWith?: string;
  /** What would settle an open verdict. Expected for "cannot tell yet" and "right way, size not settled". */
  readonly settledBy?: string;
  readonly size?: 'normal' | 'small';
}

export interface RefusalBoxProps {
  readonly refusal: RefusalWord | 'no verdict';
  readonly reason: string;
  /** The date or the sample that would help. */
  readonly help: string;
  /** Both values stand side by side even when they may not be compared. */
  readonly values?: readonly { readonly label: string; readonly printed: string; readonly note?: string }[];
}
