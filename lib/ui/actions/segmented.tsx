'use client';

import { useId } from 'react';

export type SegmentedProps<V extends string> = {
  label: string;
  options: readonly { value: V; label: string }[];
  value: V;
  onChange: (value: V) => void;
};

/** A choice of two to five short words that changes what is shown at once. Arrow keys move it, as in any radio group. */
export function Segmented<V extends string>({ label, options, value, onChange }: SegmentedProps<V>) {
  const name = useId();
  return (
    <fieldset className="min-w-0">
      <legend className="sr-only">{label}</legend>
      <div className="inline-flex max-w-full gap-x-1 overflow-x-auto border-b border-fallow">
        {options.map((option) => (
          <label
            key={option.value}
            className="relative -mb-px flex min-h-(--target) items-center rounded-t-sm border-b-4 border-transparent px-3 font-semibold whitespace-nowrap text-clay hover:bg-silt hover:text-humus has-checked:border-gley has-checked:text-humus has-focus-visible:-outline-offset-3 has-focus-visible:outline-3 has-focus-visible:outline-gley"
          >
            <input
              type="radio"
              className="sr-only"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
