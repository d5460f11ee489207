'use client';

import Link from 'next/link';
import { useEffect, useRef } from 'react';
import { Button } from '../actions/button';
import { useAnnounce } from '../feedback/announce';
import { batchOf, counted, isUnderWay, outcomeText, type UploadItem } from './upload-item';
import { UploadRow, type UploadRowProps } from './upload-row';

type UploadListProps = Pick<UploadRowProps, 'reportHref' | 'mayType'> & {
  readonly items: readonly UploadItem[];
  readonly store: UploadRowProps['store'] & { readonly clear: () => void };
  /** Where the list of a whole batch is. */
  readonly batchHref?: ((batchId: string) => string) | undefined;
};

/** Every file sent since the page was opened: what is happening to it, and what to do next. */
export function UploadList({ items: all, batchHref, ...row }: UploadListProps) {
  const items = all.filter((item) => item.batch === null);
  useSpoken(items);
  if (all.length === 0) return null;
  const done = items.filter((item) => !isUnderWay(item) && item.stage.kind !== 'kept').length;
  return (
    <section aria-label="Files sent" className="border border-fallow bg-white">
      <div className="flex flex-wrap items-center justify-between gap-x-4 border-b border-fallow bg-silt pl-4">
        <h2 className="py-2 font-sans text-base font-semibold">Files sent</h2>
        {done > 1 ? (
          <Button look="plain" className="text-sm" onClick={row.store.clear}>
            Clear the {done} that are done
          </Button>
        ) : null}
      </div>
      <ul>
        <OnTheirWay items={all} batchHref={batchHref} />
        {items.map((item) => (
          <li key={item.id} className="border-b border-horizon-5 last:border-0">
            <UploadRow item={item} {...row} />
          </li>
        ))}
      </ul>
    </section>
  );
}

/** Files of a batch stand on a list of their own; here is how many are left and the way there. */
function OnTheirWay({ items, batchHref }: Pick<UploadListProps, 'items' | 'batchHref'>) {
  const ofBatches = items.filter((item) => item.batch !== null);
  if (ofBatches.length === 0) return null;
  const [batchId] = ofBatches.flatMap((item) => batchOf(item)?.batchId ?? []);
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-1 border-b border-horizon-5 px-4 py-3 last:border-0">
      <span>{counted(ofBatches.length, 'file')} of many at once on the way</span>
      {batchId && batchHref ? (
        <Link className="text-link inline-flex min-h-(--target) items-center font-semibold" href={batchHref(batchId)}>
          See how far all of them are
        </Link>
      ) : null}
    </li>
  );
}

/** Finishing and failing are said without moving the focus; the bar itself is not read out byte by byte. */
function useSpoken(items: readonly UploadItem[]) {
  const announce = useAnnounce();
  const said = useRef(new Map<string, string>());
  useEffect(() => {
    for (const item of items) {
      const sentence = spoken(item);
      if (sentence === null || said.current.get(item.id) === sentence) continue;
      said.current.set(item.id, sentence);
      announce(sentence, { visible: false });
    }
  }, [announce, items]);
}

function spoken({ file, stage }: UploadItem): string | null {
  switch (stage.kind) {
    case 'kept':
      return `${file.name} is sent and kept.`;
    case 'settled':
      return `${file.name}: ${outcomeText(stage.report)}.`;
    case 'seen-before':
      return `${file.name} was sent before.`;
    case 'refused':
      return `${file.name}: ${stage.title}. ${stage.detail}`;
    case 'pausing':
      return `${file.name}: the connection was lost. It is sent again.`;
    default:
      return null;
  }
}
