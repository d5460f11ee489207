import { citation, type Material } from '@/lib/domain/materials';
import { formatRate, gramsPerM2 } from '@/lib/domain/units';
import type { Units } from './application-body';

const PARTS: Readonly<Record<string, string>> = { CCE: 'neutralising value (CCE)' };
export const FOLLOW =
  'Follow the product label, local rules and a licensed adviser where they apply. The label on your own bag counts before these figures.';

type MaterialFactsProps = {
  material: Material | null;
  /** What the amount typed comes to; null while a part is missing. */
  rate: { kg: number; m2: number } | null;
  units: Units;
};

/** What to know about a material, beside its amount: cautions, what is in the bag, and who says so. */
export function MaterialFacts({ material, rate, units }: MaterialFactsProps) {
  return (
    <aside
      aria-label="About this material"
      className="grid content-start gap-3 border-l-4 border-ochre bg-ochre-wash px-4 py-3"
    >
      {rate === null ? null : (
        <p>
          This amount comes to{' '}
          <span className="font-bold">
            {formatRate(gramsPerM2((rate.kg * 1000) / rate.m2), units === 'us' ? 'customary' : 'metric')}
          </span>
          .
        </p>
      )}
      {material === null ? null : (
        <>
          <p className="font-bold">{material.name}</p>
          {material.cautions.length > 0 ? (
            <ul className="grid list-disc gap-1.5 pl-5">
              {material.cautions.map((caution) => (
                <li key={caution.text}>
                  {caution.text} <span className="text-sm text-clay">({caution.source})</span>
                </li>
              ))}
            </ul>
          ) : (
            <p>No caution of its own is listed.</p>
          )}
          <p className="text-sm">
            <span className="font-semibold">Acts:</span> {material.release}.
          </p>
          <p className="text-sm">
            <span className="font-semibold">Usually in the bag:</span>{' '}
            {Object.entries(material.analysis)
              .map(([part, figure]) => {
                const range = figure.range === undefined ? '' : ` (${figure.range.join(' to ')})`;
                const open = figure.status === 'published' ? '' : ', unchecked';
                return `${PARTS[part] ?? part} ${figure.percent} %${range}${open}`;
              })
              .join('; ')}
            . <span className="text-clay">Source: {citation(material.source)}.</span>
          </p>
        </>
      )}
      <p className="text-sm font-semibold">{FOLLOW}</p>
    </aside>
  );
}
