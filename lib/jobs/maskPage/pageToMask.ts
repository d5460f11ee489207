import type { Page, Reading } from '@/lib/reading/types';
import type { Grey } from '@/lib/services/pictures/types';

/** A page with everything that is needed to hide what must not be shown. */
export type PageToMask = {
  readonly picture: Grey;
  /** Word by word, where it stands on the picture, as fractions of it. */
  readonly places: readonly { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number }[];
  readonly page: Page;
  /** All pages of the file whose words are known: a name on one of them is hidden on the others. */
  readonly pages: readonly Page[];
  readonly reading: Reading;
  readonly trace: { readonly pages: readonly object[] } | null;
  /** How the picture is turned to be shown, in degrees clockwise. */
  readonly turn: 0 | 90 | 180 | 270;
};
