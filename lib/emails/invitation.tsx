import { letter, Paragraph, QuietLink, Step } from './frame';
import type { Email, InvitationProps } from './types';
import { oneLine, plainLetter, subjectLine, webAddress } from './words';

export const invitationExample: InvitationProps = {
  inviterName: 'Marlow Finch',
  siteName: 'Tern Lane Growers',
  roleWords: 'a helper',
  roleMeaning: 'Helpers add samples, upload reports and record what was spread; they do not confirm results.',
  acceptUrl: 'https://loamline.example/invitation/77d0b2',
  declineUrl: 'https://loamline.example/invitation/77d0b2/decline',
  expiresOn: '15 December 2026',
};

/** May go to somebody who has no account yet. */
export async function invitation(props: InvitationProps): Promise<Email> {
  // Before the words are calmed: a name with a line break must stop the mail, not slip through.
  const subject = subjectLine(props.inviterName, ' asks you to join ', props.siteName);
  const acceptUrl = webAddress(props.acceptUrl);
  const declineUrl = webAddress(props.declineUrl);
  const inviter = oneLine(props.inviterName);
  const site = oneLine(props.siteName);
  const role = oneLine(props.roleWords);
  const meaning = oneLine(props.roleMeaning, 240);
  const expiresOn = oneLine(props.expiresOn);
  const what = `${inviter} asks you to join ${site} as ${role}.`;
  const about =
    'Loamline keeps the soil tests of a site: reports, what was spread, and whether it did what it was meant to.';
  const footer = `You get this once, because ${inviter} typed your address. If you do not know them, do nothing.`;
  return letter({
    subject,
    preheader: `As ${role}. The invitation stands until ${expiresOn}.`,
    heading: `Join ${site}`,
    text: plainLetter([
      'Hello,',
      `${what} ${meaning}`,
      about,
      `Look at the invitation and accept it here:\n${acceptUrl}`,
      `Say no, and it is gone:\n${declineUrl}`,
      `The invitation stands until ${expiresOn}. If you have no account yet, the page makes one.`,
      `-- \n${footer}`,
    ]),
    children: (
      <>
        <Paragraph>Hello,</Paragraph>
        <Paragraph>
          {what} {meaning}
        </Paragraph>
        <Paragraph>{about}</Paragraph>
        <Step href={acceptUrl}>Look at the invitation</Step>
        <Paragraph>
          Not for you? <QuietLink href={declineUrl}>Say no</QuietLink>, and it is gone.
        </Paragraph>
        <Paragraph quiet>
          The invitation stands until {expiresOn}. If you have no account yet, the page makes one.
        </Paragraph>
      </>
    ),
    footer,
  });
}
