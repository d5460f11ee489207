'use client';

import { can, type Role } from '@/lib/access/table';
import type { Report } from '@/lib/schemas/reports';
import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { PageView } from '@/lib/ui/page-view/page-view';
import { useSubmit } from '@/lib/ui/use-submit';
import { originalHref, sourceOf } from './page-source';
import { reportTitle } from './report-words';

type NotReadProps = { path: string; report: Report; role: Role; refresh: () => Promise<void> };

/** Nothing was taken from the file: why, and the two ways on. */
export function NotRead({ path, report, role, refresh }: NotReadProps) {
  const hand = useSubmit();
  const again = useSubmit();
  const go = async (submit: typeof hand, what: string) => {
    if ((await submit.send(`${path}/${what}`, { body: {} })).ok) await refresh();
  };
  const title = report.state === 'not-soil' ? 'This is not a soil test' : 'Nothing could be read from this file';
  return (
    <div className="page-wrap max-w-[110rem]! grid gap-6 pb-8 lg:grid-cols-2">
      <div className="grid content-start gap-4">
        <Notice
          tone="look"
          title={title}
          action={
            <>
              <Button busy={hand.busy} onClick={() => void go(hand, 'by-hand')}>
                Type it in beside the page
              </Button>
              {can(role, 'reading.decide') ? (
                <Button
                  look="quiet"
                  busy={again.busy}
                  busyLabel="Handing it to the reader"
                  onClick={() => void go(again, 'read-again')}
                >
                  Read it again
                </Button>
              ) : null}
            </>
          }
        >
          {report.refusal?.sentence ?? 'The file is kept as it came.'}
        </Notice>
        <ProblemNotice problem={hand.problem ?? again.problem} />
      </div>
      <PageView
        source={sourceOf(path, report)}
        fileName={reportTitle(report)}
        marks={[]}
        highlightedRowId={null}
        onPick={() => undefined}
        {...originalHref(path, report)}
      />
    </div>
  );
}
