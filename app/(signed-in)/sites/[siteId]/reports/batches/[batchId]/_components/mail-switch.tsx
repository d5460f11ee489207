'use client';

import { useState } from 'react';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { CheckField } from '@/lib/ui/fields/check-field';
import { useSubmit } from '@/lib/ui/use-submit';

type SwitchProps = { path: string; wanted: boolean; onChanged: () => void };

/** One letter, to whoever sent the files, once nothing of them is waited for any more. */
export function MailSwitch({ path, wanted, onChanged }: SwitchProps) {
  const { send, busy, problem } = useSubmit();
  const [asked, setAsked] = useState<boolean | null>(null);
  const announce = useAnnounce();
  const choose = async (next: boolean) => {
    if (busy) return;
    setAsked(next);
    const result = await send(`${path}/mail`, { method: 'PUT', body: { wanted: next } });
    if (result.ok) announce(next ? 'You are written to once all are read.' : 'No letter comes.', { tone: 'saved' });
    onChanged();
    setAsked(result.ok ? next : null);
  };
  return (
    <div>
      <ProblemNotice problem={problem} />
      <CheckField
        name="mail"
        label="Write to me when all of them are read"
        hint="You can close this page meanwhile; what has arrived is kept and read."
        checked={asked ?? wanted}
        onChange={(event) => void choose(event.target.checked)}
      />
    </div>
  );
}
