'use client';

import { type ChangeEvent, useRef } from 'react';
import { Button, type ButtonProps } from '../actions/button';

export type FileButtonProps = Omit<ButtonProps, 'onClick' | 'type'> & {
  /** As the file input takes it: ".pdf,.csv". */
  accept?: string;
  multiple?: boolean;
  onFiles: (files: File[]) => void;
};

/** A real button that opens the file picker; the same file can be picked twice in a row. */
export function FileButton({ accept, multiple = false, onFiles, children, ...button }: FileButtonProps) {
  const input = useRef<HTMLInputElement>(null);
  const picked = (event: ChangeEvent<HTMLInputElement>) => {
    const files = [...(event.currentTarget.files ?? [])];
    event.currentTarget.value = '';
    if (files.length > 0) onFiles(files);
  };
  return (
    <>
      <input
        ref={input}
        type="file"
        hidden
        tabIndex={-1}
        aria-hidden
        accept={accept}
        multiple={multiple}
        onChange={picked}
      />
      <Button {...button} onClick={() => input.current?.click()}>
        {children}
      </Button>
    </>
  );
}
