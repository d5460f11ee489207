'use client';

import Link from 'next/link';
import { can, type Role } from '@/lib/access/table';
import type { Report } from '@/lib/schemas/reports';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { ReasonButton } from './reason-button';
import { isWaiting, onDay, reportTitle, STATE_WORDS } from './report-words';

type HeadProps = {
  path: string;
  siteId: string;
  report: Report;
  role: Role;
  personId: string;
  refresh: () => Promise<void>;
};

const ORIGIN_WORDS: Record<Report['origin'], string> = {
  file: 'sent in',
  typed: 'typed in',
  'own-sheet': 'own spreadsheet, sent in',
};

/** Name, state and what can be done with the whole report. */
export function ReportHead({ path, siteId, report, role, personId, refresh }: HeadProps) {
  const { status, word } = STATE_WORDS[report.state];
  return (
    <div className="page-wrap max-w-[110rem]! flex flex-wrap items-end gap-x-8 gap-y-3 pt-6 pb-4">
      <div className="min-w-0 flex-1 basis-72">
        <p className="-mt-2">
          <Link
            href={`/sites/${siteId}/reports`}
            className="text-link inline-flex min-h-8 items-center text-sm font-semibold"
          >
            Reports
          </Link>
        </p>
        <h1 className="text-2xl break-words">{reportTitle(report)}</h1>
        <p className="mt-1 text-sm text-clay">
          <StatusWord status={status} className="mr-3 text-base">
            {word}
          </StatusWord>
          {ORIGIN_WORDS[report.origin]} by {report.uploadedBy.name}, {onDay(report.uploadedAt)}
          {report.revision > 1 ? `, reading ${report.revision} of the same file` : ''}
        </p>
      </div>
      <HeadActions {...{ path, report, role, personId, refresh }} />
    </div>
  );
}

function HeadActions({ path, report, role, personId, refresh }: Omit<HeadProps, 'siteId'>) {
  const announce = useAnnounce();
  const decides = can(role, 'reading.decide');
  const open = ['in-review', 'unreadable', 'not-soil'].includes(report.state);
  const maySetAside = open && (decides || (can(role, 'reading.work') && report.uploadedBy.id === personId));
  const act = async (what: string, said: string, body: object = {}) => {
    const result = await callApi(`${path}/${what}`, { method: 'POST', body });
    if (result.ok) {
      announce(said, { tone: 'saved' });
      await refresh();
    }
    return result;
  };
  return (
    <div className="flex flex-wrap gap-3">
      {report.origin === 'file' && can(role, 'reading.work') && !isWaiting(report.state) ? (
        <LinkButton look="plain" href={`${path}/read-wrong`} className="max-md:px-0">
          This was read wrong
        </LinkButton>
      ) : null}
      {maySetAside ? (
        <ConfirmButton
          title="Set this report aside?"
          sentence="It leaves the list of open reviews. The file and everything you changed are kept, and it can be brought back."
          confirmLabel="Set it aside"
          busyLabel="Setting it aside"
          keepLabel="Keep it open"
          onConfirm={() => act('set-aside', 'Set aside. File and rows are kept.')}
        >
          Set aside
        </ConfirmButton>
      ) : null}
      {report.state === 'set-aside' && decides ? (
        <ConfirmButton
          title="Bring this report back?"
          sentence="It stands among the open reviews again, with its rows as they were."
          confirmLabel="Bring it back"
          busyLabel="Bringing it back"
          onConfirm={() => act('bring-back', 'Back in review.')}
        >
          Bring back
        </ConfirmButton>
      ) : null}
      {report.state === 'confirmed' && decides ? (
        <ReasonButton
          label="Withdraw"
          title="Withdraw this confirmation?"
          sentence="Its values leave the history of the plots. The rows and everything you changed stay here for another review."
          reasonLabel="Why"
          hint="It stays with the report, for whoever looks later."
          sendLabel="Withdraw the confirmation"
          onSend={(reason) => act('withdraw', 'Withdrawn. The report is in review again.', { reason })}
        />
      ) : null}
    </div>
  );
}
