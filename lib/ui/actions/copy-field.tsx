'use client';

import { useId, useRef } from 'react';
import { useAnnounce } from '../feedback/announce';

type CopyFieldProps = { label: string; value: string; hint?: string };

export function CopyField({ label, value, hint }: CopyFieldProps) {
  const id = useId();
  const box = useRef<HTMLInputElement>(null);
  const announce = useAnnounce();
  const copy = async () => {
    box.current?.select();
    try {
      await navigator.clipboard.writeText(value);
      announce(`${label} copied.`, { tone: 'info' });
    } catch {
      announce('The browser did not allow copying. The text is selected: press Ctrl+C or Cmd+C.', { tone: 'look' });
    }
  };
  return (
    <div className="grid max-w-measure gap-1.5">
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="-mt-1 text-sm text-clay">
          {hint}
        </p>
      ) : null}
      <div className="flex">
        <input
          ref={box}
          id={id}
          readOnly
          value={value}
          aria-describedby={hint ? `${id}-hint` : undefined}
          className="field-box min-w-0 rounded-r-none border-r-0 font-figures text-sm"
          onFocus={(event) => event.currentTarget.select()}
        />
        <button
          type="button"
          className="min-h-(--target) flex-none rounded-r-sm border border-b-2 border-gley bg-gley px-4 font-semibold text-white hover:bg-gley-deep"
          onClick={() => void copy()}
        >
          Copy<span className="sr-only"> {label.toLowerCase()}</span>
        </button>
      </div>
    </div>
  );
}
