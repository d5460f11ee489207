import { OptionalFooter, optionalFooterText } from './footers';
import { letter, Paragraph, Step } from './frame';
import type { Email, ReportReadyProps } from './types';
import { count, greeting, oneLine, plainLetter, subjectLine, webAddress } from './words';

export const reportReadyExample: ReportReadyProps = {
  name: 'Wren',
  fileName: 'spring-report.pdf',
  siteName: 'Tern Lane Growers',
  plotNames: ['North bed', 'Marrow ground', 'Leek trench'],
  sampledOn: '12 April 2026',
  outcome: { kind: 'read', values: 48, doubtful: 3 },
  reviewUrl: 'https://loamline.example/sites/1/reports/9',
  unsubscribeUrl: 'https://loamline.example/mail/stop/cd34',
  preferencesUrl: 'https://loamline.example/account/mail',
};

const WHY = 'You get this because you uploaded the report.';

/** "North bed", "North bed and 2 more" */
function plotsInShort(names: readonly string[]): string {
  const [first] = names;
  if (first === undefined) return '';
  return names.length === 1 ? first : `${first} and ${names.length - 1} more`;
}

/** The file has been read, or it could not be; either way it is kept and waits for a person. */
export async function reportReady(props: ReportReadyProps): Promise<Email> {
  const { outcome } = props;
  const read = outcome.kind === 'read';
  const plots = plotsInShort(props.plotNames);
  const about = [plots === '' ? props.fileName : plots, props.sampledOn].filter((p) => p !== null).join(', ');
  const subject = subjectLine(read ? 'Report ready to review: ' : 'Report could not be read: ', about);
  const url = webAddress(props.reviewUrl);
  const unsubscribeUrl = webAddress(props.unsubscribeUrl);
  const preferencesUrl = webAddress(props.preferencesUrl);
  const hello = greeting(props.name);
  const file = oneLine(props.fileName);
  const site = oneLine(props.siteName);
  const names = props.plotNames.map((n) => oneLine(n)).join(', ');
  const forPlots = names === '' ? '' : ` for ${names}`;
  const what = read
    ? `${file} (${site}) has been read: ${count(outcome.values, 'value')}${forPlots}.`
    : `${file} (${site}) could not be read. ${oneLine(outcome.sentence, 300)}`;
  const next = read
    ? `${doubtWords(outcome.doubtful)} Nothing counts as a result until you have compared it with the page and confirmed it.`
    : 'The file is kept. You can type its values in beside the page.';
  const step = read ? 'Review the report' : 'Type the values in';
  return letter({
    subject,
    preheader: read
      ? `${count(outcome.values, 'value')} found, ${outcome.doubtful} to look at closely.`
      : 'The file is kept.',
    heading: read ? 'A report is ready to review' : 'A report could not be read',
    text: plainLetter([hello, what, next, `${step}:\n${url}`, optionalFooterText(WHY, unsubscribeUrl, preferencesUrl)]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>{what}</Paragraph>
        <Paragraph>{next}</Paragraph>
        <Step href={url}>{step}</Step>
      </>
    ),
    footer: <OptionalFooter why={WHY} unsubscribeUrl={unsubscribeUrl} preferencesUrl={preferencesUrl} />,
  });
}

function doubtWords(doubtful: number): string {
  if (doubtful === 0) return 'None of them looks odd.';
  return doubtful === 1 ? 'One of them looks odd and stands first.' : `${doubtful} of them look odd and stand first.`;
}
