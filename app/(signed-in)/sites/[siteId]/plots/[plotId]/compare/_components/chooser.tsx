'use client';

import { useRouter } from 'next/navigation';
import { useTransition } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { formatDay } from '@/lib/ui/charts/numbers';
import { Notice } from '@/lib/ui/feedback/notice';
import { SelectField } from '@/lib/ui/fields/select-field';
import { type Choice, type ComparableTest, compareQuery, type Preset } from './choice';

export type ChooserProps = {
  plotId: string;
  analytes: readonly { key: string; label: string }[];
  analyte: string;
  tests: readonly ComparableTest[];
  presets: readonly Preset[];
  choice: Choice | null;
  replaced: boolean;
};

/** Every choice is an address, so that a comparison can be kept, sent and gone back to. */
export function Chooser({ plotId, analytes, analyte, tests, presets, choice, replaced }: ChooserProps) {
  const router = useRouter();
  const [waiting, start] = useTransition();
  const go = (next: Parameters<typeof compareQuery>[0]) =>
    start(() => router.replace(compareQuery(next), { scroll: false }));
  const mineFirst = [
    ...tests.filter((test) => test.plotId === plotId),
    ...tests.filter((test) => test.plotId !== plotId),
  ];
  const options = mineFirst.map((test) => ({
    value: test.id,
    label: `${formatDay(test.takenOn)}: ${test.printed}, ${test.plotId === plotId ? 'this plot' : test.plotName}`,
  }));
  return (
    <div className="grid gap-5 print:hidden" aria-busy={waiting}>
      {replaced ? (
        <Notice live>
          What the address asked for is not there any more; the usual comparison stands here instead.
        </Notice>
      ) : null}
      <div className="grid items-end gap-4 sm:grid-cols-2 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.4fr)_minmax(0,1.4fr)_auto]">
        <SelectField
          name="analyte"
          label="Analyte"
          className="sm:col-span-2 lg:col-span-1"
          value={analyte}
          options={analytes.map(({ key, label }) => ({ value: key, label }))}
          onChange={(event) => go({ analyte: event.currentTarget.value })}
        />
        {choice === null ? null : (
          <>
            <SelectField
              name="a"
              label="First test"
              value={choice.a}
              options={options.map((option) => ({ ...option, disabled: option.value === choice.b }))}
              onChange={(event) => go({ ...choice, a: event.currentTarget.value })}
            />
            <SelectField
              name="b"
              label="Second test"
              value={choice.b}
              options={options.map((option) => ({ ...option, disabled: option.value === choice.a }))}
              onChange={(event) => go({ ...choice, b: event.currentTarget.value })}
            />
            <Button look="quiet" onClick={() => go({ ...choice, a: choice.b, b: choice.a })}>
              Swap the two
            </Button>
          </>
        )}
      </div>
      {presets.length > 0 ? (
        <nav aria-label="Usual comparisons">
          <ul className="flex flex-wrap gap-2">
            {presets.map((preset) => {
              const here = preset.a === choice?.a && preset.b === choice.b;
              return (
                <li key={`${preset.a} ${preset.b}`}>
                  <LinkButton
                    look="quiet"
                    size="small"
                    replace
                    scroll={false}
                    prefetch={false}
                    href={compareQuery({ analyte, a: preset.a, b: preset.b })}
                    {...(here ? { 'aria-current': 'true' as const } : {})}
                    className={here ? 'border-2 border-gley font-bold' : ''}
                  >
                    {preset.label}
                  </LinkButton>
                </li>
              );
            })}
          </ul>
        </nav>
      ) : null}
    </div>
  );
}
