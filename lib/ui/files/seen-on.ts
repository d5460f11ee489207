/** "3 May 2026", in the zone of the person's device: a moment of their own past. */
export const seenOn = (moment: string): string =>
  new Date(moment).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
