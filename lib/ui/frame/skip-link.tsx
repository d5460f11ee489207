export function SkipLink() {
  return (
    <a
      href="#content"
      className="on-peat sr-only z-50 bg-peat px-4 font-semibold text-chalk focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:flex focus:min-h-(--target) focus:items-center focus:px-4"
    >
      Skip to the page
    </a>
  );
}
