'use client';

import type { ComponentProps } from 'react';
import { FieldFrame } from './field-frame';
import { type FieldBasics, useField } from './form-context';

export type TextAreaFieldProps = FieldBasics & Omit<ComponentProps<'textarea'>, keyof FieldBasics>;

export function TextAreaField({
  name,
  label,
  hint,
  error,
  optional,
  hideLabel,
  className,
  id,
  rows = 4,
  ...rest
}: TextAreaFieldProps) {
  const field = useField({ name, hint, error, id });
  return (
    <FieldFrame {...{ label, hint, optional, hideLabel, className }} id={field.id} error={field.error}>
      <textarea rows={rows} {...rest} {...field.control} className="field-box" />
    </FieldFrame>
  );
}
