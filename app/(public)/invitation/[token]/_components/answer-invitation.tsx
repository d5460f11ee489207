'use client';

import { useState } from 'react';
import type { InvitationLook } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { callApi } from '@/lib/ui/api';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';
import { Sent } from '../../../_components/sent';

type Props = { token: string; look: InvitationLook; me: string | null; sayingNo: boolean };

export function AnswerInvitation({ token, look, me, sayingNo }: Props) {
  const no = useSubmit();
  const [declined, setDeclined] = useState(false);
  if (declined) {
    return (
      <Sent title="You said no">
        <p>The invitation is gone, and you are no member of {look.siteName}. The owners see that it was declined.</p>
      </Sent>
    );
  }
  const decline = async () => {
    const result = await no.send(`invitations/${token}/decline`);
    if (result.ok) setDeclined(true);
  };
  return (
    <div className="grid max-w-measure gap-5">
      {sayingNo ? <p>Say no, and the invitation is gone. A new one can always be sent.</p> : null}
      <ProblemNotice problem={no.problem} />
      <Way token={token} look={look} me={me} />
      <div>
        <Button
          look={sayingNo ? 'destructive' : 'quiet'}
          busy={no.busy}
          busyLabel="Saying no"
          onClick={() => void decline()}
        >
          Decline the invitation
        </Button>
      </div>
    </div>
  );
}

/** What stands between this browser and the site. */
function Way({ token, look, me }: { token: string; look: InvitationLook; me: string | null }) {
  const yes = useSubmit<{ siteId: string }>();
  const here = encodeURIComponent(`/invitation/${token}`);
  const email = encodeURIComponent(look.email);
  if (look.next === 'sign-in') {
    return (
      <div>
        <LinkButton href={`/sign-in?next=${here}&email=${email}`}>Sign in to accept</LinkButton>
      </div>
    );
  }
  if (look.next === 'sign-up') {
    return (
      <div>
        <LinkButton href={`/sign-up?invitation=${token}`}>Make an account and accept</LinkButton>
      </div>
    );
  }
  if (look.next === 'other-account') {
    const signOut = async () => {
      await callApi('session', { method: 'DELETE' });
      window.location.reload();
    };
    return (
      <Notice
        tone="look"
        title="You are signed in with another address"
        action={
          <Button look="quiet" onClick={() => void signOut()}>
            Sign out and go on
          </Button>
        }
      >
        You are <span className="break-all">{me}</span>, and the invitation is for{' '}
        <span className="break-all">{look.email}</span>. Sign out to answer with that address, or ask for an invitation
        to this one.
      </Notice>
    );
  }
  const accept = async () => {
    const result = await yes.send(`invitations/${token}/accept`);
    if (result.ok) window.location.assign(`/sites/${result.data.siteId}`);
  };
  return (
    <>
      <ProblemNotice problem={yes.problem} />
      <div>
        <Button busy={yes.busy} busyLabel="Joining" onClick={() => void accept()}>
          Accept and go to {look.siteName}
        </Button>
      </div>
    </>
  );
}
