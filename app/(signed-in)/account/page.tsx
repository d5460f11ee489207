import type { Metadata } from 'next';
import { pagePerson } from '@/app/_server/context';
import { getMailPreferences } from '@/lib/data/mail/preferences';
import { getMe } from '@/lib/data/people/getMe';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { timeZoneOptions } from '../_components/places';
import { MailPreferences } from './_components/mail-preferences';
import { PasswordForm } from './_components/password-form';
import { SettingsForm } from './_components/settings-form';
import { SignOutEverywhere } from './_components/sign-out-everywhere';

export const metadata: Metadata = { title: 'Your settings' };

export default async function AccountPage() {
  const { ctx } = await pagePerson('/account');
  const me = await getMe({ ctx, input: {} });
  const mail = await getMailPreferences({ ctx, input: {} });
  return (
    <>
      <PageTitle title="Your settings" lead={me.email} />
      <Stretch title="How Loamline speaks to you">
        <SettingsForm me={me} zones={timeZoneOptions(me.timeZone)} />
      </Stretch>
      <Stretch title="Mail" id="mail">
        <MailPreferences first={mail} />
      </Stretch>
      <Stretch title="Password" ground="white">
        <PasswordForm email={me.email} />
      </Stretch>
      <Stretch title="Devices">
        <SignOutEverywhere />
      </Stretch>
    </>
  );
}
