'use client';

import Link from 'next/link';
import { useState } from 'react';
import type { FailedJob, FailedJobList } from '@/lib/schemas/failedJobs';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useApi } from '@/lib/ui/use-api';
import { useSubmit } from '@/lib/ui/use-submit';
import { jobInWords } from './job-words';

type ListProps = { siteId: string; first: FailedJobList; timeZone: string };

/** Tasks that the worker tried several times and left, with what that means and the way to have them done again. */
export function FailedJobs({ siteId, first, timeZone }: ListProps) {
  const path = `/sites/${siteId}/failed-jobs`;
  const { data = first, problem, reload } = useApi<FailedJobList>(path, { fallback: first });
  const [all, setAll] = useState(false);
  const open = data.failedJobs.filter((one) => one.replayed === null);
  const shown = all ? data.failedJobs : open;
  const past = data.failedJobs.length - open.length;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] justify-items-start gap-4">
      <p className="max-w-measure text-clay">
        Some work is done in the background: reading reports, going over effect checks, writing letters. What failed
        every time it was tried stands here.
      </p>
      <ProblemNotice problem={problem} />
      {shown.length === 0 ? <p>Nothing was given up.</p> : null}
      <ul aria-label="Given up" className="w-full divide-y divide-horizon-5 border-y border-horizon-5 empty:hidden">
        {shown.map((job) => (
          <li key={job.id} className="py-3">
            <Line siteId={siteId} job={job} timeZone={timeZone} onChanged={() => void reload()} />
          </li>
        ))}
      </ul>
      {past > 0 ? (
        <Button look="plain" onClick={() => setAll(!all)}>
          {all ? 'Only those still open' : `Also the ${past} that were done again`}
        </Button>
      ) : null}
    </div>
  );
}

type LineProps = { siteId: string; job: FailedJob; timeZone: string; onChanged: () => void };

function Line({ siteId, job, timeZone, onChanged }: LineProps) {
  const { send, busy, problem } = useSubmit();
  const announce = useAnnounce();
  const when = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short', timeZone });
  const again = async () => {
    const result = await send(`/sites/${siteId}/failed-jobs/${job.id}/replay`);
    if (result.ok) announce(`${jobInWords(job.job)}: it is done once more.`, { tone: 'saved' });
    onChanged();
  };
  return (
    <div className="grid gap-1">
      <p className="flex flex-wrap items-baseline gap-x-4">
        <span className="font-semibold">{jobInWords(job.job)}</span>
        {job.subject.kind === 'report' ? (
          <Link className="text-link min-w-0 py-1 break-all" href={`/sites/${siteId}/reports/${job.subject.id}`}>
            {job.subject.name}
          </Link>
        ) : null}
        <time dateTime={job.gaveUpAt} className="text-sm text-clay">
          {when.format(new Date(job.gaveUpAt))}
        </time>
      </p>
      <p className="max-w-measure">{job.sentence}</p>
      {job.replayed ? (
        <p className="text-sm text-clay">
          Done again, asked by {job.replayed.by}, {when.format(new Date(job.replayed.at))}.
        </p>
      ) : job.notAgain ? (
        <p className="text-sm text-clay">{job.notAgain}</p>
      ) : (
        <p className="pt-1">
          <Button look="quiet" busy={busy} busyLabel="Asking for it" onClick={() => void again()}>
            Do it again
            <span className="sr-only">
              : {jobInWords(job.job)} {job.subject.name}
            </span>
          </Button>
        </p>
      )}
      <ProblemNotice problem={problem} />
    </div>
  );
}
