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

const ACTIONS: readonly Action[] = ['already-sampled', 'snooze-two-weeks'];
const LABELS: Record<Action, string> = {
  'already-sampled': 'Already sampled',
  'snooze-two-weeks': 'Ask again in two weeks',
};
const DONE: Record<Action, string> = {
  'already-sampled': 'Noted. Nobody on this site is reminded of it again.',
  'snooze-two-weeks': 'Noted. You hear of it again in two weeks; the others on this site still do as before.',
};

type LetterRemindersProps = {
  token: string;
  /** The plot whose link was followed comes first. */
  chosen: string | null;
  /** What that link promised; it is offered first, never done by looking. */
  wish: Action;
  letter: Letter;
};

export function LetterReminders({ token, chosen, wish, letter }: LetterRemindersProps) {
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
          <LetterReminder token={token} item={item} first={item.id === chosen ? wish : 'already-sampled'} />
        </li>
      ))}
    </ul>
  );
}

type LetterReminderProps = { token: string; item: Item; first: Action };

function LetterReminder({ token, item, first }: LetterReminderProps) {
  const { send, busy, problem } = useSubmit();
  const [done, setDone] = useState<Action>();
  const offered = ACTIONS.filter((action) => action !== 'already-sampled' || item.mayClose).sort(
    (a, b) => Number(b === first) - Number(a === first),
  );
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
            {offered.map((action) => (
              <Button
                key={action}
                look={action === offered[0] ? 'primary' : 'quiet'}
                busy={busy}
                aria-describedby={`plot-${item.id}`}
                onClick={() => act(action)}
              >
                {LABELS[action]}
              </Button>
            ))}
          </div>
        ) : (
          <Notice>This one is already closed; nothing more is sent for it.</Notice>
        )}
      </div>
    </section>
  );
}
