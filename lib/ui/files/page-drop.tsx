'use client';

import { useEffect, useRef, useState } from 'react';
import { useAnnounce } from '../feedback/announce';

type PageDropProps = {
  /** Where a file goes that is let go over nothing in particular; left out for who may not send any. */
  readonly onFiles?: ((files: File[]) => void) | undefined;
  /** "Let go over a plot, or anywhere else to send it to Mill Lane." */
  readonly label: string;
};

const carriesFiles = (event: DragEvent) => event.dataTransfer?.types.includes('Files') ?? false;

/** A file dropped anywhere on the page never makes the browser leave it, and goes to the site when no plot took it. */
export function PageDrop({ onFiles, label }: PageDropProps) {
  const [over, setOver] = useState(false);
  const take = useRef(onFiles);
  const announce = useAnnounce();
  useEffect(() => {
    take.current = onFiles;
  });
  useEffect(() => {
    let quiet: ReturnType<typeof setTimeout> | undefined;
    const end = () => {
      clearTimeout(quiet);
      setOver(false);
    };
    // In the capture phase, so that no part of the page can forget it.
    const keep = (event: DragEvent) => {
      if (!carriesFiles(event)) return;
      event.preventDefault();
      if (event.type === 'drop') return end();
      if (!take.current && event.dataTransfer) event.dataTransfer.dropEffect = 'none';
      setOver(true);
      // dragover comes several times a second; its silence is the only sure sign that the file has left the window.
      clearTimeout(quiet);
      quiet = setTimeout(() => setOver(false), 400);
    };
    const dropped = (event: DragEvent) => {
      if (!carriesFiles(event)) return;
      const files = [...(event.dataTransfer?.files ?? [])];
      if (files.length === 0) return;
      if (take.current) take.current(files);
      else announce('Not sent: you read this site. Somebody who helps on it can send reports.', { tone: 'look' });
    };
    window.addEventListener('dragover', keep, true);
    window.addEventListener('drop', keep, true);
    window.addEventListener('drop', dropped);
    return () => {
      end();
      window.removeEventListener('dragover', keep, true);
      window.removeEventListener('drop', keep, true);
      window.removeEventListener('drop', dropped);
    };
  }, [announce]);
  if (!over || !onFiles) return null;
  return (
    <p
      aria-hidden="true"
      className="pointer-events-none fixed inset-x-0 bottom-0 z-50 bg-gley px-4 py-3 text-center font-semibold text-white"
    >
      {label}
    </p>
  );
}
