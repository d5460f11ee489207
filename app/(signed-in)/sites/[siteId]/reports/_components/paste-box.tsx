'use client';

import { ClipboardPaste } from 'lucide-react';
import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { TextAreaField } from '@/lib/ui/fields/text-area-field';
import { pastedFault, pastedFile } from './pasted-file';

type PasteBoxProps = {
  /** The text as a file, sent and kept like any other. */
  readonly onFile: (file: File) => void;
  /** The day of the person, for the file's name. */
  readonly today: string;
};

/** Numbers that came in a mail: pasted, kept as a text file, and read like a report. */
export function PasteBox({ onFile, today }: PasteBoxProps) {
  const [open, setOpen] = useState(false);
  const [text, setText] = useState('');
  const [fault, setFault] = useState<string>();
  const change = (next: boolean) => {
    setOpen(next);
    setFault(undefined);
  };
  const send = () => {
    const found = pastedFault(text);
    setFault(found ?? undefined);
    if (found !== null) return;
    onFile(pastedFile(text, today));
    setText('');
    change(false);
  };
  return (
    <>
      <Button
        look="quiet"
        size="small"
        className="min-h-(--target)!"
        icon={<ClipboardPaste aria-hidden="true" className="size-5" />}
        aria-haspopup="dialog"
        onClick={() => change(true)}
      >
        Paste from a mail
      </Button>
      <Dialog
        open={open}
        onOpenChange={change}
        size="wide"
        title="Paste the numbers from a mail"
        description="The text is kept as it is and read like a report: you look at every value beside it before anything counts."
        actions={
          <>
            <Button look="quiet" onClick={() => change(false)}>
              Leave it
            </Button>
            <Button onClick={send}>Send this text</Button>
          </>
        }
      >
        <TextAreaField
          name="pasted"
          label="Text of the mail"
          hint="With the names, units and the day if the mail gives them. What is typed here stays if you close this."
          rows={12}
          value={text}
          spellCheck={false}
          {...(fault === undefined ? {} : { error: fault })}
          onChange={(event) => setText(event.currentTarget.value)}
          placeholder={
            'For example:\nSample: North bed, 0-6 in\npH 6.4\nPhosphorus (Mehlich-3)  52 ppm\nPotassium  188 ppm'
          }
        />
      </Dialog>
    </>
  );
}
