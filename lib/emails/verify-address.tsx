import { ACCOUNT_FOOTER } from './footers';
import { letter, Paragraph, Step } from './frame';
import type { Email, VerifyAddressProps } from './types';
import { greeting, oneLine, plainLetter, webAddress } from './words';

export const verifyAddressExample: VerifyAddressProps = {
  name: 'Wren',
  verifyUrl: 'https://loamline.example/verify/3f9c1d',
  validFor: '24 hours',
};

/** Sent after sign-up, and again on request. */
export async function verifyAddress(props: VerifyAddressProps): Promise<Email> {
  const url = webAddress(props.verifyUrl);
  const hello = greeting(props.name);
  const validFor = oneLine(props.validFor);
  const why =
    'Somebody typed this address at Loamline. If that was not you, do nothing: without this step no account opens.';
  return letter({
    subject: 'Confirm your address for Loamline',
    preheader: `One step, then your first plot. The link works for ${validFor}.`,
    heading: 'Confirm your address',
    text: plainLetter([
      hello,
      'Open this page to confirm that this address is yours:',
      url,
      `The link works once, for ${validFor}. After that, ask for a new one on the sign-in page.`,
      `-- \n${why}`,
    ]),
    children: (
      <>
        <Paragraph>{hello}</Paragraph>
        <Paragraph>One step is left: confirm that this address is yours.</Paragraph>
        <Step href={url}>Confirm this address</Step>
        <Paragraph quiet>
          The link works once, for {validFor}. After that, ask for a new one on the sign-in page.
        </Paragraph>
      </>
    ),
    footer: `${why} ${ACCOUNT_FOOTER}`,
  });
}
