'use client';

import type { z } from 'zod';
import type { Blocker, confirmAnswerSchema, Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import type { Problem } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import type { GridCounts } from '@/lib/ui/grid/types';
import { useSubmit } from '@/lib/ui/use-submit';
import { missingOf, unsettledSentence, valuesToConfirm } from './missing';
import { counted } from './report-words';

/** Where the way down the phone's long list of values ends. */
export const CONFIRM_ID = 'confirm';

type ConfirmBarProps = {
  path: string;
  review: Review;
  decides: boolean;
  counts: GridCounts;
  separate: ReadonlySet<string>;
  onShow: (blocker: Blocker) => void;
  onConfirmed: () => Promise<void>;
  onFaster: (problem: Problem) => void;
  refresh: () => Promise<void>;
};

/** The last step: what is still missing, in words that lead there, and the one button that makes results. */
export function ConfirmBar(props: ConfirmBarProps) {
  const { path, review, decides, counts, separate, onShow } = props;
  const { send, busy, problem, clear } = useSubmit<z.infer<typeof confirmAnswerSchema>>();
  const announce = useAnnounce();
  const missing = missingOf(review.blockers, separate);
  const unsettled = unsettledSentence(counts);
  const values = valuesToConfirm(review);
  const lacks = [...missing.map((one) => one.sentence), ...(unsettled ? [unsettled] : [])];

  const confirm = async () => {
    const result = await send(`${path}/confirm`, { body: { separateAnalyses: [...separate] } });
    if (result.ok) {
      announce(`Confirmed: ${counted(result.data.results, 'value')}.`, { tone: 'saved' });
      await props.onConfirmed();
      return;
    }
    if (result.problem.reason?.startsWith('report-')) {
      clear();
      props.onFaster(result.problem);
      return;
    }
    await props.refresh();
  };

  return (
    <section
      id={CONFIRM_ID}
      tabIndex={-1}
      aria-label="Confirm"
      className="no-print z-20 border-t-2 border-gley bg-chalk outline-none md:sticky md:bottom-0"
      data-testid="confirm-bar"
    >
      <div className="page-wrap max-w-[110rem]! grid gap-2 py-3">
        {problem ? <ProblemNotice problem={problem} /> : null}
        <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
          <div className="min-w-0 flex-1 basis-64" role="status">
            {lacks.length === 0 ? (
              <p>{values > 0 ? 'Everything is there.' : 'Nothing here counts by itself.'}</p>
            ) : (
              <div className="flex flex-wrap items-center gap-x-1 gap-y-1">
                <span className="font-semibold">Still missing:</span>
                <ul className="flex flex-wrap gap-x-1">
                  {missing.map((one) => (
                    <li key={one.code}>
                      <Button
                        look="plain"
                        size="small"
                        className="min-h-(--target)!"
                        title={one.blockers[0]?.sentence}
                        onClick={() => one.blockers[0] && onShow(one.blockers[0])}
                      >
                        {one.sentence}
                      </Button>
                    </li>
                  ))}
                  {unsettled ? <li className="content-center px-2 text-sm text-iron">{unsettled}</li> : null}
                </ul>
              </div>
            )}
          </div>
          {decides ? (
            <Button
              className="max-sm:w-full"
              busy={busy}
              busyLabel="Confirming"
              unavailable={lacks.length > 0 && `still missing: ${lacks.join(', ')}`}
              onClick={() => void confirm()}
            >
              Confirm{values > 0 ? ` ${counted(values, 'value')}` : ''}
            </Button>
          ) : (
            <p className="font-semibold">
              {lacks.length > 0 ? 'Mend what you can. ' : ''}An owner or adviser confirms.
            </p>
          )}
        </div>
      </div>
    </section>
  );
}
