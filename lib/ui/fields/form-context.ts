'use client';

import { createContext, useContext, useId } from 'react';

type FormState = { scope: string; errors: Record<string, string> };

export const FormContext = createContext<FormState>({ scope: '', errors: {} });

export function fieldId(scope: string, name: string): string {
  return `${scope}${name.replace(/[^\w-]/g, '-')}`;
}

export type FieldBasics = {
  name: string;
  label: string;
  hint?: string | undefined;
  /** Overrides what the surrounding form says about this field. */
  error?: string | undefined;
  optional?: boolean | undefined;
  /** The label is still there for screen readers; for a field whose meaning the place makes plain. */
  hideLabel?: boolean | undefined;
  className?: string | undefined;
};

/** Ids and ARIA wiring of one field. */
export function useField({
  name,
  hint,
  error,
  id,
}: {
  name: string;
  hint?: unknown;
  error?: string | undefined;
  id?: string | undefined;
}) {
  const form = useContext(FormContext);
  const own = useId();
  const fieldKey = id ?? (form.scope ? fieldId(form.scope, name) : own);
  const said = error ?? form.errors[name];
  const describedBy = [hint ? `${fieldKey}-hint` : '', said ? `${fieldKey}-error` : ''].filter(Boolean).join(' ');
  return {
    id: fieldKey,
    error: said,
    control: {
      id: fieldKey,
      name,
      'aria-invalid': said ? (true as const) : undefined,
      'aria-describedby': describedBy || undefined,
    },
  };
}
