'use client';

import { analyte, isAnalyteKey } from '@/lib/domain/analytes';
import type { Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { counted } from './report-words';
import { sampleLabel } from './review-rows';

type RemovedProps = { review: Review; readOnly: boolean; onRestore: (rowId: string) => void };

/** Out of the review, not out of the record. */
export function RemovedRows({ review, readOnly, onRestore }: RemovedProps) {
  const removed = review.rows.filter((row) => row.state === 'removed');
  if (removed.length === 0) return null;
  const names = new Map(review.samples.map((sample) => [sample.id, sampleLabel(sample)]));
  return (
    <details className="border-t border-horizon-5 pt-2">
      <summary className="text-link flex min-h-(--target) items-center font-semibold">
        {counted(removed.length, 'row')} removed
      </summary>
      <ul>
        {removed.map((row) => {
          const what =
            row.analyte && isAnalyteKey(row.analyte) ? analyte(row.analyte).label : row.label || 'Without a name';
          return (
            <li key={row.id} className="flex flex-wrap items-center gap-x-4 border-b border-horizon-5 py-1 text-sm">
              <span className="min-w-0 flex-1">
                {what}: {row.printed || 'empty'} {row.unit ?? ''}
                <span className="text-clay">
                  , {names.get(row.reportSampleId)}
                  {row.editedBy ? `, removed by ${row.editedBy}` : ''}
                </span>
              </span>
              {readOnly ? null : (
                <Button look="quiet" size="small" className="min-h-(--target)!" onClick={() => onRestore(row.id)}>
                  Bring back<span className="sr-only"> {what}</span>
                </Button>
              )}
            </li>
          );
        })}
      </ul>
    </details>
  );
}
