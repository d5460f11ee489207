'use client';

import { type ReactNode, useState } from 'react';
import type { ApiResult, Problem } from '../api';
import { Dialog } from '../feedback/dialog';
import { ProblemNotice } from '../feedback/problem-notice';
import { Button, type ButtonProps } from './button';

export type ConfirmButtonProps = Pick<ButtonProps, 'look' | 'size' | 'wide' | 'icon' | 'unavailable'> & {
  children: ReactNode;
  /** The question, and under it what will happen and what is kept. */
  title: string;
  sentence: string;
  /** The verb with its object: "Withdraw this report". */
  confirmLabel: string;
  busyLabel?: string;
  keepLabel?: string;
  /** A refusal keeps the dialog open with its sentence. */
  onConfirm: () => Promise<ApiResult<unknown>> | Promise<void>;
};

export function ConfirmButton(props: ConfirmButtonProps) {
  const {
    children,
    title,
    sentence,
    confirmLabel,
    busyLabel,
    keepLabel = 'Leave it',
    onConfirm,
    look = 'quiet',
    ...button
  } = props;
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();

  const confirm = async () => {
    setBusy(true);
    setProblem(undefined);
    const result = await onConfirm();
    setBusy(false);
    if (result && !result.ok) setProblem(result.problem);
    else setOpen(false);
  };
  const change = (next: boolean) => {
    if (busy) return;
    setProblem(undefined);
    setOpen(next);
  };

  return (
    <>
      <Button {...button} look={look} aria-haspopup="dialog" onClick={() => change(true)}>
        {children}
      </Button>
      <Dialog
        open={open}
        onOpenChange={change}
        title={title}
        description={sentence}
        actions={
          <>
            <Button look="quiet" onClick={() => change(false)}>
              {keepLabel}
            </Button>
            <Button
              look={look === 'destructive' ? 'destructive' : 'primary'}
              busy={busy}
              {...(busyLabel ? { busyLabel } : {})}
              onClick={() => void confirm()}
            >
              {confirmLabel}
            </Button>
          </>
        }
      >
        {problem ? <ProblemNotice problem={problem} /> : null}
      </Dialog>
    </>
  );
}
