'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';
import { Sent } from '../../../_components/sent';

type Answer = { email: string; invitation: 'none' | 'accepted' | 'gone'; siteId: string | null };

export function ConfirmAddress({ token, email, name }: { token: string; email: string; name: string }) {
  const { send, busy, problem } = useSubmit<Answer>();
  const [done, setDone] = useState<Answer>();
  if (done) {
    const next = done.siteId ? `/sites/${done.siteId}` : '/today';
    return (
      <Sent title="Confirmed">
        <p>
          {done.invitation === 'accepted'
            ? 'You are a member of the site that invited you. Sign in with the password you chose.'
            : 'Sign in with the password you chose.'}
        </p>
        {done.invitation === 'gone' ? (
          <Notice tone="look" title="The invitation could not be accepted">
            It was answered or taken back meanwhile, or it is for another address. Your account is ready all the same;
            ask for a new invitation.
          </Notice>
        ) : null}
        <div>
          <LinkButton
            href={`/sign-in?why=confirmed&email=${encodeURIComponent(done.email)}&next=${encodeURIComponent(next)}`}
          >
            Sign in
          </LinkButton>
        </div>
      </Sent>
    );
  }
  return (
    <div className="grid max-w-measure gap-5">
      <p>
        Confirm that <strong className="break-all">{email}</strong> is yours, and the account of{' '}
        <strong className="break-words">{name}</strong> opens. If you did not sign up, close this page: nothing happens.
      </p>
      <ProblemNotice problem={problem} />
      <div>
        <Button
          busy={busy}
          busyLabel="Confirming"
          onClick={async () => {
            const result = await send('people/verification', { body: { token } });
            if (result.ok) setDone(result.data);
          }}
        >
          Confirm this address
        </Button>
      </div>
    </div>
  );
}
