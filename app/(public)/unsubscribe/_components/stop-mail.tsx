'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';

/** Looking at the page changes nothing: scanners that follow every link in a letter end no subscription. */
export function StopMail({ token }: { token: string }) {
  const { send, busy, problem } = useSubmit();
  const [done, setDone] = useState(false);
  if (done) {
    return (
      <div className="mt-6">
        <Notice tone="saved" title="No more reminder mail" live>
          What is due still stands on your first page when you sign in. You can switch the mail on again under Account.
        </Notice>
      </div>
    );
  }
  return (
    <div className="mt-4 grid gap-6">
      <p className="max-w-measure text-clay">
        Reminders tell you when a plot is due for its next soil sample. Mail about your account, such as a new password,
        is not touched.
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
