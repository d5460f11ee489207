import type { ReactNode } from 'react';
import { BusyMark, Button } from '../actions/button';

/** A quiet panel in the shape of the page that is not there. */
export function ViewPanel({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <div className="grid min-h-64 content-center justify-items-center gap-3 border border-dashed border-fallow bg-silt p-6 text-center">
      <p className="font-display text-lg font-semibold">{title}</p>
      {children}
    </div>
  );
}

export function ViewLoading({ fileName }: { fileName: string }) {
  return (
    <div className="grid min-h-64 content-center justify-items-center gap-3 border border-fallow bg-white p-6 text-clay">
      <BusyMark />
      <p role="status">Fetching {fileName}</p>
    </div>
  );
}

const SENTENCES = {
  'store-silent': {
    title: 'The file store does not answer',
    text: 'The report is kept and the rows beside it can be edited and saved. Only its picture is missing for now.',
  },
  'not-allowed': {
    title: 'The original file is not open to you',
    text: 'It carries a name and an address. The values read from it stand beside this.',
  },
  gone: {
    title: 'The file is not there any more',
    text: 'It may have been removed meanwhile. The values read from it stand beside this.',
  },
  broken: {
    title: 'This page cannot be drawn',
    text: 'The file is kept as it came. Open the original to see it, and type the values in beside this.',
  },
} as const;

export function ViewFailed({
  reason,
  onAgain,
}: {
  reason: keyof typeof SENTENCES;
  onAgain?: (() => void) | undefined;
}) {
  const { title, text } = SENTENCES[reason];
  return (
    <div role="alert" data-testid={`page-${reason}`}>
      <ViewPanel title={title}>
        <p className="max-w-measure text-sm text-clay">{text}</p>
        {onAgain && reason === 'store-silent' ? (
          <Button look="quiet" onClick={onAgain}>
            Fetch it again
          </Button>
        ) : null}
      </ViewPanel>
    </div>
  );
}
