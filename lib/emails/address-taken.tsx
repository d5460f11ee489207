import { ACCOUNT_FOOTER } from './footers';
import { letter, Paragraph, QuietLink, Step } from './frame';
import type { AddressTakenProps, Email } from './types';
import { greeting, plainLetter, webAddress } from './words';

export const addressTakenExample: AddressTakenProps = {
  name: 'Wren',
  signInUrl: 'https://loamline.example/sign-in',
  resetUrl: 'https://loamline.example/reset',
};

/** Sign-up answers the same for a known and an unknown address; the owner of a known one learns of it here. */
export async function addressTaken(props: AddressTakenProps): Promise<Email> {
  const signInUrl = webAddress(props.signInUrl);
  const resetUrl = webAddress(props.resetUrl);
  const hello = greeting(props.name);
  return letter({
    subject: 'You already have a Loamline account',
    preheader: 'Somebody tried to sign up with this address. Nothing was changed.',
    heading: 'You already have an account',
    text: plainLetter([
      hello,
      'Somebody tried to sign up at Loamline with this address. It already has an account, so no second one was made and nothing was changed.',
      `If it was you, sign in here:\n${signInUrl}`,
      `If you no longer know the password, choose a new one:\n${resetUrl}`,
      'If it was not you, you need do nothing. Whoever it was has learnt nothing about your account.',
      `-- \n${ACCOUNT_FOOTER}`,
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>
          Somebody tried to sign up at Loamline with this address. It already has an account, so no second one was made
          and nothing was changed.
        </Paragraph>
        <Step href={signInUrl}>Sign in</Step>
        <Paragraph>
          If you no longer know the password, <QuietLink href={resetUrl}>choose a new one</QuietLink>.
        </Paragraph>
        <Paragraph quiet>
          If it was not you, you need do nothing. Whoever it was has learnt nothing about your account.
        </Paragraph>
      </>
    ),
    footer: ACCOUNT_FOOTER,
  });
}
