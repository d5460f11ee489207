import { OptionalFooter, optionalFooterText } from './footers';
import { letter, Paragraph, Step } from './frame';
import type { BatchReadyProps, Email } from './types';
import { count, greeting, oneLine, plainLetter, subjectLine, webAddress } from './words';

export const batchReadyExample: BatchReadyProps = {
  name: 'Wren',
  siteName: 'Tern Lane Growers',
  sentOn: '1 December 2026',
  files: 40,
  toReview: 36,
  samples: 112,
  notRead: 3,
  notTaken: 1,
  missing: 0,
  batchUrl: 'https://loamline.example/sites/1/reports/batches/7',
  unsubscribeUrl: 'https://loamline.example/mail/stop/ef56',
  preferencesUrl: 'https://loamline.example/account/mail',
};

const WHY = 'You get this because you asked to be told when these files are read.';

/** Many files sent at once: all of them have been read, or it is said what became of the rest. */
export async function batchReady(props: BatchReadyProps): Promise<Email> {
  const { toReview, notRead, notTaken, missing } = props;
  const files = count(props.files, 'file');
  const url = webAddress(props.batchUrl);
  const unsubscribeUrl = webAddress(props.unsubscribeUrl);
  const preferencesUrl = webAddress(props.preferencesUrl);
  const hello = greeting(props.name);
  const site = oneLine(props.siteName);
  const first = `The ${files} you sent to ${site} on ${oneLine(props.sentOn)} have been gone through.`;
  const ready =
    toReview === 0
      ? 'None of them waits to be reviewed.'
      : `${count(toReview, 'report')} with ${count(props.samples, 'sample')} ${toReview === 1 ? 'waits' : 'wait'} to be compared with the page. Nothing counts as a result before you confirm it.`;
  const rest = [
    notRead > 0 ? `${count(notRead, 'file')} could not be read; kept, to be typed in beside the page.` : '',
    notTaken > 0 ? `${count(notTaken, 'file')} not taken; the list says why.` : '',
    missing > 0 ? `${count(missing, 'file')} never arrived; choose them again on the list.` : '',
  ].filter((sentence) => sentence !== '');
  const step = toReview === 0 ? 'See the list' : 'Review one after another';
  return letter({
    subject: subjectLine(`${toReview} of ${props.files} reports ready to review: `, site),
    preheader: ready,
    heading: 'Your files have been read',
    text: plainLetter([
      hello,
      first,
      ready,
      ...rest,
      `${step}:\n${url}`,
      optionalFooterText(WHY, unsubscribeUrl, preferencesUrl),
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>{first}</Paragraph>
        <Paragraph>{ready}</Paragraph>
        {rest.map((sentence) => (
          <Paragraph key={sentence}>{sentence}</Paragraph>
        ))}
        <Step href={url}>{step}</Step>
      </>
    ),
    footer: <OptionalFooter why={WHY} unsubscribeUrl={unsubscribeUrl} preferencesUrl={preferencesUrl} />,
  });
}
