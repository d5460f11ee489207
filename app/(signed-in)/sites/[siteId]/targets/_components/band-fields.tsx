'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { SelectField } from '@/lib/ui/fields/select-field';
import { TextField } from '@/lib/ui/fields/text-field';
import type { BandChoice } from './band-choices';

export type BandStart = {
  readonly analyte: string;
  readonly low: string;
  readonly high: string;
  readonly unit: string | null;
  readonly method: string | null;
};

type BandFieldsProps = {
  readonly row: number;
  readonly at: number;
  readonly start: BandStart;
  readonly choices: readonly BandChoice[];
  readonly onRemove: (() => void) | null;
};

export function BandFields({ row, at, start, choices, onRemove }: BandFieldsProps) {
  const [analyte, setAnalyte] = useState(start.analyte);
  const choice = choices.find((one) => one.key === analyte);
  const kept = analyte === start.analyte;
  return (
    <fieldset className="grid gap-4 border-t border-horizon-5 pt-4">
      <legend className="sr-only">Band {at + 1}</legend>
      <SelectField
        name={`analyte-${row}`}
        label="Analyte"
        options={choices.map(({ key, label }) => ({ value: key, label }))}
        value={analyte}
        onChange={(event) => setAnalyte(event.currentTarget.value)}
      />
      <div className="grid grid-cols-2 gap-4">
        <TextField name={`low-${row}`} label="From" inputMode="decimal" autoComplete="off" defaultValue={start.low} />
        <TextField name={`high-${row}`} label="To" inputMode="decimal" autoComplete="off" defaultValue={start.high} />
      </div>
      {/* The key lets unit and method begin anew when another analyte is chosen. */}
      <div key={analyte} className="grid gap-4 sm:grid-cols-2">
        <SelectField
          name={`unit-${row}`}
          label="Unit"
          options={choice?.units ?? []}
          defaultValue={(kept ? start.unit : null) ?? choice?.unit}
        />
        <SelectField
          name={`method-${row}`}
          label="Method"
          options={choice?.methods ?? []}
          prompt="Any method"
          defaultValue={kept ? (start.method ?? '') : ''}
        />
      </div>
      {onRemove ? (
        <div>
          <Button look="plain" onClick={onRemove}>
            Take this band out<span className="sr-only">: {choice?.label}</span>
          </Button>
        </div>
      ) : null}
    </fieldset>
  );
}
