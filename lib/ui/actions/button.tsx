'use client';

import type { ComponentProps, MouseEvent, ReactNode } from 'react';
import { cx } from '../cx';
import { type ButtonLook, type ButtonSize, buttonClass } from './button-style';

export type ButtonProps = Omit<ComponentProps<'button'>, 'disabled'> & {
  look?: ButtonLook;
  size?: ButtonSize;
  wide?: boolean;
  icon?: ReactNode;
  /** Keeps its place and its focus, ignores presses, and says what it is doing. */
  busy?: boolean;
  busyLabel?: string;
  /** Why it cannot be pressed now; shown on hover and read with the button. The button stays in the tab order. */
  unavailable?: string | false | undefined;
};

export function Button({
  look = 'primary',
  size = 'normal',
  wide = false,
  icon,
  busy = false,
  busyLabel,
  unavailable,
  type = 'button',
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  const still = busy || Boolean(unavailable);
  const press = (event: MouseEvent<HTMLButtonElement>) => {
    if (still) {
      event.preventDefault();
      return;
    }
    onClick?.(event);
  };
  return (
    <button
      {...rest}
      type={type}
      className={cx(buttonClass(look, size, wide), className)}
      aria-disabled={still || undefined}
      aria-busy={busy || undefined}
      title={unavailable || rest.title}
      onClick={press}
    >
      {busy ? <BusyMark /> : icon}
      <span>{busy && busyLabel ? busyLabel : children}</span>
      {unavailable ? <span className="sr-only">({unavailable})</span> : null}
    </button>
  );
}

/** Three layers settling, instead of a spinning wheel. */
export function BusyMark() {
  return (
    <svg viewBox="0 0 16 16" className="busy-mark size-4 flex-none" aria-hidden="true" fill="currentColor">
      <rect x="2" y="2" width="12" height="3" />
      <rect x="2" y="6.5" width="12" height="3" />
      <rect x="2" y="11" width="12" height="3" />
    </svg>
  );
}
