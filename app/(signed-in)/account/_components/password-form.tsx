'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { CheckField } from '@/lib/ui/fields/check-field';
import { Form } from '@/lib/ui/fields/form';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { useSubmit } from '@/lib/ui/use-submit';

export function PasswordForm({ email }: { email: string }) {
  const { send, busy, problem } = useSubmit();
  const [round, setRound] = useState(0);
  const announce = useAnnounce();
  return (
    <Form
      key={round}
      problem={problem}
      onSubmit={async (values) => {
        const body = {
          currentPassword: values.currentPassword ?? '',
          password: values.password ?? '',
          endOtherSessions: values.endOtherSessions === 'on',
        };
        const result = await send('people/me/password', { body });
        if (!result.ok) return;
        announce('The new password is set. A mail about it is on its way to you.', { tone: 'saved' });
        setRound(round + 1);
      }}
    >
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <PasswordField name="currentPassword" label="Current password" autoComplete="current-password" />
      <PasswordField
        name="password"
        label="New password"
        hint="At least 8 characters, of any kind; 15 or more are better."
        autoComplete="new-password"
      />
      <CheckField name="endOtherSessions" label="Sign out my other devices" defaultChecked />
      <div>
        <Button type="submit" busy={busy} busyLabel="Setting it">
          Set the new password
        </Button>
      </div>
    </Form>
  );
}
