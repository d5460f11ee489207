import { ACCOUNT_FOOTER } from './footers';
import { letter, Paragraph, Step } from './frame';
import type { Email, ResetPasswordProps } from './types';
import { greeting, oneLine, plainLetter, webAddress } from './words';

export const resetPasswordExample: ResetPasswordProps = {
  name: 'Wren',
  resetUrl: 'https://loamline.example/reset/9ab27e',
  validFor: '30 minutes',
};

export async function resetPassword(props: ResetPasswordProps): Promise<Email> {
  const url = webAddress(props.resetUrl);
  const hello = greeting(props.name);
  const validFor = oneLine(props.validFor);
  const unasked = 'If you did not ask for this, do nothing: your password stays as it is.';
  return letter({
    subject: 'Choose a new password for Loamline',
    preheader: `The link works once, for ${validFor}. Not asked for? Then nothing changes.`,
    heading: 'Choose a new password',
    text: plainLetter([
      hello,
      'Somebody asked for a new password for your Loamline account. Choose it here:',
      url,
      `The link works once, for ${validFor}. When the new password is set, every device is signed out.`,
      unasked,
      `-- \n${ACCOUNT_FOOTER}`,
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>Somebody asked for a new password for your Loamline account.</Paragraph>
        <Step href={url}>Choose a new password</Step>
        <Paragraph>
          The link works once, for {validFor}. When the new password is set, every device is signed out.
        </Paragraph>
        <Paragraph quiet>{unasked}</Paragraph>
      </>
    ),
    footer: ACCOUNT_FOOTER,
  });
}
