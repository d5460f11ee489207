'use client';

import { useState } from 'react';
import type { AuditList } from '@/lib/schemas/sites';
import { Button } from '@/lib/ui/actions/button';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { DataTable } from '@/lib/ui/show/data-table';
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
      <div className="w-full">
        <DataTable
          caption="What was done on this site"
          hideCaption
          rows={events}
          rowKey={(event) => event.id}
          empty="Nothing yet."
          columns={[
            { key: 'at', head: 'When', cell: (event) => when.format(new Date(event.at)) },
            { key: 'who', head: 'Who', cell: (event) => event.person ?? 'Loamline itself' },
            { key: 'act', head: 'What', rowHead: true, cell: (event) => actInWords(event.act) },
          ]}
        />
      </div>
      <ProblemNotice problem={problem} />
      {before ? (
        <Button look="quiet" busy={busy} busyLabel="Loading" onClick={() => void older()}>
          Show older ones
        </Button>
      ) : null}
    </div>
  );
}
