import { Facts, QuietLink } from './frame';
import type { ReminderItem } from './types';
import { oneLine, webAddress } from './words';

export const WHY_REMINDED = 'You get this because a reminder rule of the plot names you.';

/** The words of one due sample, with user text made safe for one line. */
export function calmItem(item: ReminderItem): ReminderItem {
  return {
    plotName: oneLine(item.plotName),
    siteName: oneLine(item.siteName),
    dueOn: oneLine(item.dueOn),
    because: oneLine(item.because, 200),
    sampleLikeThis: oneLine(item.sampleLikeThis, 200),
    plotUrl: webAddress(item.plotUrl),
    alreadySampledUrl: webAddress(item.alreadySampledUrl),
    snoozeUrl: webAddress(item.snoozeUrl),
  };
}

export function itemFactsText(item: ReminderItem): string {
  return [`Why now: ${item.because}`, `Sample like this: ${item.sampleLikeThis}`].join('\n');
}

export function itemLinksText(item: ReminderItem): string {
  return [
    `Open the plot: ${item.plotUrl}`,
    `Already sampled: ${item.alreadySampledUrl}`,
    `Ask again in 2 weeks: ${item.snoozeUrl}`,
  ].join('\n');
}

export function ItemFacts({ item }: { item: ReminderItem }) {
  return (
    <Facts
      rows={[
        ['Due', item.dueOn],
        ['Why now', item.because],
        ['Like this', item.sampleLikeThis],
      ]}
    />
  );
}

/** Both open a page that asks first: a mail scanner that follows links changes nothing. */
export function ItemLinks({ item }: { item: ReminderItem }) {
  return (
    <>
      <QuietLink href={item.alreadySampledUrl}>Already sampled</QuietLink>
      {' · '}
      <QuietLink href={item.snoozeUrl}>Ask again in 2 weeks</QuietLink>
    </>
  );
}

export const reminderItemExample: ReminderItem = {
  plotName: 'North bed',
  siteName: 'Tern Lane Growers',
  dueOn: '20 May 2026',
  because: 'sulfur was spread on 14 May 2025; its effect can be judged from now on',
  sampleLikeThis: '15 cores, 0 to 6 in, sent to the laboratory of last time, same method',
  plotUrl: 'https://loamline.example/sites/1/plots/2',
  alreadySampledUrl: 'https://loamline.example/reminders/5/sampled',
  snoozeUrl: 'https://loamline.example/reminders/5/snooze',
};
