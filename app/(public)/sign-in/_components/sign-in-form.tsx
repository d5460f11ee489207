'use client';

import Link from 'next/link';
import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { CheckField } from '@/lib/ui/fields/check-field';
import { Form } from '@/lib/ui/fields/form';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';

export function SignInForm({ next, email }: { next: string; email: string }) {
  const { send, busy, problem } = useSubmit();
  const [leaving, setLeaving] = useState(false);
  return (
    <>
      <Form
        problem={problem?.code === 'not-signed-in' ? { ...problem, title: 'Not signed in' } : problem}
        onSubmit={async (values) => {
          const body = {
            email: values.email ?? '',
            password: values.password ?? '',
            sharedComputer: values.sharedComputer === 'on',
          };
          const result = await send('session', { body });
          if (!result.ok) return;
          setLeaving(true);
          // A whole new page, so that nothing drawn for nobody stays in memory.
          window.location.assign(next);
        }}
      >
        <TextField name="email" label="E-mail address" type="email" autoComplete="username" defaultValue={email} />
        <PasswordField name="password" label="Password" autoComplete="current-password" />
        <CheckField
          name="sharedComputer"
          label="Others use this computer too"
          hint="Signs you out when the browser is closed, and after 12 hours in any case."
        />
        <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
          <Button type="submit" busy={busy || leaving} busyLabel="Signing in">
            Sign in
          </Button>
          <Link className="text-link inline-flex min-h-(--target) items-center" href="/reset">
            I do not know my password
          </Link>
        </div>
      </Form>
      <p className="mt-8 max-w-measure border-t border-horizon-5 pt-4 text-clay">
        Signed up and no mail came?{' '}
        <Link className="text-link" href="/verify">
          Ask for another
        </Link>
        . New here?{' '}
        <Link className="text-link" href="/sign-up">
          Make an account
        </Link>
        .
      </p>
    </>
  );
}
