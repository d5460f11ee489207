'use client';

import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { callApi } from '@/lib/ui/api';

export function SignOutEverywhere() {
  return (
    <div className="grid max-w-measure justify-items-start gap-4">
      <p>Left yourself signed in somewhere? Every device, this one too, then needs the password again.</p>
      <ConfirmButton
        title="Sign out everywhere?"
        sentence="Nothing you saved is lost. What is typed and not yet saved, here or on another device, is."
        confirmLabel="Sign out everywhere"
        busyLabel="Signing out"
        onConfirm={async () => {
          const result = await callApi('people/me/sessions', { method: 'DELETE' });
          if (result.ok) window.location.assign('/sign-in?why=everywhere');
          return result;
        }}
      >
        Sign out everywhere
      </ConfirmButton>
    </div>
  );
}
