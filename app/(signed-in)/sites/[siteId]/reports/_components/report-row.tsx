'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { Report } from '@/lib/schemas/reports';
import { Button } from '@/lib/ui/actions/button';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { reviewLabel } from '@/lib/ui/files/upload-row';
import { useSubmit } from '@/lib/ui/use-submit';
import { reportName, STATE_MARKS, samplesText, stateWord } from './report-states';

export type RowRights = {
  readonly personId: string;
  readonly mayWork: boolean;
  readonly mayDecide: boolean;
};

type ReportRowProps = RowRights & {
  readonly siteId: string;
  readonly report: Report;
  readonly plotNames: ReadonlyMap<string, string>;
  readonly sentOn: string;
  readonly onChanged: () => void;
};

export function ReportRow(props: ReportRowProps) {
  const { siteId, report, plotNames } = props;
  const name = reportName(report);
  const facts = [
    samplesText(report, plotNames),
    report.laboratory?.name ?? report.laboratoryPrinted,
    report.pages ? (report.pages === 1 ? '1 page' : `${report.pages} pages`) : null,
  ].filter(Boolean);
  const typed = report.origin === 'typed';
  return (
    <div className="grid gap-x-6 gap-y-1 py-3 md:grid-cols-[minmax(0,1fr)_13rem]">
      <div className="min-w-0">
        <Link
          href={`/sites/${siteId}/reports/${report.id}`}
          className="text-link inline-flex min-h-(--target) max-w-full items-center text-lg font-semibold"
        >
          <span className="line-clamp-3 min-w-0 break-all">{name}</span>
        </Link>
        {facts.length > 0 ? <p className="break-words">{facts.join(' · ')}</p> : null}
        <p className="text-sm text-clay">
          {typed ? 'Begun' : 'Sent'} by {report.uploadedBy.name}, {props.sentOn}
          {onPlot(report, plotNames)}
        </p>
        {report.refusal && props.mayWork ? <p className="mt-1 max-w-measure">{report.refusal.sentence}</p> : null}
        {report.withdrawnReason ? (
          <p className="mt-1 max-w-measure text-sm">Confirmation withdrawn: {report.withdrawnReason}</p>
        ) : null}
      </div>
      <div className="md:pt-2.5">
        {report.state === 'in-review' && !props.mayWork ? (
          <StatusWord status="waiting">Not confirmed yet</StatusWord>
        ) : (
          <StatusWord status={STATE_MARKS[report.state]}>{stateWord(report)}</StatusWord>
        )}
      </div>
      <div className="flex flex-wrap items-start gap-2 empty:hidden md:col-span-2">
        <RowActions {...props} name={name} />
      </div>
    </div>
  );
}

function onPlot(report: Report, plotNames: ReadonlyMap<string, string>): string {
  const name = report.droppedOnPlotId === null ? undefined : plotNames.get(report.droppedOnPlotId);
  return name === undefined ? '' : `, to ${name}`;
}

function RowActions(props: ReportRowProps & { name: string }) {
  const { siteId, report, name, personId, mayWork, mayDecide, onChanged } = props;
  const { send, busy, problem } = useSubmit();
  const router = useRouter();
  const announce = useAnnounce();
  const path = `/sites/${siteId}/reports/${report.id}`;
  const unread = report.state === 'unreadable' || report.state === 'not-soil';
  const of = <span className="sr-only">: {name}</span>;
  const act = async (what: string, said: string) => {
    const result = await send(`${path}/${what}`);
    if (result.ok) announce(said, { tone: 'saved' });
    onChanged();
    return result.ok;
  };
  return (
    <>
      {report.state === 'in-review' && mayWork ? (
        <LinkButton href={path} size="small" className="min-h-(--target)!">
          {report.origin === 'own-sheet' ? 'Say what its columns hold' : reviewLabel(report.samples.all)}
          {of}
        </LinkButton>
      ) : null}
      {unread && mayWork ? (
        <Button
          busy={busy}
          busyLabel="Opening"
          onClick={async () => {
            if (await act('by-hand', `${name} can be typed in now.`)) router.push(path);
          }}
        >
          Type it in beside the page{of}
        </Button>
      ) : null}
      {unread && mayDecide ? (
        <Button look="quiet" busy={busy} onClick={() => void act('read-again', `${name} is read again.`)}>
          Read it again{of}
        </Button>
      ) : null}
      {report.state === 'set-aside' && mayDecide ? (
        <Button look="quiet" busy={busy} onClick={() => void act('bring-back', `${name} is back.`)}>
          Bring back{of}
        </Button>
      ) : null}
      {(unread || report.state === 'in-review') && (mayDecide || (mayWork && report.uploadedBy.id === personId)) ? (
        <ConfirmButton
          look="plain"
          title="Set this report aside?"
          sentence={`${name} leaves the list. The file and everything typed in are kept, and it can be brought back.`}
          confirmLabel="Set it aside"
          busyLabel="Setting it aside"
          onConfirm={async () => {
            const result = await callApi(`${path}/set-aside`, { method: 'POST' });
            if (result.ok) announce(`${name} is set aside. It stands under “Set aside”.`, { tone: 'saved' });
            onChanged();
            return result;
          }}
        >
          Set aside
        </ConfirmButton>
      ) : null}
      {problem ? (
        <div className="basis-full">
          <ProblemNotice problem={problem} />
        </div>
      ) : null}
    </>
  );
}
