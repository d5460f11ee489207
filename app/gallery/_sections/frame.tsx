import Link from 'next/link';

export function FrameSection() {
  return (
    <ul className="grid gap-2">
      <li>
        <Link className="text-link" href="/gallery/frame">
          The signed-in frame, inside a site, with layers
        </Link>
      </li>
      <li>
        <Link className="text-link" href="/gallery/public">
          The frame around sign-in
        </Link>
      </li>
      <li>
        <Link className="text-link" href="/gallery/landing">
          The landing page
        </Link>
      </li>
    </ul>
  );
}
