'use client';

import { useState } from 'react';
import { Button } from '../actions/button';
import { TextField } from '../fields/text-field';
import { boundsOf, type PlanRectangle } from './geometry';
import { lengthNumber, readLength } from './measure';
import type { LengthUnit, PlanOutline } from './types';

const FIELDS = [
  { key: 'x', label: 'From the left' },
  { key: 'y', label: 'From the bottom' },
  { key: 'width', label: 'Width' },
  { key: 'height', label: 'Length' },
] as const;

type Key = (typeof FIELDS)[number]['key'];
type Errors = Partial<Record<Key, string>>;

interface PlotFormProps {
  readonly outline: PlanOutline;
  readonly unit: LengthUnit;
  readonly submitLabel: string;
  readonly onSubmit: (rectangle: PlanRectangle) => void;
  readonly onCancel?: () => void;
}

/** Place and size in numbers: exact, not snapped. */
export function PlotForm({ outline, unit, submitLabel, onSubmit, onCancel }: PlotFormProps) {
  const bounds = boundsOf(outline) ?? { minX: 0, minY: 0, maxX: 0, maxY: 0 };
  const now: PlanRectangle = {
    x: bounds.minX,
    y: bounds.minY,
    width: bounds.maxX - bounds.minX,
    height: bounds.maxY - bounds.minY,
  };
  const [typed, setTyped] = useState<Partial<Record<Key, string>>>({});
  const [errors, setErrors] = useState<Errors>({});
  const submit = () => {
    const found: Errors = {};
    const read = (key: Key): number => {
      const text = typed[key];
      // A field that was not touched keeps its exact value and not the rounded one on screen.
      if (text === undefined) return now[key];
      const answer = readLength(text, unit);
      if (!answer.ok) found[key] = `Write a length like 12.5 or 41 ft.`;
      else if ((key === 'width' || key === 'height') && answer.metres <= 0) found[key] = 'Longer than nothing, please.';
      return answer.ok ? answer.metres : 0;
    };
    const rectangle = { x: read('x'), y: read('y'), width: read('width'), height: read('height') };
    setErrors(found);
    if (Object.keys(found).length > 0) return;
    setTyped({});
    onSubmit(rectangle);
  };
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
      className="grid gap-3"
    >
      <div className="grid grid-cols-2 gap-3 lg:grid-cols-4">
        {FIELDS.map(({ key, label }) => (
          <TextField
            key={key}
            name={key}
            label={label}
            unit={unit}
            inputMode="decimal"
            autoComplete="off"
            value={typed[key] ?? lengthNumber(now[key], unit)}
            onChange={(event) => setTyped({ ...typed, [key]: event.target.value })}
            error={errors[key]}
          />
        ))}
      </div>
      <div className="flex flex-wrap gap-2">
        <Button type="submit" look="quiet">
          {submitLabel}
        </Button>
        {onCancel ? (
          <Button look="plain" onClick={onCancel}>
            Leave it
          </Button>
        ) : null}
      </div>
    </form>
  );
}
