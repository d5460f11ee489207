'use client';

import type { DueAnswer, RuleAnswer } from '@/lib/schemas/reminders';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { useApi } from '@/lib/ui/use-api';
import { DueList } from '../../../../_components/due-list';
import { PlotRules } from './plot-rules';
import { type MailFacts, WhenMailComes } from './when-mail-comes';

type DueAnswers = { today: string; due: DueAnswer[] };
type RemindersBoardProps = {
  siteId: string;
  first: { due: DueAnswers; rules: RuleAnswer[] };
  mayEdit: boolean;
  mail: MailFacts;
};

function byPlot(rules: readonly RuleAnswer[]): RuleAnswer[][] {
  const plots = new Map<string, RuleAnswer[]>();
  for (const rule of rules) plots.set(rule.plotId, [...(plots.get(rule.plotId) ?? []), rule]);
  return [...plots.values()];
}

export function RemindersBoard({ siteId, first, mayEdit, mail }: RemindersBoardProps) {
  const path = `/sites/${siteId}/reminders`;
  const due = useApi<DueAnswers>(path, { fallback: first.due });
  const rules = useApi<{ rules: RuleAnswer[] }>(`${path}/rules`, { fallback: { rules: first.rules } });
  const shown = due.data ?? first.due;
  const plots = byPlot(rules.data?.rules ?? first.rules);
  const changed = async () => {
    await Promise.all([due.reload(), rules.reload()]);
  };
  return (
    <>
      <PageTitle
        title="Reminders"
        lead="When each plot should be sampled again, and why on that day. A season or a laboratory changed is a comparison lost."
      />
      <Stretch>
        <h2 id="due" tabIndex={-1} className="mb-4 text-xl outline-none">
          Samples to come
        </h2>
        <ProblemNotice problem={due.problem} />
        {shown.due.length > 0 ? (
          <DueList due={shown.due} today={shown.today} focusId="due" onChanged={changed} />
        ) : (
          <p className="max-w-measure text-clay">
            {plots.length === 0
              ? 'Nothing yet: this site has no plots.'
              : 'No reminder is open. Switch a rule on below; its day stands here as soon as there is something to count from.'}
          </p>
        )}
      </Stretch>
      <Stretch title="Rules of each plot" ground="white">
        <ProblemNotice problem={rules.problem} />
        {plots.length > 0 ? (
          <PlotRules siteId={siteId} plots={plots} mayEdit={mayEdit} onChanged={changed} />
        ) : (
          <EmptyState
            shape="plan"
            title="No plots drawn yet"
            action={mayEdit ? <LinkButton href={`/sites/${siteId}`}>Draw the first plot</LinkButton> : null}
          >
            Rules belong to plots: after sulfur, after lime, or every year in the same season.
          </EmptyState>
        )}
      </Stretch>
      <WhenMailComes mail={mail} />
    </>
  );
}
