'use client';

import { useState } from 'react';
import type { AnalyteKey } from '@/lib/domain/analytes';
import type { Review } from '@/lib/schemas/review';
import { Button } from '@/lib/ui/actions/button';
import { sampleLabel } from './review-rows';

/** What most garden reports print, in the order in which they print it. */
const USUAL: readonly AnalyteKey[] = [
  'soil_ph_water',
  'organic_matter',
  'cec',
  'phosphorus',
  'potassium',
  'calcium',
  'magnesium',
  'sulfur',
  'boron',
  'zinc',
  'manganese',
  'copper',
  'iron',
];

type UsualProps = {
  review: Review;
  sampleId: string | null;
  onAdd: (reportSampleId: string, analyte: AnalyteKey) => Promise<string | null>;
  onDone: (rowId: string, columnId: string) => void;
};

/** For typing a report in: empty rows to fill, where a sample has none yet. */
export function UsualRows({ review, sampleId, onAdd, onDone }: UsualProps) {
  const [busy, setBusy] = useState(false);
  const bare = review.samples.filter(
    (sample) =>
      sample.leftOutReason === null &&
      (sampleId === null || sample.id === sampleId) &&
      !review.rows.some((row) => row.reportSampleId === sample.id && row.state !== 'removed'),
  );
  const [first] = bare;
  if (!first) return null;
  const fill = async () => {
    setBusy(true);
    let top: string | null = null;
    for (const key of USUAL) {
      const added = await onAdd(first.id, key);
      if (added === null) break;
      top ??= added;
    }
    setBusy(false);
    if (top) onDone(top, 'value');
  };
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 border border-dashed border-fallow p-3">
      <p className="min-w-0 flex-1 basis-64 text-sm text-clay">
        {sampleLabel(first)} has no rows yet. Start with what most reports print, and remove what yours lacks.
      </p>
      <Button
        look="quiet"
        size="small"
        className="min-h-(--target)!"
        busy={busy}
        busyLabel="Adding rows"
        onClick={() => void fill()}
      >
        Add {USUAL.length} usual rows
      </Button>
    </div>
  );
}
