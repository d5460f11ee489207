'use client';

import { useState } from 'react';
import type { RuleAnswer } from '@/lib/schemas/reminders';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { CheckField } from '@/lib/ui/fields/check-field';
import { useSubmit } from '@/lib/ui/use-submit';
import { inWords, RULE_ORDER, RULE_WORDS } from '../../../../_components/due-words';

type PlotRulesProps = {
  siteId: string;
  plots: readonly RuleAnswer[][];
  mayEdit: boolean;
  onChanged: () => Promise<void>;
};

/** The day a rule comes to, or what it lacks. */
export function dayOrWhyNot(rule: RuleAnswer): string {
  if (rule.dueOn === null) return rule.why;
  return rule.active
    ? `Comes due ${inWords(rule.dueOn)}. ${rule.why}`
    : `Off. It would come due ${inWords(rule.dueOn)}.`;
}

export function PlotRules({ siteId, plots, mayEdit, onChanged }: PlotRulesProps) {
  return (
    <ul className="border-y border-horizon-5">
      {plots.map((rules) => (
        <li key={rules[0]?.plotId} className="border-b border-horizon-5 py-4 last:border-0">
          <fieldset className="grid gap-x-8 gap-y-1 lg:grid-cols-[minmax(9rem,1fr)_repeat(3,minmax(0,1.4fr))]">
            <legend className="float-left min-w-0 pt-2 text-lg font-semibold break-words lg:contents">
              <span className="lg:pt-2">{rules[0]?.plotName}</span>
            </legend>
            {RULE_ORDER.map((kind) => {
              const rule = rules.find((one) => one.kind === kind);
              if (!rule) return null;
              return mayEdit ? (
                <RuleSwitch key={kind} siteId={siteId} rule={rule} onChanged={onChanged} />
              ) : (
                <RuleRead key={kind} rule={rule} />
              );
            })}
          </fieldset>
        </li>
      ))}
    </ul>
  );
}

type RuleSwitchProps = { siteId: string; rule: RuleAnswer; onChanged: () => Promise<void> };

function RuleSwitch({ siteId, rule, onChanged }: RuleSwitchProps) {
  const { send, problem } = useSubmit();
  const announce = useAnnounce();
  /** What was pressed, until the list says so itself. */
  const [asked, setAsked] = useState<boolean>();
  const name = RULE_WORDS[rule.kind];
  const change = async (active: boolean) => {
    if (asked !== undefined) return;
    setAsked(active);
    const body = { plotId: rule.plotId, kind: rule.kind, active };
    const result = await send(`/sites/${siteId}/reminders/rules`, { method: 'PUT', body });
    if (result.ok) {
      announce(`${rule.plotName}, ${name.toLowerCase()}: ${active ? 'on' : 'off'}.`, { tone: 'saved', visible: false });
      await onChanged();
    }
    setAsked(undefined);
  };
  return (
    <div className="min-w-0">
      <CheckField
        name={`${rule.plotId}-${rule.kind}`}
        label={name}
        hint={dayOrWhyNot(rule)}
        checked={asked ?? rule.active}
        aria-busy={asked !== undefined || undefined}
        onChange={(event) => void change(event.target.checked)}
      />
      <ProblemNotice problem={problem} />
    </div>
  );
}

function RuleRead({ rule }: { rule: RuleAnswer }) {
  return (
    <div className="min-w-0 py-1.5">
      <p className="flex flex-wrap gap-x-3">
        <span>{RULE_WORDS[rule.kind]}</span>
        <StatusWord status={rule.active ? 'done' : 'off'}>{rule.active ? 'On' : 'Off'}</StatusWord>
      </p>
      {rule.active ? <p className="max-w-measure text-sm text-clay">{dayOrWhyNot(rule)}</p> : null}
    </div>
  );
}
