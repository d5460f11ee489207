import type { RefusalBoxProps } from './types';

/** No glyph: a refusal is not a weak verdict. The reason, both values where there are two, and what would help. */
export function RefusalBox({ refusal, reason, help, values = [] }: RefusalBoxProps) {
  return (
    <div className="grid min-w-0 max-w-measure gap-2 border border-fallow bg-white px-4 py-3 break-inside-avoid">
      <p className="font-display text-lg leading-tight font-semibold">{refusal}</p>
      <p>{reason}</p>
      {values.length > 0 && (
        <dl className="flex flex-wrap gap-x-8 gap-y-2 border-y border-fallow/40 py-2">
          {values.map((v) => (
            <div key={v.label}>
              <dt className="text-sm text-clay">{v.label}</dt>
              <dd className="font-figures text-lg">{v.printed}</dd>
              {v.note !== undefined && <dd className="text-sm text-clay">{v.note}</dd>}
            </div>
          ))}
        </dl>
      )}
      <p>
        <span className="font-bold">What would help:</span> {help}
      </p>
    </div>
  );
}
