import type { ReactNode } from 'react';

export type RoundStep = { title: string; said: ReactNode };

/** The yearly round as one core: each step is a length of it, the deepest is the one that answers. */
export function Round({ title, steps }: { title: string; steps: readonly RoundStep[] }) {
  const lengths = ['core-verdict', 'core-chart', 'core-numbers', 'core-page'];
  return (
    <section className="border-t border-horizon-5">
      <div className="page-wrap pt-10 pb-2">
        <h2 className="text-2xl">{title}</h2>
        <ol className="layers mt-6 max-w-5xl">
          {steps.map((step, index) => (
            <li
              key={step.title}
              className="layer grid grid-cols-[var(--core)_1fr] gap-x-5 sm:grid-cols-[var(--core)_16rem_1fr] sm:gap-x-8"
            >
              <div
                aria-hidden
                className={`core-length row-span-2 sm:row-span-1 ${lengths[Math.min(index, lengths.length - 1)]}`}
              />
              <h3 className="pt-3 text-lg sm:pb-6">{step.title}</h3>
              <p className="max-w-measure pb-6 sm:pt-3.5">{step.said}</p>
            </li>
          ))}
        </ol>
      </div>
    </section>
  );
}
