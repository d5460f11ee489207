'use client';

import { type FormEvent, type ReactNode, useId, useMemo } from 'react';
import type { Problem } from '../api';
import { cx } from '../cx';
import { ErrorSummary } from './error-summary';
import { FormContext } from './form-context';

export type FormProps = {
  /** Gets every named field as text; files and repeated names are read from `data`. */
  onSubmit: (values: Record<string, string>, data: FormData) => void | Promise<void>;
  /** The API's refusal: its sentence stands above the fields, its field sentences at the fields. */
  problem?: Problem | undefined;
  /** Sentences found before sending, by field name; they win over the problem's. */
  errors?: Record<string, string> | undefined;
  children: ReactNode;
  className?: string;
  label?: string;
};

const NONE: Record<string, string> = {};

export function Form({ onSubmit, problem, errors = NONE, children, className, label }: FormProps) {
  const scope = `f${useId().replace(/\W/g, '')}-`;
  const all = useMemo(() => ({ ...problem?.fields, ...errors }), [problem, errors]);
  const state = useMemo(() => ({ scope, errors: all }), [scope, all]);
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    void onSubmit(textValues(data), data);
  };
  return (
    <FormContext.Provider value={state}>
      {/* Checked by the same schema as the server, with our sentences instead of the browser's. */}
      <form noValidate onSubmit={submit} aria-label={label} className={cx('grid max-w-measure gap-6', className)}>
        <ErrorSummary problem={problem} errors={all} scope={scope} />
        {children}
      </form>
    </FormContext.Provider>
  );
}

function textValues(data: FormData): Record<string, string> {
  return Object.fromEntries([...data].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : [])));
}
