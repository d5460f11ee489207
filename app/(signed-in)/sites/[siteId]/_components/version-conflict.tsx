'use client';

import { Button } from '@/lib/ui/actions/button';
import { Notice } from '@/lib/ui/feedback/notice';

export type Difference = { readonly field: string; readonly yours: string; readonly theirs: string };

type VersionConflictProps = {
  /** What both changed: "North bed". */
  readonly subject: string;
  readonly differences: readonly Difference[];
  readonly busy?: boolean;
  readonly onKeepTheirs: () => void;
  readonly onSaveYours: () => void;
};

/** Somebody else was faster. Both values side by side; nothing is thrown away until the person says which. */
export function VersionConflict({
  subject,
  differences,
  busy = false,
  onKeepTheirs,
  onSaveYours,
}: VersionConflictProps) {
  return (
    <Notice
      tone="look"
      live
      title={`Somebody else changed ${subject} meanwhile`}
      action={
        <>
          <Button busy={busy} busyLabel="Saving" onClick={onSaveYours}>
            {differences.length > 0 ? 'Save yours over it' : 'Save yours beside it'}
          </Button>
          <Button look="quiet" onClick={onKeepTheirs}>
            Keep theirs
          </Button>
        </>
      }
    >
      {differences.length === 0 ? (
        <p>They changed other things than you. Yours is not saved yet; both can stand.</p>
      ) : (
        <>
          <p>Yours is not saved yet. Choose which stays.</p>
          <table className="mt-2 w-full border-collapse text-left">
            <thead>
              <tr className="border-b border-ochre text-sm">
                <th scope="col" className="py-1 pr-3 font-semibold">
                  What
                </th>
                <th scope="col" className="py-1 pr-3 font-semibold">
                  Yours
                </th>
                <th scope="col" className="py-1 font-semibold">
                  Theirs
                </th>
              </tr>
            </thead>
            <tbody>
              {differences.map(({ field, yours, theirs }) => (
                <tr key={field} className="align-top">
                  <th scope="row" className="py-1 pr-3 font-normal">
                    {field}
                  </th>
                  <td className="py-1 pr-3 font-semibold break-words">{yours === '' ? 'nothing' : yours}</td>
                  <td className="py-1 font-semibold break-words">{theirs === '' ? 'nothing' : theirs}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </>
      )}
    </Notice>
  );
}
