'use client';

import { type ChangeEvent, useState } from 'react';
import { parseNumber } from './parse-number';
import { TextField, type TextFieldProps } from './text-field';

export type NumberFieldProps = Omit<TextFieldProps, 'type' | 'inputMode'> & {
  /** Numbers below zero are meant here too, so phones get a keyboard with a minus sign. */
  signed?: boolean;
  /** Hears the number as the API takes it ("6.4" for "6,4"), or null while there is none. */
  onNumber?: (text: string | null) => void;
};

/** Takes 6,4 and 6.4 and trims a unit typed in; never a spinner, never changed by the scroll wheel. */
export function NumberField({
  signed = false,
  onNumber,
  onChange,
  hint,
  unit,
  defaultValue,
  ...rest
}: NumberFieldProps) {
  const [echo, setEcho] = useState('');
  const hear = (event: ChangeEvent<HTMLInputElement>) => {
    onChange?.(event);
    const read = parseNumber(event.target.value);
    onNumber?.(read.ok ? read.text : null);
    // Say it back only when what was understood differs from what was typed.
    const differs = read.ok && read.text !== event.target.value.trim();
    setEcho(differs ? `Read as ${read.text}${unit ? ` ${unit}` : ''}.` : '');
  };
  return (
    <div className={rest.className}>
      <TextField
        {...rest}
        className=""
        hint={hint}
        unit={unit}
        defaultValue={defaultValue}
        inputMode={signed ? 'text' : 'decimal'}
        autoComplete="off"
        onChange={hear}
      />
      <p aria-live="polite" className="text-sm text-clay empty:hidden">
        {echo}
      </p>
    </div>
  );
}
