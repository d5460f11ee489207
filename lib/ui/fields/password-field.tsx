'use client';

import { useState } from 'react';
import { FieldFrame } from './field-frame';
import { useField } from './form-context';
import type { TextFieldProps } from './text-field';

export type PasswordFieldProps = Omit<TextFieldProps, 'type' | 'unit' | 'autoComplete'> & {
  autoComplete: 'current-password' | 'new-password';
};

/** Pasting and password managers are welcome; the letters can be looked at. */
export function PasswordField({
  name,
  label,
  hint,
  error,
  optional,
  hideLabel,
  className,
  id,
  ...rest
}: PasswordFieldProps) {
  const field = useField({ name, hint, error, id });
  const [seen, setSeen] = useState(false);
  return (
    <FieldFrame {...{ label, hint, optional, hideLabel, className }} id={field.id} error={field.error}>
      <div className="flex">
        <input
          {...rest}
          {...field.control}
          type={seen ? 'text' : 'password'}
          autoCapitalize="none"
          spellCheck={false}
          className="field-box rounded-r-none border-r-0"
        />
        <button
          type="button"
          aria-pressed={seen}
          aria-controls={field.id}
          aria-label={`Show ${label.toLowerCase()}`}
          className="min-h-(--target) min-w-20 flex-none rounded-r-sm border border-b-2 border-fallow bg-white px-3 text-sm font-semibold text-gley hover:bg-silt"
          onClick={() => setSeen(!seen)}
        >
          {seen ? 'Hide' : 'Show'}
        </button>
      </div>
    </FieldFrame>
  );
}
