import type { ReactNode } from 'react';
import { cx } from '../cx';
import { FoldMark } from './fold-mark';

/** How much detail a layer holds, from the surface down. */
export type Depth = 'verdict' | 'chart' | 'numbers' | 'page';

const depths: Record<Depth, { word: string; ground: string; core: string }> = {
  verdict: { word: 'In a sentence', ground: 'bg-chalk', core: 'core-verdict' },
  chart: { word: 'Drawn', ground: 'bg-white', core: 'core-chart' },
  numbers: { word: 'In numbers', ground: 'bg-chalk', core: 'core-numbers' },
  page: { word: 'As printed', ground: 'bg-silt', core: 'core-page' },
};

/** A page read from the top down: each layer below says the same thing in more detail. The core beside it keeps count. */
export function Layers({ children }: { children: ReactNode }) {
  return <div className="layers">{children}</div>;
}

type LayerProps = {
  depth: Depth;
  /** The word beside the core; the depth has one of its own. */
  label?: string;
  /** A heading inside the layer. The topmost layer usually holds the page's title instead. */
  title?: ReactNode;
  children: ReactNode;
  id?: string;
  /** Deep layers may start closed behind their title. */
  folded?: boolean;
};

export function Layer({ depth, label, title, children, id, folded = false }: LayerProps) {
  const { word, ground, core } = depths[depth];
  return (
    <section id={id} data-depth={depth} className={cx('layer border-horizon-5 not-first:border-t', ground)}>
      <div className="page-wrap layer-in">
        <div aria-hidden className={cx('core-length', core)} />
        <p className="pt-6 text-sm font-semibold text-clay max-lg:pt-4 max-lg:text-xs print:hidden">{label ?? word}</p>
        <div className="min-w-0 pt-5 pb-8 max-lg:col-start-2 max-lg:pt-1">
          {folded ? (
            <details className="group">
              <summary className="flex min-h-(--target) items-center gap-3 rounded-sm">
                <FoldMark />
                <h2 className="text-xl">{title}</h2>
              </summary>
              <div className="pt-4">{children}</div>
            </details>
          ) : (
            <>
              {title ? <h2 className="mb-4 text-xl">{title}</h2> : null}
              {children}
            </>
          )}
        </div>
      </div>
    </section>
  );
}

/** An ordinary stretch of page without depth: forms, lists, settings. */
export function Stretch({
  title,
  children,
  id,
  ground,
}: {
  title?: ReactNode;
  children: ReactNode;
  id?: string;
  ground?: 'silt' | 'white';
}) {
  return (
    <section
      id={id}
      className={cx('py-7', ground === 'silt' && 'bg-silt', ground === 'white' && 'border-y border-horizon-5 bg-white')}
    >
      <div className="page-wrap">
        {title ? <h2 className="mb-4 text-xl">{title}</h2> : null}
        {children}
      </div>
    </section>
  );
}
