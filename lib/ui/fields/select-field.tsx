'use client';

import { ChevronDown } from 'lucide-react';
import type { ComponentProps } from 'react';
import { FieldFrame } from './field-frame';
import { type FieldBasics, useField } from './form-context';

export type Option = { value: string; label: string; disabled?: boolean };

export type SelectFieldProps = FieldBasics &
  Omit<ComponentProps<'select'>, keyof FieldBasics | 'children'> & {
    options: readonly Option[];
    /** First line with an empty value; leave out when one of the options is always chosen. */
    prompt?: string;
  };

/** The platform's own list: right on phones, by keyboard and for screen readers. */
export function SelectField(props: SelectFieldProps) {
  const { name, label, hint, error, optional, hideLabel, className, id, options, prompt, ...rest } = props;
  const field = useField({ name, hint, error, id });
  return (
    <FieldFrame {...{ label, hint, optional, hideLabel, className }} id={field.id} error={field.error}>
      <div className="relative">
        <select {...rest} {...field.control} className="field-box">
          {prompt === undefined ? null : <option value="">{prompt}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
        <ChevronDown
          aria-hidden
          className="pointer-events-none absolute top-1/2 right-3 size-5 -translate-y-1/2 text-clay"
        />
      </div>
    </FieldFrame>
  );
}
