'use client';

import type { ChangeEvent } from 'react';
import { cx } from '../cx';
import { FieldError } from './field-error';
import { type FieldBasics, useField } from './form-context';

export type RadioOption = { value: string; label: string; hint?: string; disabled?: boolean };

export type RadioGroupProps = FieldBasics & {
  options: readonly RadioOption[];
  value?: string;
  defaultValue?: string | undefined;
  onChange?: (event: ChangeEvent<HTMLInputElement>) => void;
  /** Side by side where there is room; for two to four short words. */
  inline?: boolean;
  id?: string;
};

export function RadioGroup(props: RadioGroupProps) {
  const {
    name,
    label,
    hint,
    error,
    optional,
    hideLabel,
    className,
    id,
    options,
    value,
    defaultValue,
    onChange,
    inline,
  } = props;
  const field = useField({ name, hint, error, id });
  return (
    <fieldset
      id={field.id}
      tabIndex={-1}
      aria-describedby={field.control['aria-describedby']}
      className={cx('grid gap-1', className)}
    >
      <legend className={hideLabel ? 'sr-only' : 'font-semibold'}>
        {label}
        {optional ? <span className="font-normal text-clay"> (if you like)</span> : null}
      </legend>
      {hint ? (
        <p id={`${field.id}-hint`} className="max-w-measure text-sm text-clay">
          {hint}
        </p>
      ) : null}
      <div className={inline ? 'flex flex-wrap gap-x-7' : 'grid'}>
        {options.map((option) => (
          <label key={option.value} className="flex min-h-(--target) items-start gap-3 py-2">
            <input
              type="radio"
              name={name}
              value={option.value}
              disabled={option.disabled}
              aria-describedby={option.hint ? `${field.id}-${option.value}` : undefined}
              className="tick tick-round mt-0.5"
              {...(value === undefined
                ? { defaultChecked: option.value === defaultValue }
                : { checked: option.value === value })}
              {...(onChange ? { onChange } : value === undefined ? {} : { readOnly: true })}
            />
            <span>
              {option.label}
              {option.hint ? (
                <span id={`${field.id}-${option.value}`} className="block max-w-measure text-sm text-clay">
                  {option.hint}
                </span>
              ) : null}
            </span>
          </label>
        ))}
      </div>
      <FieldError id={`${field.id}-error`}>{field.error}</FieldError>
    </fieldset>
  );
}
