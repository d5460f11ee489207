'use client';

import { useState } from 'react';
import type { MailPreferences as Preferences } from '@/lib/schemas/reminders';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { CheckField } from '@/lib/ui/fields/check-field';
import { useApi } from '@/lib/ui/use-api';
import { useSubmit } from '@/lib/ui/use-submit';

const PATH = '/mail/preferences';

const WORDS: Record<string, { label: string; hint: string; on: string; off: string }> = {
  reminder: {
    label: 'Reminders of samples that are due',
    hint: 'Two weeks before the day, on the day and two weeks after; at most one mail a day, with all your sites in it.',
    on: 'Reminder mail is on.',
    off: 'No more reminder mail. What is due still stands on your first page.',
  },
  'report-ready': {
    label: 'Word that reports you sent in have been read',
    hint: 'One letter a report, or one for many files sent at once. For many files you can also choose it on their own list.',
    on: 'You are written to when a report you sent in has been read.',
    off: 'No more letters about reports that were read. They still stand on your first page.',
  },
};

/** Each switch saves itself. Mail about the account itself is not a matter of choice, and the section says so. */
export function MailPreferences({ first }: { first: Preferences }) {
  const { data = first, problem, reload } = useApi<Preferences>(PATH, { fallback: first });
  const save = useSubmit();
  const announce = useAnnounce();
  const [asked, setAsked] = useState<{ kind: string; wanted: boolean }>();
  const choose = async (kind: string, wanted: boolean) => {
    if (asked) return;
    setAsked({ kind, wanted });
    const result = await save.send(PATH, { method: 'PUT', body: { kind, wanted } });
    if (result.ok) {
      announce(WORDS[kind]?.[wanted ? 'on' : 'off'] ?? 'Your choice is kept.', { tone: 'saved' });
      await reload();
    }
    setAsked(undefined);
  };
  return (
    <div className="grid gap-3">
      <ProblemNotice problem={save.problem ?? problem} />
      {data.preferences.map(({ kind, wanted }) => {
        const words = WORDS[kind];
        if (!words) return null;
        return (
          <CheckField
            key={kind}
            name={`mail-${kind}`}
            label={words.label}
            hint={words.hint}
            checked={asked?.kind === kind ? asked.wanted : wanted}
            onChange={(event) => void choose(kind, event.target.checked)}
          />
        );
      })}
      <p className="max-w-measure text-clay">
        Mail about your account itself always comes: a new password, a confirmed address, an invitation.
      </p>
    </div>
  );
}
