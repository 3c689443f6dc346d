'use client';

import { useState, type ReactNode } from 'react';
import { useController, type Control } from 'react-hook-form';
import type { InstrumentInput } from '@/lib/api/commissioning';
import { readNumber } from '@/lib/units/number-text';
import { TextField } from '../ui/field';

type NumberName = 'rangeLow' | 'rangeHigh' | 'accuracyPercent' | 'accuracyAbsolute';

interface NumberFieldProps {
  control: Control<InstrumentInput>;
  name: NumberName;
  label: ReactNode;
  hint: string;
}

/** A number with comma or point; empty is no number, and what cannot be read says so and is not taken for one. */
export function NumberField({ control, name, label, hint }: NumberFieldProps) {
  const {
    field: { value, onChange, onBlur, ref },
    fieldState: { error },
  } = useController({ control, name });
  const [text, setText] = useState(value === null ? '' : String(value));
  const [trouble, setTrouble] = useState<string>();
  const take = (typed: string) => {
    setText(typed);
    const read = typed.trim() === '' ? null : readNumber(typed);
    setTrouble(read && !read.ok ? read.message : undefined);
    onChange(read === null ? null : read.ok ? read.value : Number.NaN);
  };
  return (
    <TextField
      label={label}
      hint={hint}
      inputMode="decimal"
      autoComplete="off"
      className="figures text-right"
      value={text}
      onChange={(event) => take(event.target.value)}
      onBlur={onBlur}
      ref={ref}
      error={trouble ?? (error && (text.trim() === '' ? 'A number is needed.' : error.message))}
    />
  );
}
