'use client';

import { type FocusEvent, useState } from 'react';
import type { ReviewSample } from '@/lib/schemas/review';
import { FieldError } from '@/lib/ui/fields/field-error';
import { TextField } from '@/lib/ui/fields/text-field';
import { type DepthUnit, shownDepth, typedDepth } from './depth-units';
import type { SampleSaves } from './use-sample-saves';

type DepthProps = { sample: ReviewSample; name: string; unit: DepthUnit; saves: SampleSaves };

const NOT_A_DEPTH = 'Write a depth like 6 or 15.5.';

/** From and to are saved together when the pair is left: alone, one of them could end above where the other begins. */
export function DepthFields({ sample, name, unit, saves }: DepthProps) {
  const [draft, setDraft] = useState<{ from: string; to: string } | null>(null);
  const [refused, setRefused] = useState<string>();
  const saved = { from: shownDepth(sample.depthFromCm, unit), to: shownDepth(sample.depthToCm, unit) };
  const shown = draft ?? saved;
  const finish = async () => {
    if (!draft) return;
    if (draft.from === saved.from && draft.to === saved.to) return setDraft(null);
    const [from, to] = [typedDepth(draft.from, unit), typedDepth(draft.to, unit)];
    if (!from.ok || !to.ok) return setRefused(NOT_A_DEPTH);
    const result = await saves.save({ depthFromCm: from.cm, depthToCm: to.cm });
    setRefused(result.ok ? undefined : (Object.values(result.problem.fields ?? {})[0] ?? result.problem.detail));
    if (result.ok) setDraft(null);
  };
  const leave = (event: FocusEvent<HTMLFieldSetElement>) => {
    if (!event.currentTarget.contains(event.relatedTarget)) void finish();
  };
  const field = (end: 'from' | 'to', label: string) => (
    <TextField
      name={`${end}-${sample.id}`}
      label={`${label}, ${unit}, ${name}`}
      hideLabel
      inputMode="decimal"
      autoComplete="off"
      className="min-w-0 flex-1"
      value={shown[end]}
      onChange={(event) => setDraft({ ...shown, [end]: event.currentTarget.value })}
      onKeyDown={(event) => {
        if (event.key === 'Enter') void finish();
        if (event.key === 'Escape') setDraft(null);
      }}
    />
  );
  return (
    <fieldset className="grid content-start gap-1.5" onBlur={leave}>
      <legend className="mb-1.5 font-semibold max-lg:text-sm lg:sr-only">Depth, {unit}</legend>
      <div className="flex items-center gap-1.5">
        {field('from', 'Depth from')}
        <span aria-hidden="true">–</span>
        {field('to', 'Depth to')}
      </div>
      <FieldError id={`depth-${sample.id}-error`}>{refused}</FieldError>
    </fieldset>
  );
}
