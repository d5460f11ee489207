'use client';

import type { BatchFile } from '@/lib/schemas/batches';
import { Button } from '@/lib/ui/actions/button';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { FileButton } from '@/lib/ui/files/file-button';
import { ACCEPTED_FILES, counted } from '@/lib/ui/files/upload-item';
import { useSubmit } from '@/lib/ui/use-submit';

type MissingProps = {
  path: string;
  missing: readonly BatchFile[];
  /** Answers the files that are none of the missing ones. */
  onChosen: (files: readonly File[]) => readonly File[];
  onLeftOut: () => void;
};

/** The page was left before these were sent: they are on the grower's own device, and can be chosen again or left out. */
export function MissingFiles({ path, missing, onChosen, onLeftOut }: MissingProps) {
  const { send, busy, problem } = useSubmit();
  const announce = useAnnounce();
  const chosen = (files: readonly File[]) => {
    const others = onChosen(files);
    if (others.length === files.length)
      announce('None of these is among the missing ones, by name and size. Nothing was sent.', { tone: 'look' });
  };
  const leaveOut = async () => {
    if ((await send(`${path}/leave-out`)).ok) onLeftOut();
  };
  return (
    <>
      <ProblemNotice problem={problem} />
      <Notice
        tone="look"
        title={`${counted(missing.length, 'file')} not here yet`}
        action={
          <>
            <FileButton multiple accept={ACCEPTED_FILES} onFiles={chosen}>
              Choose them again
            </FileButton>
            <Button look="quiet" busy={busy} busyLabel="Leaving them out" onClick={() => void leaveOut()}>
              Go on without them
            </Button>
          </>
        }
      >
        The page was left before they were sent, or the sending was stopped. Everything that had arrived is kept. You
        may choose the whole folder again: only what is missing is sent.
      </Notice>
    </>
  );
}
