import { cx } from '../cx';

export type ButtonLook = 'primary' | 'quiet' | 'destructive' | 'plain';
export type ButtonSize = 'normal' | 'small';

const looks: Record<ButtonLook, string> = {
  primary: 'border-gley-deep bg-gley text-white hover:bg-gley-deep active:bg-gley-deep',
  quiet: 'border-fallow bg-white text-humus hover:border-humus hover:bg-silt',
  destructive: 'border-iron-deep bg-iron text-white hover:bg-iron-deep',
  plain: 'border-transparent text-gley underline decoration-1 underline-offset-4 hover:bg-silt hover:text-gley-deep',
};

/** A key that sits on a ledge: the lower edge is thicker and gives way when pressed. */
export function buttonClass(look: ButtonLook, size: ButtonSize = 'normal', wide = false): string {
  return cx(
    'inline-flex max-w-full items-center justify-center gap-2 rounded-sm border text-center font-semibold leading-tight',
    look === 'plain' ? '' : 'border-b-3 active:border-b active:translate-y-0.5',
    size === 'small' ? 'min-h-9 px-3 py-1 text-sm' : 'min-h-(--target) px-4 py-2',
    wide && 'w-full',
    'aria-busy:cursor-progress unavailable:cursor-not-allowed unavailable:border-dashed unavailable:border-fallow unavailable:bg-silt unavailable:text-clay unavailable:no-underline',
    looks[look],
  );
}
