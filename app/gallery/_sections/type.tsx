import { LogoMark, Wordmark } from '@/lib/ui/frame/logo';

export function TypeSection() {
  return (
    <div className="grid gap-6">
      <div>
        <p className="font-display text-4xl font-semibold">Did the lime do what you meant?</p>
        <p className="font-display text-3xl font-semibold">North bed, spring 2026</p>
        <p className="font-display text-2xl font-semibold">What was spread</p>
        <p className="font-display text-xl font-semibold">Section heading</p>
        <p className="font-display text-lg font-semibold">Smaller heading</p>
        <p className="mt-3 max-w-measure">
          pH rose 0.4, from 5.9 to 6.3. The lab's own spread is about 0.2, so this is likely real. Text is Atkinson
          Hyperlegible Next: 0 O, 1 l I, 6 8 9 stay apart; Łukasz, Zoë, ½, ±, ≥, µ, m².
        </p>
        <p className="text-sm text-clay">Small text in clay, for hints and notes.</p>
        <p className="font-figures">6.4 12.5 108.0 0.63 &lt; 0.1 figures and ids</p>
      </div>
      <div className="flex flex-wrap items-end gap-6">
        <Wordmark />
        <LogoMark className="size-6" label="Loamline" />
        <LogoMark className="size-12" />
        <LogoMark className="size-24" />
        <LogoMark className="size-24" on="mono" />
        <span className="bg-peat p-4 text-chalk">
          <Wordmark on="dark" />
        </span>
      </div>
    </div>
  );
}
