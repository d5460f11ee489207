import Link from 'next/link';
import type { ComponentProps, ReactNode } from 'react';
import { cx } from '../cx';
import { type ButtonLook, type ButtonSize, buttonClass } from './button-style';

export type LinkButtonProps = ComponentProps<typeof Link> & {
  look?: ButtonLook;
  size?: ButtonSize;
  wide?: boolean;
  icon?: ReactNode;
};

/** Goes somewhere, and looks like a button because going there is the next step. */
export function LinkButton({ look = 'primary', size, wide, icon, className, children, ...rest }: LinkButtonProps) {
  return (
    <Link {...rest} className={cx(buttonClass(look, size, wide), className)}>
      {icon}
      <span>{children}</span>
    </Link>
  );
}
