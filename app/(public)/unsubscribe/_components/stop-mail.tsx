'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';

type StopMailProps = { token: string; name: string; stopped: boolean };

/** Looking at the page changes nothing: scanners that follow every link in a letter end no subscription. */
export function StopMail({ token, name, stopped }: StopMailProps) {
  const { send, busy, problem } = useSubmit();
  const [done, setDone] = useState(false);
  if (done || stopped) {
    return (
      <div className="mt-6">
        <Notice
          tone="saved"
          title={done ? 'No more reminder mail' : 'Reminder mail is off already'}
          live={done}
          action={
            <LinkButton href="/account#mail" look="quiet">
              Open your settings
            </LinkButton>
          }
        >
          What is due still stands on your first page when you sign in. The mail can be switched on again in your
          settings.
        </Notice>
      </div>
    );
  }
  return (
    <div className="mt-4 grid gap-6">
      <p className="max-w-measure text-clay">
        This ends the reminders to {name} of plots that are due for a soil sample. The others on your sites still get
        theirs. Mail about your account, such as a new password, is not touched.
      </p>
      <ProblemNotice problem={problem} />
      <div>
        <Button
          busy={busy}
          busyLabel="Stopping the mail"
          onClick={async () => {
            const result = await send(`/mail/unsubscribe?token=${encodeURIComponent(token)}`);
            if (result.ok) setDone(true);
          }}
        >
          Stop reminder mail
        </Button>
      </div>
    </div>
  );
}
