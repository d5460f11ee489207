'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Form } from '@/lib/ui/fields/form';
import { PasswordField } from '@/lib/ui/fields/password-field';
import { TextField } from '@/lib/ui/fields/text-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { MailboxHint, Sent } from '../../_components/sent';

type Typed = { name: string; email: string; password: string };
type Answer = { email: string; ticket: string };
type SignUpProps = { mailboxUrl: string | null; invitation?: string; email?: string };

/** The browser knows the zone and the language; both can be changed in the settings. */
const surroundings = () => ({
  timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
  units: navigator.language === 'en-US' ? ('us' as const) : ('metric' as const),
});

export function SignUp({ mailboxUrl, invitation, email = '' }: SignUpProps) {
  const { send, busy, problem } = useSubmit<Answer>();
  const [typed, setTyped] = useState<Typed>({ name: '', email, password: '' });
  const [sent, setSent] = useState<Answer>();
  const [ticket, setTicket] = useState<string>();

  if (sent) {
    const change = () => {
      setTicket(sent.ticket);
      setSent(undefined);
    };
    return <LookForMail email={sent.email} mailboxUrl={mailboxUrl} onChange={change} />;
  }
  const submit = async (values: Record<string, string>) => {
    const next = { name: values.name ?? '', email: values.email ?? '', password: values.password ?? '' };
    setTyped(next);
    const extra = { ...(invitation ? { invitation } : {}), ...(ticket ? { replaces: ticket } : {}) };
    const result = await send('people', { body: { ...next, ...surroundings(), ...extra } });
    if (result.ok) setSent(result.data);
  };
  return (
    <Form problem={problem} onSubmit={submit}>
      <TextField
        name="name"
        label="Your name"
        hint="As the others on your sites will see it."
        autoComplete="name"
        defaultValue={typed.name}
      />
      <TextField name="email" label="E-mail address" type="email" autoComplete="username" defaultValue={typed.email} />
      <PasswordField
        name="password"
        label="Password"
        hint="At least 8 characters, of any kind; 15 or more are better. A few words in a row are good."
        autoComplete="new-password"
        defaultValue={typed.password}
      />
      <div>
        <Button type="submit" busy={busy} busyLabel="Making the account">
          Make the account
        </Button>
      </div>
    </Form>
  );
}

type LookForMailProps = { email: string; mailboxUrl: string | null; onChange: () => void };

function LookForMail({ email, mailboxUrl, onChange }: LookForMailProps) {
  const again = useSubmit<{ email: string }>();
  const [times, setTimes] = useState(0);
  const resend = async () => {
    const result = await again.send('people/verification/again', { body: { email } });
    if (result.ok) setTimes(times + 1);
  };
  return (
    <Sent title="One step left: look for our mail">
      <p>
        It went to <strong className="break-all">{email}</strong>. Open the link in it to confirm that the address is
        yours; it works for 24 hours.
      </p>
      <MailboxHint url={mailboxUrl} />
      <ProblemNotice problem={again.problem} />
      <p role="status" className="empty:hidden">
        {times > 0
          ? `Asked for again${times > 1 ? `, ${times} times` : ''}. Each of the links works until one is used.`
          : ''}
      </p>
      <div className="flex flex-wrap gap-3">
        <Button look="quiet" busy={again.busy} busyLabel="Sending" onClick={() => void resend()}>
          Send it again
        </Button>
        <Button look="plain" onClick={onChange}>
          This address is wrong
        </Button>
      </div>
      <p className="text-clay">Nothing there after a few minutes? Look among the unwanted mail.</p>
    </Sent>
  );
}
