'use client';

import type { ComponentProps } from 'react';
import { cx } from '../cx';
import { FieldFrame } from './field-frame';
import { type FieldBasics, useField } from './form-context';

export type TextFieldProps = FieldBasics &
  Omit<ComponentProps<'input'>, keyof FieldBasics> & { unit?: string | undefined };

export function TextField({
  name,
  label,
  hint,
  error,
  optional,
  hideLabel,
  className,
  id,
  unit,
  ...rest
}: TextFieldProps) {
  const field = useField({ name, hint, error, id });
  const described = [field.control['aria-describedby'], unit ? `${field.id}-unit` : ''].filter(Boolean).join(' ');
  return (
    <FieldFrame {...{ label, hint, optional, hideLabel, className }} id={field.id} error={field.error}>
      <div className="flex items-stretch">
        <input
          type="text"
          {...rest}
          {...field.control}
          aria-describedby={described || undefined}
          className={cx('field-box', unit && 'rounded-r-none border-r-0')}
        />
        {unit ? (
          <span
            id={`${field.id}-unit`}
            className="flex flex-none items-center rounded-r-sm border border-b-2 border-fallow bg-silt px-3 text-sm whitespace-nowrap text-clay"
          >
            {unit}
          </span>
        ) : null}
      </div>
    </FieldFrame>
  );
}
