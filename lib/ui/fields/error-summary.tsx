'use client';

import { useEffect, useRef } from 'react';
import type { Problem } from '../api';
import { ToneMark } from '../feedback/tone-mark';
import { fieldId } from './form-context';

type ErrorSummaryProps = { problem?: Problem | undefined; errors: Record<string, string>; scope: string };

/** What stopped the form, said once at the top with a way to each field. Takes the focus when it appears. */
export function ErrorSummary({ problem, errors, scope }: ErrorSummaryProps) {
  const box = useRef<HTMLDivElement>(null);
  const list = Object.entries(errors);
  const shown = problem !== undefined || list.length > 0;
  useEffect(() => {
    // Errors and problem objects are new after each attempt, so a second failed attempt is announced too.
    if (shown && (problem || errors)) box.current?.focus();
  }, [shown, problem, errors]);
  if (!shown) return null;

  const count = list.length === 1 ? 'One thing needs another look' : `${list.length} things need another look`;
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      data-testid="error-summary"
      className="flex overflow-hidden rounded-sm border border-iron bg-iron-wash"
    >
      <span className="flex w-10 flex-none justify-center bg-iron pt-3.5 text-chalk">
        <ToneMark tone="error" className="size-5" />
      </span>
      <div className="px-4 py-3">
        <p className="font-bold">{list.length > 0 ? count : problem?.title}</p>
        {problem && list.length === 0 ? (
          <p>
            {problem.detail}
            {problem.reference ? <span className="block text-sm text-clay">Reference: {problem.reference}</span> : null}
          </p>
        ) : null}
        {list.length > 0 ? (
          <ul className="mt-1 grid gap-1">
            {list.map(([name, sentence]) => (
              <li key={name}>
                <a
                  className="text-link inline-block py-1"
                  href={`#${fieldId(scope, name)}`}
                  onClick={(event) => {
                    event.preventDefault();
                    document.getElementById(fieldId(scope, name))?.focus();
                  }}
                >
                  {sentence}
                </a>
              </li>
            ))}
          </ul>
        ) : null}
      </div>
    </div>
  );
}
