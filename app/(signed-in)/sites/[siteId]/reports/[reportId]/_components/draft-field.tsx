'use client';

import { type ComponentProps, useState } from 'react';
import type { ApiResult } from '@/lib/ui/api';
import { TextField } from '@/lib/ui/fields/text-field';

type DraftFieldProps = Omit<ComponentProps<typeof TextField>, 'value' | 'defaultValue' | 'onChange' | 'onBlur'> & {
  /** What is saved. */
  value: string;
  /** Sent when the field is left or Enter is pressed; a refusal keeps what was typed. */
  onSave: (text: string) => Promise<ApiResult<unknown>> | { refused: string };
};

/** A field that saves itself when it is left. What is being typed is never overwritten by what others save. */
export function DraftField({ value, onSave, error, ...rest }: DraftFieldProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const [refused, setRefused] = useState<string>();
  const finish = async () => {
    if (draft === null) return;
    if (draft.trim() === value) {
      setDraft(null);
      setRefused(undefined);
      return;
    }
    const answer = onSave(draft.trim());
    if ('refused' in answer) return setRefused(answer.refused);
    const result = await answer;
    if (result.ok) {
      setDraft(null);
      setRefused(undefined);
    } else setRefused(Object.values(result.problem.fields ?? {})[0] ?? result.problem.detail);
  };
  return (
    <TextField
      {...rest}
      error={refused ?? error}
      value={draft ?? value}
      autoComplete="off"
      onChange={(event) => setDraft(event.currentTarget.value)}
      onBlur={() => void finish()}
      onKeyDown={(event) => {
        if (event.key === 'Enter') void finish();
        if (event.key === 'Escape') {
          setDraft(null);
          setRefused(undefined);
        }
      }}
    />
  );
}
