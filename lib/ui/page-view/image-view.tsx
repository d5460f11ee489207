'use client';

import { useEffect, useMemo, useRef, useState } from 'react';
import { BoxOverlay } from './box-overlay';
import { PagePane, ZOOMS, ZoomButtons } from './pdf-view';
import type { PageViewProps } from './types';
import { useFile } from './use-file';
import { usePaneWidth } from './use-pane-width';
import { ViewFailed, ViewLoading } from './view-states';

/** A scan or photo, turned upright by the browser after its EXIF mark, as the boxes are. */
export function ImageView({ url, ...props }: Omit<PageViewProps, 'source' | 'originalHref'> & { url: string }) {
  const { file, again } = useFile(url);
  if (file.kind === 'loading') return <ViewLoading fileName={props.fileName} />;
  if (file.kind === 'failed') return <ViewFailed reason={file.reason} onAgain={again} />;
  return <ShownImage bytes={file.bytes} {...props} />;
}

function ShownImage({ bytes, ...props }: Omit<PageViewProps, 'source' | 'originalHref'> & { bytes: Uint8Array }) {
  const pane = useRef<HTMLElement>(null);
  const image = useRef<HTMLImageElement>(null);
  const paneWidth = usePaneWidth(pane, true);
  const [zoomAt, setZoomAt] = useState(1);
  const [natural, setNatural] = useState<{ width: number; height: number } | null>(null);
  const [broken, setBroken] = useState(false);
  const blob = useMemo(() => new Blob([bytes.slice()]), [bytes]);
  useEffect(() => {
    const address = URL.createObjectURL(blob);
    if (image.current) image.current.src = address;
    return () => URL.revokeObjectURL(address);
  }, [blob]);

  const width = paneWidth * (ZOOMS[zoomAt] ?? 1);
  const height = natural ? (width * natural.height) / natural.width : 0;
  if (broken) return <ViewFailed reason="broken" />;
  return (
    <div className="grid min-w-0 gap-2">
      <div className="flex flex-wrap items-center gap-2">
        <ZoomButtons at={zoomAt} onChange={setZoomAt} />
      </div>
      <PagePane paneRef={pane} fileName={props.fileName}>
        <div className="relative w-max">
          {/* biome-ignore lint/performance/noImgElement: the picture is private and shown as it came */}
          <img
            ref={image}
            alt={`Page 1 of ${props.fileName}`}
            width={Math.round(width)}
            height={Math.round(height) || undefined}
            className="block max-w-none"
            onLoad={(event) =>
              setNatural({ width: event.currentTarget.naturalWidth, height: event.currentTarget.naturalHeight })
            }
            onError={() => setBroken(true)}
          />
          <BoxOverlay {...props} turn={0} size={{ width, height }} />
        </div>
      </PagePane>
    </div>
  );
}
