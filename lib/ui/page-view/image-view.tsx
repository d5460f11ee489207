'use client';

import { useRef, useState } from 'react';
import { BoxOverlay } from './box-overlay';
import { fetchFile } from './fetch-file';
import { PagePane, ZOOMS, ZoomButtons } from './pdf-view';
import type { PageViewProps } from './types';
import { usePaneWidth } from './use-pane-width';
import { ViewFailed } from './view-states';

type Failure = 'store-silent' | 'not-allowed' | 'gone' | 'broken';

/** A scan or photo, turned upright by the browser after its EXIF mark, as the boxes are. */
export function ImageView({ url, ...props }: Omit<PageViewProps, 'source' | 'originalHref'> & { url: string }) {
  const pane = useRef<HTMLElement>(null);
  const [attempt, setAttempt] = useState(0);
  const [zoomAt, setZoomAt] = useState(1);
  const [natural, setNatural] = useState<{ width: number; height: number } | null>(null);
  const [failed, setFailed] = useState<Failure | null>(null);
  const paneWidth = usePaneWidth(pane, failed === null);

  // An image tells only that it failed; a second look at the address tells why.
  const onError = async () => {
    const answer = await (props.load ?? fetchFile)(url, new AbortController().signal);
    setFailed(answer.ok ? 'broken' : answer.reason);
  };
  const again = () => {
    setFailed(null);
    setAttempt((now) => now + 1);
  };
  if (failed) return <ViewFailed reason={failed} onAgain={again} />;

  const width = Math.round(paneWidth * (ZOOMS[zoomAt] ?? 1));
  const height = natural ? (width * natural.height) / natural.width : 0;
  return (
    <div className="grid min-w-0 gap-2">
      <div className="flex flex-wrap items-center gap-2">
        <ZoomButtons at={zoomAt} onChange={setZoomAt} />
      </div>
      <PagePane paneRef={pane} fileName={props.fileName}>
        <div className="relative w-max">
          {/* biome-ignore lint/performance/noImgElement: the picture is private and shown as it came */}
          <img
            key={attempt}
            src={url}
            alt={`Page 1 of ${props.fileName}`}
            width={width || undefined}
            height={Math.round(height) || undefined}
            className="block max-w-none"
            onLoad={({ currentTarget: image }) =>
              setNatural({ width: image.naturalWidth, height: image.naturalHeight })
            }
            onError={() => void onError()}
          />
          <BoxOverlay {...props} turn={0} size={{ width, height }} />
        </div>
      </PagePane>
    </div>
  );
}
