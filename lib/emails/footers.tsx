import { QuietLink } from './frame';

/** Mail about the account itself cannot be switched off; it says so. */
export const ACCOUNT_FOOTER = 'This mail is about your account, so it comes whatever your mail settings are.';

export function optionalFooterText(why: string, unsubscribeUrl: string, preferencesUrl: string): string {
  return [`-- `, `${why}`, `Stop these mails: ${unsubscribeUrl}`, `All mail settings: ${preferencesUrl}`].join('\n');
}

export function OptionalFooter({
  why,
  unsubscribeUrl,
  preferencesUrl,
}: {
  why: string;
  unsubscribeUrl: string;
  preferencesUrl: string;
}) {
  return (
    <>
      {why} <QuietLink href={unsubscribeUrl}>Stop these mails</QuietLink> {' · '}
      <QuietLink href={preferencesUrl}>All mail settings</QuietLink>
    </>
  );
}
