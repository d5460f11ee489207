'use client';

import { type ComponentProps, useState } from 'react';
import type { ApiResult } from '@/lib/ui/api';
import { SelectField } from '@/lib/ui/fields/select-field';

type ChoiceFieldProps = Omit<ComponentProps<typeof SelectField>, 'value' | 'defaultValue' | 'onChange'> & {
  /** What is saved. */
  value: string;
  onSave: (value: string) => Promise<ApiResult<unknown>>;
};

/** A list that saves itself. The choice shows at once; a refused one goes back to what is true. */
export function ChoiceField({ value, onSave, ...rest }: ChoiceFieldProps) {
  const [chosen, setChosen] = useState<string | null>(null);
  const choose = async (next: string) => {
    setChosen(next);
    await onSave(next);
    setChosen((now) => (now === next ? null : now));
  };
  return (
    <SelectField
      {...rest}
      value={chosen ?? value}
      aria-busy={chosen !== null || undefined}
      onChange={(event) => void choose(event.currentTarget.value)}
    />
  );
}
