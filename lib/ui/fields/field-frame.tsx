import type { ReactNode } from 'react';
import { cx } from '../cx';
import { FieldError } from './field-error';
import type { FieldBasics } from './form-context';

type FieldFrameProps = Pick<FieldBasics, 'label' | 'hint' | 'error' | 'optional' | 'hideLabel' | 'className'> & {
  id: string;
  children: ReactNode;
};

/** Label above, hint under it, the control, then what is wrong with it. */
export function FieldFrame({ id, label, hint, error, optional, hideLabel, className, children }: FieldFrameProps) {
  return (
    <div className={cx('grid gap-1.5', className)}>
      <label htmlFor={id} className={hideLabel ? 'sr-only' : 'font-semibold'}>
        {label}
        {optional ? <span className="font-normal text-clay"> (if you like)</span> : null}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="-mt-1 max-w-measure text-sm text-clay">
          {hint}
        </p>
      ) : null}
      {children}
      <FieldError id={`${id}-error`}>{error}</FieldError>
    </div>
  );
}
