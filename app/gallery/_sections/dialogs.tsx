'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { localProblem } from '@/lib/ui/api';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { TextField } from '@/lib/ui/fields/text-field';

export function DialogsSection() {
  const [open, setOpen] = useState(false);
  return (
    <div className="flex flex-wrap gap-3">
      <Button look="quiet" onClick={() => setOpen(true)}>
        Open a dialog
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="Add a plot"
        description="A plot is ground that you sample as one."
        actions={
          <>
            <Button look="quiet" onClick={() => setOpen(false)}>
              Leave it
            </Button>
            <Button onClick={() => setOpen(false)}>Add this plot</Button>
          </>
        }
      >
        <TextField name="name" label="Plot name" />
      </Dialog>
      <ConfirmButton
        look="destructive"
        title="Withdraw this report?"
        sentence="Its 18 values leave the history of three plots. The file and the readings are kept, and you can confirm them again."
        confirmLabel="Withdraw this report"
        busyLabel="Withdrawing"
        onConfirm={() => Promise.resolve({ ok: false as const, problem: localProblem('unreachable', 'POST') })}
      >
        Withdraw this report
      </ConfirmButton>
    </div>
  );
}
