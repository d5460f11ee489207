'use client';

import { type RefObject, useEffect, useState } from 'react';

/** Inner width of the frame, without its scroll bar; followed when the window or the split changes. */
export function usePaneWidth(pane: RefObject<HTMLElement | null>, mounted: boolean): number {
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const element = pane.current;
    if (!mounted || !element) return;
    const measure = () => setWidth(Math.max(0, element.clientWidth));
    measure();
    const watch = new ResizeObserver(measure);
    watch.observe(element);
    return () => watch.disconnect();
  }, [pane, mounted]);
  return width;
}
