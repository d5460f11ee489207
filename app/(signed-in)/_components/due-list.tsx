'use client';

import Link from 'next/link';
import { addDays, asDay } from '@/lib/domain/days';
import type { DueAnswer } from '@/lib/schemas/reminders';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { Menu } from '@/lib/ui/actions/menu';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { ACT_WITHIN_DAYS, inWords, isResting, whenDue } from './due-words';

type DueListProps = {
  due: readonly DueAnswer[];
  today: string;
  /** The element that keeps the focus when a row has gone. */
  focusId: string;
  onChanged: () => Promise<void>;
};

const RESTS = [
  { key: 'week', days: 7, label: 'In a week' },
  { key: 'two-weeks', days: 14, label: 'In two weeks' },
  { key: 'month', days: 30, label: 'In a month' },
] as const;

const whenDrawn = (then: () => void) => requestAnimationFrame(() => requestAnimationFrame(then));

/** Samples that are due, soonest first, on the first page and on the site's own. */
export function DueList({ due, today, focusId, onChanged }: DueListProps) {
  return (
    <ul className="border-y border-horizon-5">
      {due.map((one) => (
        <li key={one.id} className="border-b border-horizon-5 py-3.5 last:border-0">
          <DueRow due={one} today={today} focusId={focusId} onChanged={onChanged} />
        </li>
      ))}
    </ul>
  );
}

function DueRow({ due, today, focusId, onChanged }: Omit<DueListProps, 'due'> & { due: DueAnswer }) {
  const announce = useAnnounce();
  const path = `/sites/${due.siteId}/reminders/${due.id}`;
  const resting = isResting(due, today);
  const when = whenDue(due);

  const close = async () => {
    const result = await callApi(`${path}/done`, { method: 'POST' });
    if (!result.ok) {
      // Somebody else was faster: the list says so by itself.
      if (result.problem.code === 'conflict') await onChanged();
      return result;
    }
    announce(`Noted: ${due.plotName} is sampled. Nobody is reminded of it again.`, { tone: 'saved' });
    // The dialog closes first and gives the focus back; then the row goes, and the heading takes it.
    void onChanged().then(() => whenDrawn(() => document.getElementById(focusId)?.focus()));
    return result;
  };
  const rest = async (days: number) => {
    const until = addDays(asDay(today), days);
    const result = await callApi(`${path}/snooze`, { method: 'POST', body: { until } });
    if (!result.ok) return announce(result.problem.detail, { tone: 'error' });
    announce(`You hear of ${due.plotName} again on ${inWords(until)}; the others here still do as before.`, {
      tone: 'saved',
    });
    await onChanged();
  };

  return (
    <div className="grid gap-x-8 gap-y-3 md:grid-cols-[1fr_auto] md:items-center">
      <div className="min-w-0">
        <p className="flex flex-wrap items-baseline gap-x-4">
          <Link
            href={`/sites/${due.siteId}/plots/${due.plotId}`}
            className="text-link inline-flex min-h-8 items-center text-lg font-semibold"
          >
            <span className="min-w-0 break-words">{due.plotName}</span>
          </Link>
          {resting ? (
            <StatusWord status="off">{`Resting until ${inWords(due.snoozedUntil ?? today)}`}</StatusWord>
          ) : (
            <StatusWord status={when.status}>{when.words}</StatusWord>
          )}
          <span className="text-clay">{inWords(due.dueOn)}</span>
        </p>
        <p className="max-w-measure text-clay">{due.reason}</p>
      </div>
      {due.inDays > ACT_WITHIN_DAYS ? null : (
        <div className={due.mayClose ? 'flex flex-wrap gap-2' : 'flex flex-wrap gap-2 max-md:-ml-4'}>
          {due.mayClose ? (
            <ConfirmButton
              title={`Already sampled ${due.plotName}?`}
              sentence="Nobody on this site is reminded of this one again. The next sample comes due by itself once the new report is confirmed."
              confirmLabel="Already sampled"
              busyLabel="Noting it"
              keepLabel="Not yet"
              onConfirm={close}
            >
              Already sampled
            </ConfirmButton>
          ) : null}
          <Menu
            label="Ask later"
            name={`Ask later about ${due.plotName}`}
            look="plain"
            align="end"
            items={RESTS.map((choice) => ({
              key: choice.key,
              label: choice.label,
              note: inWords(addDays(asDay(today), choice.days)),
              onSelect: () => void rest(choice.days),
            }))}
          />
        </div>
      )}
    </div>
  );
}
