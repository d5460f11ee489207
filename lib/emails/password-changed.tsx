import { ACCOUNT_FOOTER } from './footers';
import { letter, Paragraph, Step } from './frame';
import type { Email, PasswordChangedProps } from './types';
import { greeting, oneLine, plainLetter, webAddress } from './words';

export const passwordChangedExample: PasswordChangedProps = {
  name: 'Wren',
  changedAt: '1 December 2026, 08:12 (Europe/London)',
  signedOut: 'all',
  resetUrl: 'https://loamline.example/reset',
};

const SIGNED_OUT = {
  all: ' Every device was signed out.',
  others: ' Every other device was signed out.',
  none: '',
} as const;

export async function passwordChanged(props: PasswordChangedProps): Promise<Email> {
  const url = webAddress(props.resetUrl);
  const hello = greeting(props.name);
  const changedAt = oneLine(props.changedAt);
  const what = `The password of your Loamline account was changed on ${changedAt}.${SIGNED_OUT[props.signedOut]}`;
  return letter({
    subject: 'Your Loamline password was changed',
    preheader: `On ${changedAt}. If that was you, all is well.`,
    heading: 'Your password was changed',
    text: plainLetter([
      hello,
      what,
      'If that was you, all is well.',
      `If it was not you, choose a new password now; that signs everybody out:\n${url}`,
      `-- \n${ACCOUNT_FOOTER}`,
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>{what}</Paragraph>
        <Paragraph>
          If that was you, all is well. If it was not, choose a new password now; that signs everybody out.
        </Paragraph>
        <Step href={url}>It was not me</Step>
      </>
    ),
    footer: ACCOUNT_FOOTER,
  });
}
