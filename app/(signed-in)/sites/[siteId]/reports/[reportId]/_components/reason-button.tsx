'use client';

import { useState } from 'react';
import { Button, type ButtonProps } from '@/lib/ui/actions/button';
import type { ApiResult, Problem } from '@/lib/ui/api';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { Form } from '@/lib/ui/fields/form';
import { TextField } from '@/lib/ui/fields/text-field';

type ReasonButtonProps = Pick<ButtonProps, 'look'> & {
  label: string;
  /** Said with the label where several buttons of the name stand on a page. */
  about?: string;
  title: string;
  sentence: string;
  reasonLabel: string;
  hint?: string;
  sendLabel: string;
  onSend: (reason: string) => Promise<ApiResult<unknown>>;
};

/** A step that needs a reason: asked for in a dialog, sent once. */
export function ReasonButton(props: ReasonButtonProps) {
  const { label, about, title, sentence, reasonLabel, hint, sendLabel, onSend, look = 'quiet' } = props;
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const change = (next: boolean) => {
    if (busy) return;
    setProblem(undefined);
    setOpen(next);
  };
  const send = async (values: Record<string, string>) => {
    if (busy) return;
    setBusy(true);
    setProblem(undefined);
    const result = await onSend(values.reason ?? '');
    setBusy(false);
    if (result.ok) setOpen(false);
    else setProblem(result.problem);
  };
  return (
    <>
      <Button
        look={look}
        size="small"
        className="min-h-(--target)!"
        aria-haspopup="dialog"
        onClick={() => change(true)}
      >
        {label}
        {about ? <span className="sr-only"> {about}</span> : null}
      </Button>
      <Dialog open={open} onOpenChange={change} title={title} description={sentence}>
        <Form onSubmit={send} problem={problem} label={title}>
          <TextField name="reason" label={reasonLabel} hint={hint} maxLength={300} autoComplete="off" />
          <div className="flex flex-wrap justify-end gap-3">
            <Button look="quiet" onClick={() => change(false)}>
              Leave it
            </Button>
            <Button type="submit" busy={busy}>
              {sendLabel}
            </Button>
          </div>
        </Form>
      </Dialog>
    </>
  );
}
