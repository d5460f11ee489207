'use client';

import { useState } from 'react';
import type { Invitation } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { type Status, StatusWord } from '@/lib/ui/feedback/status-word';
import { Form } from '@/lib/ui/fields/form';
import { RadioGroup } from '@/lib/ui/fields/radio-group';
import { TextField } from '@/lib/ui/fields/text-field';
import { Stretch } from '@/lib/ui/frame/layers';
import { useApi } from '@/lib/ui/use-api';
import { useSubmit } from '@/lib/ui/use-submit';
import { onDay, ROLE_OPTIONS } from './role-options';

type List = { invitations: Invitation[] };

export function Invitations({ siteId, first }: { siteId: string; first: List }) {
  const path = `/sites/${siteId}/invitations`;
  const { data = first, reload } = useApi<List>(path, { fallback: first });
  return (
    <>
      <Stretch title="Ask somebody to join" ground="white">
        <InviteForm path={path} onSent={() => void reload()} />
      </Stretch>
      <Stretch title="Invitations">
        {data.invitations.length === 0 ? (
          <EmptyState shape="list" title="Nobody was invited yet">
            Each invitation stands here until it is answered, with its day and its role.
          </EmptyState>
        ) : (
          <ul className="border-y border-horizon-5">
            {data.invitations.map((invitation) => (
              <li
                key={invitation.id}
                className="grid gap-2 border-b border-horizon-5 py-3 last:border-0 sm:grid-cols-[1fr_10rem_9rem] sm:items-center sm:gap-6"
              >
                <Row path={path} invitation={invitation} onChanged={() => void reload()} />
              </li>
            ))}
          </ul>
        )}
      </Stretch>
    </>
  );
}

function InviteForm({ path, onSent }: { path: string; onSent: () => void }) {
  const { send, busy, problem } = useSubmit();
  const [round, setRound] = useState(0);
  const announce = useAnnounce();
  return (
    <Form
      key={round}
      problem={problem}
      onSubmit={async (values) => {
        const body = { email: values.email ?? '', role: values.role };
        const result = await send(path, { body });
        if (!result.ok) return;
        announce(`An invitation is on its way to ${body.email}.`, { tone: 'saved' });
        setRound(round + 1);
        onSent();
      }}
    >
      <TextField
        name="email"
        label="E-mail address"
        hint="They need no account yet. The link in the mail works for 7 days."
        type="email"
        autoComplete="off"
      />
      <RadioGroup name="role" label="Role" options={ROLE_OPTIONS} defaultValue="helper" />
      <div>
        <Button type="submit" busy={busy} busyLabel="Sending">
          Send the invitation
        </Button>
      </div>
    </Form>
  );
}

const STATES: Record<Invitation['state'], { status: Status; word: string }> = {
  open: { status: 'waiting', word: 'Waiting' },
  expired: { status: 'off', word: 'Run out' },
  accepted: { status: 'done', word: 'Accepted' },
  declined: { status: 'failed', word: 'Declined' },
  revoked: { status: 'off', word: 'Taken back' },
};

function Row({ path, invitation, onChanged }: { path: string; invitation: Invitation; onChanged: () => void }) {
  const announce = useAnnounce();
  const { status, word } = STATES[invitation.state];
  const revoke = async () => {
    const result = await callApi(`${path}/${invitation.id}`, { method: 'DELETE' });
    if (result.ok) announce(`The invitation to ${invitation.email} is taken back.`, { tone: 'saved' });
    onChanged();
    return result;
  };
  const until = invitation.state === 'open' ? `, stands until ${onDay(invitation.expiresAt)}` : '';
  return (
    <>
      <div className="min-w-0">
        <p className="font-semibold break-all">{invitation.email}</p>
        <p className="text-sm text-clay">
          as {invitation.role}, sent {onDay(invitation.createdAt)} by {invitation.invitedBy}
          {until}
        </p>
      </div>
      <StatusWord status={status}>{word}</StatusWord>
      <div className="sm:justify-self-end">
        {invitation.state === 'open' ? (
          <ConfirmButton
            size="small"
            title="Take the invitation back?"
            sentence={`The link that went to ${invitation.email} stops working.`}
            confirmLabel="Take it back"
            busyLabel="Taking it back"
            onConfirm={revoke}
          >
            Take back
          </ConfirmButton>
        ) : null}
      </div>
    </>
  );
}
