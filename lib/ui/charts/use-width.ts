import { type RefObject, useEffect, useRef, useState } from 'react';

/** Width of a box in whole pixels; 0 until it has been measured in the browser. */
export function useWidth<T extends HTMLElement>(): { readonly box: RefObject<T | null>; readonly width: number } {
  const box = useRef<T>(null);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const element = box.current;
    if (element === null) return;
    const measure = () => {
      const now = Math.floor(element.getBoundingClientRect().width);
      // Hidden for print it measures 0; the last real width stays.
      if (now > 0) setWidth(now);
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return { box, width };
}
