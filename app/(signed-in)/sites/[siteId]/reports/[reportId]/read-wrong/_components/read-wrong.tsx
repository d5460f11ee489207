'use client';

import { useState } from 'react';
import type { PageCopy } from '@/lib/schemas/copies';
import { Button } from '@/lib/ui/actions/button';
import { buttonClass } from '@/lib/ui/actions/button-style';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { apiPath, callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { ProgressBar } from '@/lib/ui/feedback/progress-bar';
import { CheckField } from '@/lib/ui/fields/check-field';
import { SelectField } from '@/lib/ui/fields/select-field';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { useApi } from '@/lib/ui/use-api';
import { useSubmit } from '@/lib/ui/use-submit';

type WrongProps = {
  siteId: string;
  reportId: string;
  name: string;
  pages: number;
  first: number;
  /** Only pages and pictures are drawn, no data files. */
  hasPages: boolean;
};

/** A page without names for a report of a fault: asked for, looked at, and only then taken away by the grower. */
export function ReadWrong({ siteId, reportId, name, pages, first, hasPages }: WrongProps) {
  const report = `/sites/${siteId}/reports/${reportId}`;
  const { send, busy, problem, clear } = useSubmit<PageCopy>();
  const [page, setPage] = useState(first);
  const [asked, setAsked] = useState<PageCopy | null>(null);
  const ask = async () => {
    const result = await send(`${report}/copies`, { body: { page } });
    if (result.ok) setAsked(result.data);
  };
  return (
    <>
      <PageTitle
        title="This was read wrong"
        above={{ href: report, label: name }}
        lead="Make a copy of the page with names and addresses blacked out, and what the reader saw on it, to show whoever looks after this program. Nothing is sent anywhere: you look at it, and you decide whom you give it to."
      />
      <div className="page-wrap grid gap-5 pb-12">
        <ProblemNotice problem={problem} />
        {hasPages ? (
          <form
            className="flex empty:hidden flex-wrap items-end gap-3"
            onSubmit={(event) => {
              event.preventDefault();
              void ask();
            }}
          >
            {pages > 1 ? (
              <SelectField
                name="page"
                label="Page"
                value={String(page)}
                onChange={(event) => {
                  setPage(Number(event.target.value));
                  setAsked(null);
                  clear();
                }}
                options={Array.from({ length: pages }, (_, at) => ({
                  value: String(at + 1),
                  label: `${at + 1} of ${pages}`,
                }))}
              />
            ) : null}
            {asked === null ? (
              <Button type="submit" busy={busy} busyLabel="Asking for it">
                Make the copy
              </Button>
            ) : null}
          </form>
        ) : (
          <Notice title="Only pages can be copied">
            This file has no pages to draw. Describe in words what was read wrong: the label, what stands in the file,
            and what was read.
          </Notice>
        )}
        {asked ? (
          <Copy key={asked.id} path={`${report}/copies/${asked.id}`} first={asked} onGone={() => setAsked(null)} />
        ) : null}
        <p>
          <LinkButton look="quiet" href={report}>
            Back to the report
          </LinkButton>
        </p>
      </div>
    </>
  );
}

const WHILE_MADE_MS = 1_000;

function Copy({ path, first, onGone }: { path: string; first: PageCopy; onGone: () => void }) {
  const announce = useAnnounce();
  const [looked, setLooked] = useState(false);
  const { data: copy = first, problem } = useApi<PageCopy>(path, {
    fallback: first,
    refreshMs: (latest) => ((latest ?? first).state === 'asked' ? WHILE_MADE_MS : 0),
  });
  const throwAway = async () => {
    const result = await callApi(path, { method: 'DELETE' });
    if (!result.ok) return announce(result.problem.detail, { tone: 'error' });
    announce('The copy is thrown away.', { tone: 'saved' });
    onGone();
  };
  if (copy.state === 'asked') return <ProgressBar label="Blacking out the page" valueText="being drawn" />;
  if (copy.state !== 'ready') {
    return (
      <Notice tone="look" live title="No copy was made">
        {copy.sentence ?? 'It was thrown away.'}
      </Notice>
    );
  }
  return (
    <div className="grid gap-4">
      <ProblemNotice problem={problem} />
      <p className="max-w-measure" role="status">
        Page {copy.page}: {copy.wordsKept} words and numbers kept, {copy.wordsMasked} blacked out. Only values, units,
        analytes, methods, ratings and headings are left. Look it over: is there anything on it that says whose it is?
      </p>
      <a href={apiPath(`${path}/picture`)} target="_blank" rel="noreferrer" className="block max-w-[56rem]">
        {/* biome-ignore lint/performance/noImgElement: a private picture behind a session, not one to be resized by the framework */}
        <img
          src={apiPath(`${path}/picture`)}
          alt={`Page ${copy.page} with ${copy.wordsMasked} words blacked out; opens larger`}
          className="w-full border border-fallow bg-white"
        />
      </a>
      <CheckField
        name="looked"
        label="I have looked at it, and nothing on it names anybody"
        checked={looked}
        onChange={(event) => setLooked(event.target.checked)}
      />
      <div className="flex flex-wrap gap-3">
        {looked ? (
          <a className={buttonClass('primary')} href={apiPath(`${path}/bundle`)} download>
            Download the copy
          </a>
        ) : (
          <Button unavailable="look at the page first">Download the copy</Button>
        )}
        <Button look="quiet" onClick={() => void throwAway()}>
          Throw it away
        </Button>
      </div>
      <p className="max-w-measure text-sm text-clay">
        The download holds this picture and a text file with what the reader made of the page, the same words blacked
        out. The copy is cleared away here after a day.
      </p>
    </div>
  );
}
