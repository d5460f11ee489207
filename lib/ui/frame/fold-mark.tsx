'use client';

export function FoldMark() {
  return (
    <svg
      viewBox="0 0 16 16"
      className="size-4 flex-none text-gley group-open:rotate-90 print:hidden"
      aria-hidden="true"
      fill="none"
    >
      <path d="M5 2l6 6-6 6" stroke="currentColor" strokeWidth="2.4" strokeLinecap="round" strokeLinejoin="round" />
    </svg>
  );
}
