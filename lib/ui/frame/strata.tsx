'use client';

/** The cut face of the ground between the page and the peat. */
export function Strata() {
  return (
    <svg
      viewBox="0 0 1200 44"
      preserveAspectRatio="none"
      className="block h-11 w-full"
      aria-hidden="true"
      focusable="false"
    >
      <path d="M0 6C140 2 260 9 420 6s280-5 420-1 240 3 360-1v40H0z" fill="#D9CDBB" />
      <path d="M0 13c160-3 300 5 470 2s260-6 400-1 230 2 330-2v32H0z" fill="#B9A68F" />
      <path d="M0 21c120 4 270-4 430-1s300 5 440 1 220-3 330 0v23H0z" fill="#8A6A4A" />
      <path d="M0 29c180-4 290 4 450 2s270-5 420-1 220 3 330-1v15H0z" fill="#5B4334" />
      <path d="M0 36c150 3 310-3 480-1s290 4 410 0 210-2 310 1v8H0z" fill="#3A2C22" />
    </svg>
  );
}
