import { cx } from '../cx';
import { VerdictGlyph } from './glyph';
import type { VerdictLineProps } from './types';

/** Glyph, word, one sentence with numbers. Nothing here is told by colour. */
export function VerdictLine({ verdict, sentence, comparedWith, settledBy, size = 'normal' }: VerdictLineProps) {
  const small = size === 'small';
  return (
    <div className={cx('flex min-w-0 items-start break-inside-avoid', small ? 'gap-3' : 'gap-4')}>
      <span className={small ? 'pt-0.5' : 'pt-1'}>
        <VerdictGlyph verdict={verdict} small={small} />
      </span>
      <div className={cx('grid min-w-0 max-w-measure', small ? 'gap-0 text-sm' : 'gap-1')}>
        <p className={cx('font-display leading-tight font-semibold', small ? 'text-base' : 'text-xl')}>
          {verdict}
          {comparedWith !== undefined && (
            <span className="font-text text-sm font-normal text-clay">, {comparedWith}</span>
          )}
        </p>
        <p>{sentence}</p>
        {settledBy !== undefined && (
          <p className="text-clay">
            <span className="font-bold text-humus">What would settle it:</span> {settledBy}
          </p>
        )}
      </div>
    </div>
  );
}
