'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { Form } from '@/lib/ui/fields/form';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { MailboxHint, Sent } from './sent';

type AgainFormProps = {
  path: 'people/reset' | 'people/verification/again';
  button: string;
  email?: string;
  mailboxUrl: string | null;
  /** What the mail will let them do. */
  said: string;
};

/** Asks for a mail. The answer is the same for every address, and so is the sentence. */
export function AgainForm({ path, button, email = '', mailboxUrl, said }: AgainFormProps) {
  const { send, busy, problem } = useSubmit<{ email: string }>();
  const [sentTo, setSentTo] = useState<string>();
  if (sentTo) {
    return (
      <Sent title="Look for our mail">
        <p>
          If <strong className="break-all">{sentTo}</strong> has an account that needs it, a mail is on its way. {said}
        </p>
        <MailboxHint url={mailboxUrl} />
        <p className="text-clay">
          Nothing there after a few minutes? Look among the unwanted mail, then{' '}
          <button type="button" className="text-link min-h-8" onClick={() => setSentTo(undefined)}>
            try once more
          </button>
          . A few an hour are sent, not more.
        </p>
      </Sent>
    );
  }
  return (
    <Form
      problem={problem}
      onSubmit={async (values) => {
        const result = await send(path, { body: { email: values.email ?? '' } });
        if (result.ok) setSentTo(result.data.email);
      }}
    >
      <TextField name="email" label="E-mail address" type="email" autoComplete="email" defaultValue={email} />
      <div>
        <Button type="submit" busy={busy} busyLabel="Sending">
          {button}
        </Button>
      </div>
    </Form>
  );
}
