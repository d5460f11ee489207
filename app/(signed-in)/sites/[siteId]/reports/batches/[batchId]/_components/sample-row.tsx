'use client';

import { Check } from 'lucide-react';
import type { BatchSample } from '@/lib/schemas/batches';
import { cx } from '@/lib/ui/cx';

type RowProps = {
  sample: BatchSample;
  at: number;
  plotName: string | null;
  proposedName: string | null;
  selected: boolean;
  tabStop: boolean;
  onToggle: (at: number, extend: boolean) => void;
};

const BECAUSE = {
  'same-name': 'same name',
  'confirmed-before': 'as confirmed before',
  'name-inside': 'its name stands in this one',
} as const;

const onDay = (day: string): string =>
  new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' }).format(
    new Date(`${day}T00:00:00Z`),
  );

const cell = 'min-w-0 break-words md:px-3 md:py-2 max-md:col-start-2';

/** One sample as its page names it, with its plot or the one that would fit. The table around it hears the keys. */
export function SampleRow({ sample, at, plotName, proposedName, selected, tabStop, onToggle }: RowProps) {
  const name = sample.printedName ?? sample.fieldName ?? 'Sample without a name';
  const day = sample.takenOn === null ? (sample.sampledPrinted ?? 'no day read') : onDay(sample.takenOn);
  return (
    <tr
      data-row={at}
      aria-selected={selected}
      tabIndex={tabStop ? 0 : -1}
      className={cx(
        'min-h-(--target) scroll-mt-12 cursor-pointer border-b border-horizon-5 last:border-0 max-md:grid max-md:grid-cols-[2rem_minmax(0,1fr)] max-md:gap-x-3 max-md:px-2 max-md:py-2',
        selected ? 'bg-gley-wash' : 'hover:bg-chalk',
      )}
      onClick={(event) => onToggle(at, event.shiftKey)}
      onMouseDown={(event) => event.shiftKey && event.preventDefault()}
    >
      <td className="max-md:row-span-5 md:py-2 md:pl-3">
        <span
          aria-hidden="true"
          className={cx(
            'grid size-6 place-items-center rounded-sm border-2',
            selected ? 'border-gley bg-gley text-white' : 'border-fallow bg-white',
          )}
        >
          {selected ? <Check className="size-4" strokeWidth={3} /> : null}
        </span>
      </td>
      <td className={cx(cell, 'font-semibold')}>{name}</td>
      <td className={cx(cell, 'font-mono text-sm empty:hidden md:empty:table-cell')}>{sample.labNumber}</td>
      <td className={cx(cell, 'text-sm md:whitespace-nowrap')}>{day}</td>
      <td className={cx(cell, 'text-sm break-all text-clay')}>{sample.fileName}</td>
      <td className={cell}>
        {sample.leftOut ? (
          <span className="text-clay">left out</span>
        ) : plotName !== null ? (
          <span className="font-semibold text-lichen">{plotName}</span>
        ) : proposedName !== null && sample.proposal ? (
          <>
            {proposedName}? <span className="text-sm text-clay">{BECAUSE[sample.proposal.because]}</span>
          </>
        ) : (
          <span className="text-ochre">no plot yet</span>
        )}
      </td>
    </tr>
  );
}
