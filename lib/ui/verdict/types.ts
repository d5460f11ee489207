import type { NoVerdict, Verdict } from '../../domain/effects/types';

export interface VerdictLineProps {
  readonly verdict: Verdict;
  /** One sentence with the numbers: "pH fell by 0.46 (0.32 to 0.60); 0.5 was planned." */
  readonly sentence: string;
  /** Only where untreated plots were sampled too: "compared with the untreated plots". */
  readonly comparedWith?: string;
  /** What would settle an open verdict. Expected for "cannot tell yet" and "right way, size not settled". */
  readonly settledBy?: string;
  readonly size?: 'normal' | 'small';
}

export interface RefusalBoxProps {
  readonly refusal: NoVerdict;
  readonly reason: string;
  /** The date or the sample that would help. */
  readonly help: string;
  /** Both values stand side by side even when they may not be compared. */
  readonly values?: readonly { readonly label: string; readonly printed: string; readonly note?: string }[];
}
