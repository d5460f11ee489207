'use client';

import { X } from 'lucide-react';
import { Dialog as Base } from 'radix-ui';
import { type ReactNode, useRef } from 'react';
import { cx } from '../cx';

export type DialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** One sentence under the title, read with it. */
  description?: string | undefined;
  children?: ReactNode;
  /** Buttons, the main one last. */
  actions?: ReactNode;
  size?: 'normal' | 'wide';
  /** Where it sits on a phone: a sheet from the bottom edge, in reach of the thumb. */
  className?: string;
};

/**
 * Modal dialog. The backdrop is a plain element and the page is held still by a rule in base.css, because the
 * package's own scroll lock writes a style element, which the content security policy refuses.
 */
export function Dialog({
  open,
  onOpenChange,
  title,
  description,
  children,
  actions,
  size = 'normal',
  className,
}: DialogProps) {
  const from = useRef<HTMLElement | null>(null);
  return (
    <Base.Root open={open} onOpenChange={onOpenChange}>
      <Base.Portal>
        <div className="fixed inset-0 z-40 bg-humus/60" aria-hidden="true" data-dialog-open />
        <Base.Content
          {...(description ? {} : { 'aria-describedby': undefined })}
          onOpenAutoFocus={() => {
            from.current = document.activeElement instanceof HTMLElement ? document.activeElement : null;
          }}
          onCloseAutoFocus={(event) => {
            // There is no trigger of the package's own, so the way back is kept here.
            event.preventDefault();
            from.current?.focus();
          }}
          className={cx(
            'fixed inset-x-0 bottom-0 z-40 flex max-h-[92dvh] flex-col border-t-2 border-gley bg-chalk shadow-lift outline-none',
            'sm:inset-x-auto sm:top-1/2 sm:bottom-auto sm:left-1/2 sm:w-[calc(100%-3rem)] sm:-translate-x-1/2 sm:-translate-y-1/2 sm:rounded-md',
            size === 'wide' ? 'sm:max-w-4xl' : 'sm:max-w-xl',
            className,
          )}
        >
          <div className="pt-4 pr-16 pl-5 sm:pt-6 sm:pl-7">
            <Base.Title className="text-xl">{title}</Base.Title>
            {description ? <Base.Description className="mt-1 text-clay">{description}</Base.Description> : null}
          </div>
          {children ? (
            <div className="min-h-0 overflow-y-auto px-5 py-5 sm:px-7">{children}</div>
          ) : (
            <div className="h-5" />
          )}
          {actions ? (
            <div className="flex flex-col-reverse gap-3 border-t border-horizon-5 bg-silt px-5 py-4 sm:flex-row sm:justify-end sm:px-7">
              {actions}
            </div>
          ) : null}
          {/* Last in the order of keys, so that a dialog opens on its first field or its gentler button. */}
          <Base.Close
            aria-label="Close"
            className="absolute top-2.5 right-3 grid size-(--target) place-items-center rounded-sm text-clay hover:bg-silt hover:text-humus"
          >
            <X aria-hidden className="size-6" />
          </Base.Close>
        </Base.Content>
      </Base.Portal>
    </Base.Root>
  );
}
