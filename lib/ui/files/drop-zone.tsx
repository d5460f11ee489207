'use client';

import type { ReactNode } from 'react';
import { type Accept, type FileRejection, useDropzone } from 'react-dropzone';
import { cx } from '../cx';
import type { RefusedFile } from './refused';

export type DropZoneProps = {
  /** Types by media type: { 'application/pdf': ['.pdf'] }. */
  accept: Accept;
  maxBytes: number;
  multiple?: boolean;
  disabled?: boolean;
  onFiles: (files: File[]) => void;
  onRefused: (files: RefusedFile[]) => void;
  /** What letting go would do: "Let go to send it to North bed". */
  overLabel: string;
  className?: string;
  /** Gets `open`, which a real button inside must call: dropping is never the only way. */
  children: (zone: { open: () => void; over: boolean }) => ReactNode;
};

/** The whole card takes the drop; the button inside does the same by pointer and keyboard. */
export function DropZone({
  accept,
  maxBytes,
  multiple = true,
  disabled = false,
  onFiles,
  onRefused,
  overLabel,
  className,
  children,
}: DropZoneProps) {
  const { getRootProps, getInputProps, isDragActive, open } = useDropzone({
    accept,
    maxSize: maxBytes,
    multiple,
    disabled,
    noClick: true,
    noKeyboard: true,
    onDrop: (taken, refused) => {
      if (refused.length > 0) onRefused(refused.map(toRefused));
      if (taken.length > 0) onFiles(taken);
    },
  });
  return (
    <div
      {...getRootProps({ tabIndex: undefined, role: undefined })}
      data-over={isDragActive || undefined}
      className={cx(
        'relative rounded-sm border-2 border-dashed border-fallow bg-white p-5 data-[over]:border-solid data-[over]:border-gley data-[over]:bg-gley-wash',
        className,
      )}
    >
      {/* The package's style attribute would be refused by the content security policy. */}
      <input {...getInputProps({ style: undefined, hidden: true, 'aria-hidden': true, tabIndex: -1 })} />
      {children({ open, over: isDragActive })}
      {isDragActive ? (
        <p className="pointer-events-none absolute inset-x-0 bottom-0 bg-gley px-4 py-2 text-center font-semibold text-white">
          {overLabel}
        </p>
      ) : null}
    </div>
  );
}

function toRefused({ file, errors }: FileRejection): RefusedFile {
  const codes = errors.map((error) => error.code);
  const reason = codes.includes('file-invalid-type')
    ? 'wrong-type'
    : codes.includes('file-too-large')
      ? 'too-large'
      : 'one-at-a-time';
  return { name: file.name, reason };
}
