'use client';

import { useId, useState, type ReactNode, type Ref } from 'react';
import { typedQuantity } from '@/lib/units/format-quantity';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { unitFor, type Quantity } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { classNames } from './class-names';
import { inputClass } from './field';

/** What stands in the field now: text and unit as typed, the value they mean (null while empty), or why they mean none. */
export interface TypedEntry {
  text: string;
  unit: string;
  message: string | null;
}

interface QuantityFieldProps {
  label: ReactNode;
  quantity: Quantity;
  /** The stored value, as `field.value` of a Controller gives it. */
  value: number | null;
  /** Gets the stored value, null while the field is empty or cannot be read; the entry tells the two apart. */
  onChange: (si: number | null, entry: TypedEntry) => void;
  onBlur?: () => void;
  ref?: Ref<HTMLInputElement>;
  name?: string;
  error?: string;
  hint?: ReactNode;
  /** 48 px high with large figures, for gloves. */
  isTouch?: boolean;
  /** For the cell of a table whose head names it. */
  isLabelHidden?: boolean;
  disabled?: boolean;
  placeholder?: string;
  className?: string;
}

/**
 * A field for a quantity in the person's unit. It keeps what was typed for as long as the value stays what that text means, so
 * "12 gpm" is not rewritten under the hand, and shows the value's own digits once it is set from outside.
 */
export function QuantityField({
  label,
  quantity,
  value,
  onChange,
  onBlur,
  ref,
  name,
  error,
  hint,
  isTouch,
  isLabelHidden,
  className,
  ...rest
}: QuantityFieldProps) {
  const id = useId();
  const unit = unitFor(quantity, useUnitChoice());
  const [typed, setTyped] = useState<{ text: string; si: number | null; message: string | null } | null>(null);
  const isOwn = typed !== null && Object.is(typed.si, value);
  const text = isOwn ? typed.text : typedQuantity(quantity, value, unit);
  const hasOwnUnit = /[^\d.,\s+\-\u2212]/.test(text);
  const message = (isOwn ? typed.message : null) ?? error;

  const take = (next: string) => {
    const parsed = next.trim() === '' ? null : parseQuantity(quantity, next, unit);
    const si = parsed?.ok ? parsed.si : null;
    const trouble = parsed && !parsed.ok ? parsed.message : null;
    setTyped({ text: next, si, message: trouble });
    onChange(si, { text: parsed?.ok ? parsed.text : next, unit: parsed?.ok ? parsed.unit : unit, message: trouble });
  };

  return (
    <div className={classNames('flex flex-col gap-1', className)}>
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'text-sm font-semibold'}>
        {label} {hint && <span className="text-quiet font-normal">{hint}</span>}
      </label>
      <div className="relative">
        <input
          id={id}
          ref={ref}
          name={name}
          value={text}
          onChange={(event) => take(event.target.value)}
          onBlur={onBlur}
          inputMode={quantity === 'temperature' ? 'text' : 'decimal'}
          autoComplete="off"
          aria-invalid={Boolean(message)}
          aria-describedby={message ? `${id}-unit ${id}-error` : `${id}-unit`}
          className={classNames(inputClass, 'figures text-right', isTouch ? 'h-12 pr-20 text-xl' : 'h-10 pr-16')}
          {...rest}
        />
        <span id={`${id}-unit`} className="text-quiet pointer-events-none absolute inset-y-0 right-2.5 flex items-center text-sm">
          {hasOwnUnit ? '' : unit}
        </span>
      </div>
      {message && (
        <p id={`${id}-error`} role="alert" className="text-high text-sm">
          ▴ {message}
        </p>
      )}
    </div>
  );
}
