'use client';

import { TextField, type TextFieldProps } from './text-field';

export type DateFieldProps = Omit<TextFieldProps, 'type' | 'unit' | 'min' | 'max'> & {
  /** Days as YYYY-MM-DD. */
  min?: string | undefined;
  max?: string | undefined;
};

/** A calendar day. The value is YYYY-MM-DD whatever order the person's device shows it in. */
export function DateField(props: DateFieldProps) {
  return (
    <div className={props.className}>
      <TextField {...props} type="date" className="max-w-60" />
    </div>
  );
}
