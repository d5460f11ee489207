'use client';

import { useState } from 'react';
import type { AuditList } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';
import { actInWords } from './act-words';

type Event = AuditList['events'][number];

export function AuditTrail({ siteId, first, timeZone }: { siteId: string; first: AuditList; timeZone: string }) {
  const [events, setEvents] = useState<readonly Event[]>(first.events);
  const [before, setBefore] = useState(first.before);
  const { send, busy, problem } = useSubmit<AuditList>();
  const when = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short', timeZone });
  const older = async () => {
    if (!before) return;
    const result = await send(`/sites/${siteId}/audit?before=${encodeURIComponent(before)}`, { method: 'GET' });
    if (!result.ok) return;
    setEvents([...events, ...result.data.events]);
    setBefore(result.data.before);
  };
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] justify-items-start gap-4">
      <p className="max-w-measure text-clay">
        Every change of this site, newest first. Nobody can edit or remove a line here.
      </p>
      {events.length === 0 ? (
        <p className="text-clay">Nothing yet.</p>
      ) : (
        <ol
          aria-label="What was done on this site"
          className="w-full divide-y divide-horizon-5 border-y border-horizon-5"
        >
          {events.map((event) => (
            <li key={event.id} className="grid gap-x-6 py-2.5 sm:grid-cols-[minmax(0,1fr)_14rem_11rem]">
              <span className="font-semibold">{actInWords(event.act)}</span>
              <span className="break-words max-sm:text-sm">{event.person ?? 'Loamline itself'}</span>
              <time dateTime={event.at} className="text-sm text-clay sm:text-right">
                {when.format(new Date(event.at))}
              </time>
            </li>
          ))}
        </ol>
      )}
      <ProblemNotice problem={problem} />
      {before ? (
        <Button look="quiet" busy={busy} busyLabel="Loading" onClick={() => void older()}>
          Show older ones
        </Button>
      ) : null}
    </div>
  );
}
