import { ToneMark } from '../feedback/tone-mark';

export function FieldError({ id, children }: { id: string; children: string | undefined }) {
  if (!children) return null;
  return (
    <p id={id} className="flex max-w-measure gap-2 text-sm font-semibold text-iron">
      <ToneMark tone="error" className="mt-1 size-4 flex-none" />
      <span>
        <span className="sr-only">Error: </span>
        {children}
      </span>
    </p>
  );
}
