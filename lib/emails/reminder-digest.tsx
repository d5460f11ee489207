import { OptionalFooter, optionalFooterText } from './footers';
import { letter, Paragraph, QuietLink } from './frame';
import {
  calmItem,
  ItemFacts,
  ItemLinks,
  itemFactsText,
  itemLinksText,
  reminderItemExample,
  WHY_REMINDED,
} from './reminder-parts';
import type { Email, ReminderDigestProps, ReminderItem } from './types';
import { count, greeting, oneLine, plainLetter, subjectLine, webAddress } from './words';

export const reminderDigestExample: ReminderDigestProps = {
  name: 'Wren',
  day: '20 May 2026',
  items: [
    reminderItemExample,
    {
      ...reminderItemExample,
      plotName: 'Marrow ground',
      dueOn: '24 May 2026',
      because: 'a year has passed since the test of 23 May 2025',
      plotUrl: 'https://loamline.example/sites/1/plots/3',
      alreadySampledUrl: 'https://loamline.example/reminders/6/sampled',
      snoozeUrl: 'https://loamline.example/reminders/6/snooze',
    },
  ],
  unsubscribeUrl: 'https://loamline.example/mail/stop/ab12',
  preferencesUrl: 'https://loamline.example/account/mail',
};

/** "North bed and Marrow ground", "North bed, Marrow ground and 3 more" */
function plotList(items: readonly ReminderItem[]): string {
  const [first, second] = items;
  if (first === undefined) return 'no plots';
  if (second === undefined) return first.plotName;
  if (items.length === 2) return `${first.plotName} and ${second.plotName}`;
  return `${first.plotName}, ${second.plotName} and ${items.length - 2} more`;
}

/** At most one reminder mail per person and day: several due plots share it. */
export async function reminderDigest(props: ReminderDigestProps): Promise<Email> {
  const subject = subjectLine('Samples due, ', props.day, ': ', plotList(props.items));
  const items = props.items.map(calmItem);
  const day = oneLine(props.day);
  const unsubscribeUrl = webAddress(props.unsubscribeUrl);
  const preferencesUrl = webAddress(props.preferencesUrl);
  const hello = greeting(props.name);
  const what = `${count(items.length, 'plot is', 'plots are')} due for a soil sample.`;
  const keep = 'Keep depth, laboratory and method as they were: otherwise the tests cannot be compared.';
  return letter({
    subject,
    preheader: items.map((i) => `${i.plotName}, ${i.dueOn}`).join('; '),
    heading: `Samples due, ${day}`,
    text: plainLetter([
      hello,
      what,
      ...items.map((item, index) =>
        [
          `${index + 1}. ${item.plotName} (${item.siteName}), due ${item.dueOn}`,
          itemFactsText(item),
          itemLinksText(item),
        ].join('\n'),
      ),
      keep,
      optionalFooterText(WHY_REMINDED, unsubscribeUrl, preferencesUrl),
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>{what}</Paragraph>
        {items.map((item) => (
          <div key={item.plotUrl} style={{ borderTop: '1px solid #85776A', padding: '14px 0 6px' }}>
            <Paragraph>
              <strong>
                <QuietLink href={item.plotUrl}>{item.plotName}</QuietLink>
              </strong>
              , {item.siteName}
            </Paragraph>
            <ItemFacts item={item} />
            <Paragraph>
              <ItemLinks item={item} />
            </Paragraph>
          </div>
        ))}
        <Paragraph quiet>{keep}</Paragraph>
      </>
    ),
    footer: <OptionalFooter why={WHY_REMINDED} unsubscribeUrl={unsubscribeUrl} preferencesUrl={preferencesUrl} />,
  });
}
