import { OptionalFooter, optionalFooterText } from './footers';
import { letter, Paragraph, Step } from './frame';
import {
  calmItem,
  ItemFacts,
  ItemLinks,
  itemFactsText,
  itemLinksText,
  reminderItemExample,
  WHY_REMINDED,
} from './reminder-parts';
import type { Email, ReminderDueProps } from './types';
import { greeting, plainLetter, subjectLine, webAddress } from './words';

export const reminderDueExample: ReminderDueProps = {
  name: 'Wren',
  item: reminderItemExample,
  unsubscribeUrl: 'https://loamline.example/mail/stop/ab12',
  preferencesUrl: 'https://loamline.example/account/mail',
};

/** One plot is due. A calendar file travels with it; the sender attaches that. */
export async function reminderDue(props: ReminderDueProps): Promise<Email> {
  // Before the words are calmed: a name with a line break must stop the mail, not slip through.
  const subject = subjectLine('Sample ', props.item.plotName, ', due ', props.item.dueOn);
  const item = calmItem(props.item);
  const unsubscribeUrl = webAddress(props.unsubscribeUrl);
  const preferencesUrl = webAddress(props.preferencesUrl);
  const hello = greeting(props.name);
  const what = `${item.plotName} (${item.siteName}) is due for a soil sample on ${item.dueOn}.`;
  const calendar = 'The day is attached as a calendar file.';
  return letter({
    subject,
    preheader: `${item.because}.`,
    heading: `Sample ${item.plotName}`,
    text: plainLetter([
      hello,
      what,
      itemFactsText(item),
      'Keep depth, laboratory and method as they were: otherwise the two tests cannot be compared.',
      itemLinksText(item),
      calendar,
      optionalFooterText(WHY_REMINDED, unsubscribeUrl, preferencesUrl),
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>{what}</Paragraph>
        <ItemFacts item={item} />
        <Paragraph>
          Keep depth, laboratory and method as they were: otherwise the two tests cannot be compared.
        </Paragraph>
        <Step href={item.plotUrl}>Open the plot</Step>
        <Paragraph>
          <ItemLinks item={item} />
        </Paragraph>
        <Paragraph quiet>{calendar}</Paragraph>
      </>
    ),
    footer: <OptionalFooter why={WHY_REMINDED} unsubscribeUrl={unsubscribeUrl} preferencesUrl={preferencesUrl} />,
  });
}
