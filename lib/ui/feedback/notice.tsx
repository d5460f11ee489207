import type { ReactNode } from 'react';
import { cx } from '../cx';
import { type Tone, toneWord } from './tone';
import { ToneMark } from './tone-mark';

type NoticeProps = {
  tone?: Tone;
  /** Replaces the tone's own word; it stays beside the mark. */
  title?: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
  /** Read aloud when it appears. Leave off for what was there from the start. */
  live?: boolean;
  className?: string;
};

const ground: Record<Tone, string> = {
  info: 'border-gley bg-gley-wash',
  look: 'border-ochre bg-ochre-wash',
  error: 'border-iron bg-iron-wash',
  saved: 'border-lichen bg-lichen-wash',
};
const tab: Record<Tone, string> = { info: 'bg-gley', look: 'bg-ochre', error: 'bg-iron', saved: 'bg-lichen' };

export function Notice({ tone = 'info', title, children, action, live = false, className }: NoticeProps) {
  return (
    <div
      role={live ? (tone === 'error' ? 'alert' : 'status') : undefined}
      data-tone={tone}
      className={cx('flex overflow-hidden rounded-sm border text-humus', ground[tone], className)}
    >
      <span className={cx('flex w-10 flex-none justify-center pt-3.5 text-chalk', tab[tone])}>
        <ToneMark tone={tone} className="size-5" />
      </span>
      <div className="min-w-0 flex-1 px-4 py-3">
        <p className="font-bold">{title ?? toneWord[tone]}</p>
        {children ? <div className="mt-0.5 max-w-measure">{children}</div> : null}
        {action ? <div className="mt-3 flex flex-wrap gap-3">{action}</div> : null}
      </div>
    </div>
  );
}
