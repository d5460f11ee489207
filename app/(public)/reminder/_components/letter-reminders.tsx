'use client';

import { useState } from 'react';
import type { z } from 'zod';
import { asDay, dayInWords } from '@/lib/domain/days';
import type { mailActionsAnswer } from '@/lib/schemas/reminders';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';

type Letter = z.infer<typeof mailActionsAnswer>;
type Item = Letter['reminders'][number];
type Action = 'snooze-two-weeks' | 'already-sampled';

const DONE: Record<Action, string> = {
  'already-sampled': 'Noted. Nobody on this site is reminded of it again.',
  'snooze-two-weeks': 'Noted. You hear of it again in two weeks; the others on this site still do as before.',
};

export function LetterReminders({ token, chosen, letter }: { token: string; chosen: string | null; letter: Letter }) {
  const items = [...letter.reminders].sort((a, b) => Number(b.id === chosen) - Number(a.id === chosen));
  if (items.length === 0) {
    return (
      <div className="mt-6">
        <Notice>
          The plots of this letter are no longer here, or you are no longer a member of their site. Nothing is sent for
          them any more.
        </Notice>
      </div>
    );
  }
  return (
    <ul className="mt-6 grid gap-8">
      {items.map((item) => (
        <li key={item.id}>
          <LetterReminder token={token} item={item} />
        </li>
      ))}
    </ul>
  );
}

function LetterReminder({ token, item }: { token: string; item: Item }) {
  const { send, busy, problem } = useSubmit();
  const [done, setDone] = useState<Action>();
  const act = async (action: Action) => {
    const result = await send('/mail/actions', { body: { token, reminderId: item.id, action } });
    if (result.ok) setDone(action);
  };
  return (
    <section aria-labelledby={`plot-${item.id}`} className="border-l-4 border-gley pl-4">
      <h2 id={`plot-${item.id}`} className="text-xl">
        {item.plotName}
      </h2>
      <p className="text-clay">
        {item.siteName}, due {dayInWords(asDay(item.dueOn))}
      </p>
      <p className="mt-2 max-w-measure">{item.reason}</p>
      <div className="mt-4 grid gap-4">
        <ProblemNotice problem={problem} />
        {done ? (
          <Notice tone="saved" live>
            {DONE[done]}
          </Notice>
        ) : item.open ? (
          <div className="flex flex-wrap gap-3">
            {item.mayClose ? (
              <Button busy={busy} onClick={() => act('already-sampled')}>
                Already sampled
              </Button>
            ) : null}
            <Button look="quiet" busy={busy} onClick={() => act('snooze-two-weeks')}>
              Ask again in two weeks
            </Button>
          </div>
        ) : (
          <Notice>This one is already closed; nothing more is sent for it.</Notice>
        )}
      </div>
    </section>
  );
}
