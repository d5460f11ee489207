'use client';

import { Button } from '@/lib/ui/actions/button';
import { Form } from '@/lib/ui/fields/form';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { useSubmit } from '@/lib/ui/use-submit';

export function NewPassword({ token, email }: { token: string; email: string }) {
  const { send, busy, problem } = useSubmit<{ email: string }>();
  return (
    <Form
      problem={problem}
      onSubmit={async (values) => {
        const result = await send('people/reset/password', { body: { token, password: values.password ?? '' } });
        if (result.ok) window.location.assign(`/sign-in?why=reset&email=${encodeURIComponent(result.data.email)}`);
      }}
    >
      <p>
        For <strong className="break-all">{email}</strong>. Setting it signs out every device.
      </p>
      {/* Password managers keep the new password with the address it belongs to. */}
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <PasswordField
        name="password"
        label="New password"
        hint="At least 8 characters, of any kind; 15 or more are better. A few words in a row are good."
        autoComplete="new-password"
      />
      <div>
        <Button type="submit" busy={busy} busyLabel="Setting it">
          Set the new password
        </Button>
      </div>
    </Form>
  );
}
