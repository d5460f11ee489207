'use client';

import { useState } from 'react';
import { areaOf, boundsOf } from '@/lib/ui/site-plan/geometry';
import { areaText, lengthNumber, lengthText } from '@/lib/ui/site-plan/measure';
import type { LengthUnit, PlanOutline } from '@/lib/ui/site-plan/types';
import type { OutlineConflict } from './use-outline-saves';
import { VersionConflict } from './version-conflict';

type Props = {
  readonly conflict: OutlineConflict;
  readonly unit: LengthUnit;
  readonly onSettle: (choice: 'mine' | 'theirs') => Promise<void>;
};

export function OutlineConflictNotice({ conflict, unit, onSettle }: Props) {
  const [busy, setBusy] = useState(false);
  const mine = outlineText(conflict.mine, unit);
  const theirs = outlineText(conflict.current.outline, unit);
  const apart = theirs !== mine && theirs !== outlineText(conflict.before, unit);
  const settle = async (choice: 'mine' | 'theirs') => {
    if (busy) return;
    setBusy(true);
    await onSettle(choice);
    setBusy(false);
  };
  return (
    <VersionConflict
      subject={conflict.current.name}
      differences={apart ? [{ field: 'Place and size', yours: mine, theirs }] : []}
      busy={busy}
      onKeepTheirs={() => void settle('theirs')}
      onSaveYours={() => void settle('mine')}
    />
  );
}

/** "12 × 5 m (60 m²), 1 from the left, 9 from the bottom". */
export function outlineText(outline: PlanOutline | null, unit: LengthUnit): string {
  const bounds = outline ? boundsOf(outline) : null;
  if (!outline || !bounds) return 'not drawn';
  const [wide, long] = [bounds.maxX - bounds.minX, bounds.maxY - bounds.minY];
  const size = `${lengthNumber(wide, unit)} × ${lengthText(long, unit)} (${areaText(areaOf(outline), unit)})`;
  return `${size}, ${lengthNumber(bounds.minX, unit)} from the left, ${lengthNumber(bounds.minY, unit)} from the bottom`;
}
