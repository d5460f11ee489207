import type { HistoryAnswer } from '@/lib/schemas/history';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { formatDay } from '@/lib/ui/charts/numbers';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Stretch } from '@/lib/ui/frame/layers';
import { Timeline } from '@/lib/ui/show/timeline';

type NoTestYetProps = {
  siteId: string;
  at: string;
  history: HistoryAnswer;
  mayUpload: boolean;
  mayRecord: boolean;
};

/** Before the first confirmed report: what will stand here, the next step, and what was spread so far. */
export function NoTestYet({ siteId, at, history, mayUpload, mayRecord }: NoTestYetProps) {
  return (
    <>
      <Stretch>
        <EmptyState
          shape="chart"
          title="No confirmed test of this plot yet"
          action={
            mayUpload ? (
              <>
                <LinkButton href={`/sites/${siteId}/reports`}>Add a report</LinkButton>
                {mayRecord ? (
                  <LinkButton look="quiet" href={`${at}/records`}>
                    Record what was spread
                  </LinkButton>
                ) : null}
              </>
            ) : null
          }
        >
          The first confirmed report puts a dot here for each analyte. A second one, taken the same way, gives a
          difference; from four on a trend can be told.
        </EmptyState>
      </Stretch>
      {history.amendments.length > 0 ? (
        <Stretch title="Spread so far">
          <Timeline
            label="What was spread"
            items={history.amendments.toReversed().map((one) => ({
              key: one.id,
              day: one.on,
              dayLabel: formatDay(one.on),
              mark: 'spread',
              title: one.label,
              children: <p>{one.detail}</p>,
            }))}
          />
        </Stretch>
      ) : null}
    </>
  );
}
