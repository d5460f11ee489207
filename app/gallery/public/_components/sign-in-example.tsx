'use client';

import { Button } from '@/lib/ui/actions/button';
import { Form } from '@/lib/ui/fields/form';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { TextField } from '@/lib/ui/fields/text-field';

export function SignInExample() {
  return (
    <Form className="mt-7" onSubmit={() => undefined}>
      <TextField name="email" type="email" label="E-mail address" autoComplete="username" />
      <PasswordField name="password" label="Password" autoComplete="current-password" />
      <div className="flex flex-wrap items-center gap-4">
        <Button type="submit">Sign in</Button>
        <a className="text-link flex min-h-(--target) items-center" href="#reset">
          Send me a new password link
        </a>
      </div>
    </Form>
  );
}
