'use client';

import { useEffect, useState } from 'react';
import { material } from '@/lib/domain/materials';
import type { SuggestChangeAnswer } from '@/lib/schemas/applications';
import { Button } from '@/lib/ui/actions/button';
import { NumberField } from '@/lib/ui/fields/number-field';
import { SelectField } from '@/lib/ui/fields/select-field';
import { useApi } from '@/lib/ui/use-api';
import { OWN, readNumber, toAreaM2, toDepthCm, type Units } from './application-body';
import type { Watched } from './application-fields';
import {
  INTENT_OPTIONS,
  type IntentRow,
  type Suggestion,
  suggestionWords,
  typedSuggestion,
  unitOfAnalyte,
} from './intents';

const MOST_ROWS = 6;
const SETTLED_AFTER_MS = 350;

type MeantChangeProps = {
  siteId: string;
  plotId: string;
  watched: Watched;
  units: Units;
  rows: readonly IntentRow[];
  onRows: (rows: readonly IntentRow[]) => void;
};

/** The question a published rule can answer, or null while it cannot be asked. */
export function suggestionPath(siteId: string, plotId: string, watched: Watched, units: Units): string | null {
  const amount = readNumber(watched.amount).value;
  if (watched.material === '' || watched.material === OWN || amount === undefined || amount <= 0) return null;
  const query = new URLSearchParams({
    plotId,
    material: watched.material,
    amount: String(amount),
    amountUnit: watched.amountUnit,
  });
  const area = readNumber(watched.area).value;
  const depth = readNumber(watched.depth).value;
  if (area !== undefined && area > 0) query.set('areaM2', String(toAreaM2(area, units)));
  if (depth !== undefined && depth >= 0) query.set('depthCm', String(toDepthCm(depth, units)));
  return `/sites/${siteId}/applications/expected-change?${query}`;
}

export function MeantChange({ siteId, plotId, watched, units, rows, onRows }: MeantChangeProps) {
  const path = useSettled(suggestionPath(siteId, plotId, watched, units));
  const { data, problem } = useApi<SuggestChangeAnswer>(path);
  const known = material(watched.material);
  const reaction = known.ok ? known.material.reaction : watched.material === OWN ? watched.reaction || null : undefined;
  const change = (key: number, part: Partial<IntentRow>) =>
    onRows(rows.map((row) => (row.key === key ? { ...row, ...part } : row)));
  const add = (part: Partial<IntentRow>) =>
    onRows([...rows, { key: (rows.at(-1)?.key ?? -1) + 1, analyte: '', typed: '', from: null, ...part }]);
  const use = (one: Suggestion) => {
    const part = { analyte: one.analyte, typed: typedSuggestion(one), from: one };
    const free = rows.find((row) => row.analyte === one.analyte) ?? rows.find((row) => row.analyte === '');
    if (free) change(free.key, part);
    else add(part);
  };
  return (
    <fieldset className="grid gap-4 border-y border-horizon-5 py-5">
      <legend className="float-left w-full font-display text-lg font-semibold">What it is meant to change</legend>
      <p className="clear-both max-w-measure text-sm text-clay">
        With its sign, once all has reacted: -0.5 lowers pH by half a unit. A later test is held against it. Leave it
        out and the record stands on the chart, with no verdict.
      </p>
      {reaction === null ? (
        <p className="max-w-measure">
          How this material acts with time is not known here, so its effect cannot be checked. The record still stands
          beside the tests.
        </p>
      ) : null}
      <div aria-live="polite" className="grid gap-3 empty:hidden">
        {problem ? <p className="text-sm text-clay">No suggestion now: {problem.detail}</p> : null}
        {data?.sentence ? <p className="max-w-measure text-sm">{data.sentence}</p> : null}
        {data?.suggestions.map((one) => (
          <Suggested key={one.analyte} one={one} onUse={() => use(one)} />
        ))}
      </div>
      {rows.map((row, index) => (
        <div key={row.key} className="grid items-start gap-4 sm:grid-cols-2">
          <SelectField
            name={`intents.${row.key}.analyte`}
            label={index === 0 ? 'Analyte' : `Analyte ${index + 1}`}
            prompt="None to check"
            value={row.analyte}
            options={INTENT_OPTIONS}
            onChange={(event) => change(row.key, { analyte: event.currentTarget.value })}
          />
          <NumberField
            name={`intents.${row.key}.fullChange`}
            label={index === 0 ? 'Change meant' : `Change meant ${index + 1}`}
            signed
            unit={unitOfAnalyte(row.analyte) || undefined}
            value={row.typed}
            onChange={(event) => change(row.key, { typed: event.currentTarget.value })}
          />
        </div>
      ))}
      {rows.length < MOST_ROWS ? (
        <div>
          <Button look="plain" size="small" onClick={() => add({})}>
            Add another analyte
          </Button>
        </div>
      ) : null}
    </fieldset>
  );
}

function Suggested({ one, onUse }: { one: Suggestion; onUse: () => void }) {
  const { label, range } = suggestionWords(one);
  return (
    <div className="grid gap-1 border-l-4 border-gley bg-gley-wash px-4 py-3">
      <p>
        Published rules lead one to expect of {label}: <strong>{range}</strong>.
      </p>
      <p className="text-sm text-clay">
        Source: {one.source}.
        {one.weakSource ? ' At least one of these is a weak source, so keep the whole range in mind.' : ''}
      </p>
      <div>
        <Button size="small" look="quiet" onClick={onUse}>
          Use {typedSuggestion(one)} as the change meant
        </Button>
      </div>
    </div>
  );
}

/** Asks once the typing rests, not at each key. */
function useSettled<T>(value: T): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), SETTLED_AFTER_MS);
    return () => clearTimeout(timer);
  }, [value]);
  return settled;
}
