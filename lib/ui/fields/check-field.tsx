'use client';

import type { ComponentProps } from 'react';
import { cx } from '../cx';
import { FieldError } from './field-error';
import { type FieldBasics, useField } from './form-context';

export type CheckFieldProps = Omit<FieldBasics, 'optional' | 'hideLabel'> &
  Omit<ComponentProps<'input'>, keyof FieldBasics | 'type'>;

export function CheckField({ name, label, hint, error, className, id, ...rest }: CheckFieldProps) {
  const field = useField({ name, hint, error, id });
  return (
    <div className={cx('grid gap-1', className)}>
      <label htmlFor={field.id} className="flex min-h-(--target) items-start gap-3 py-2">
        <input type="checkbox" {...rest} {...field.control} className="tick mt-0.5" />
        <span>{label}</span>
      </label>
      {hint ? (
        <p id={`${field.id}-hint`} className="-mt-2 max-w-measure pl-9 text-sm text-clay">
          {hint}
        </p>
      ) : null}
      <FieldError id={`${field.id}-error`}>{field.error}</FieldError>
    </div>
  );
}
