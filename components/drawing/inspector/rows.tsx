'use client';

import { useId, useState, type ReactNode } from 'react';
import { useController, useFormContext } from 'react-hook-form';
import { Figure } from '@/components/ui/figure';
import { inputClass } from '@/components/ui/field';
import { QuantityField } from '@/components/ui/quantity-field';
import { classNames } from '@/components/ui/class-names';
import { readNumber } from '@/lib/units/number-text';
import type { Quantity } from '@/lib/units/quantities';
import { useUnreadFields } from './commit-form';

/** A line of the inspector: what it is on the left, its field or figure on the right. */
export const rowClass = 'grid grid-cols-[minmax(0,1fr)_9.5rem] items-center gap-x-3 border-b py-1 text-sm pointer-coarse:py-1.5';
const compact = 'h-8 pointer-coarse:h-11';
const several = 'several';

export const Section = ({ title, action, children }: { title: string; action?: ReactNode; children: ReactNode }) => (
  <section className="mt-4">
    <div className="flex items-baseline justify-between">
      <h3 className="text-quiet text-xs font-semibold">{title}</h3>
      {action}
    </div>
    {children}
  </section>
);

interface FieldRowProps {
  name: string;
  label: string;
  /** Several pieces are edited at once and differ here. */
  isMixed?: boolean;
}

export function QuantityRow({ name, label, quantity, isMixed }: FieldRowProps & { quantity: Quantity }) {
  const { field, fieldState } = useController({ name });
  const unread = useUnreadFields();
  return (
    <div className={rowClass}>
      <span aria-hidden>{label}</span>
      <QuantityField
        label={label}
        isLabelHidden
        quantity={quantity}
        {...field}
        onChange={(si, { message }) => {
          if (message) unread.current.add(name);
          else unread.current.delete(name);
          field.onChange(si);
        }}
        placeholder={isMixed ? several : undefined}
        error={fieldState.error?.message}
        className="[&_input]:h-8 [&_input]:pr-[4.2rem] pointer-coarse:[&_input]:h-11"
      />
    </div>
  );
}

/** A plain number: a count, a ratio, a loss coefficient, or per cent of a stored fraction. */
export function NumberRow({ name, label, isMixed, isPercent, unit }: FieldRowProps & { isPercent?: boolean; unit?: string }) {
  const id = useId();
  const { field, fieldState } = useController({ name });
  const unread = useUnreadFields();
  const [typed, setTyped] = useState<{ text: string; value: number | null; message: string | null } | null>(null);
  const scale = isPercent ? 100 : 1;
  const isOwn = typed !== null && Object.is(typed.value, field.value);
  const shown = field.value === null ? '' : String(Number((Number(field.value) * scale).toPrecision(12)));
  const error = (isOwn ? typed.message : null) ?? fieldState.error?.message;
  const take = (text: string) => {
    const read = text.trim() === '' ? null : readNumber(text);
    const value = read?.ok ? read.value / scale : null;
    const message = read && !read.ok ? read.message : null;
    if (message) unread.current.add(name);
    else unread.current.delete(name);
    setTyped({ text, value, message });
    field.onChange(value);
  };
  return (
    <div className={rowClass}>
      <label htmlFor={id}>{label}</label>
      <div className="relative">
        <input
          id={id}
          inputMode="decimal"
          autoComplete="off"
          placeholder={isMixed ? several : undefined}
          aria-invalid={Boolean(error)}
          aria-describedby={error ? `${id}-error` : undefined}
          className={classNames(inputClass, compact, 'figures text-right', unit || isPercent ? 'pr-[4.2rem]' : '')}
          {...field}
          value={isOwn ? typed.text : shown}
          onChange={(event) => take(event.target.value)}
        />
        <span className="text-quiet pointer-events-none absolute inset-y-0 right-2.5 flex items-center text-sm">
          {isPercent ? '%' : unit}
        </span>
      </div>
      {error && (
        <p id={`${id}-error`} role="alert" className="text-high col-span-2 text-right text-xs">
          ▴ {error}
        </p>
      )}
    </div>
  );
}

export function TextRow({ name, label, placeholder }: FieldRowProps & { placeholder?: string }) {
  const id = useId();
  const { register, formState } = useFormContext();
  const error = formState.errors[name]?.message as string | undefined;
  return (
    <div className={rowClass}>
      <label htmlFor={id}>{label}</label>
      <input
        id={id}
        placeholder={placeholder}
        aria-invalid={Boolean(error)}
        autoComplete="off"
        className={classNames(inputClass, compact)}
        {...register(name)}
      />
      {error && (
        <p role="alert" className="text-high col-span-2 text-right text-xs">
          {error}
        </p>
      )}
    </div>
  );
}

/** A choice is taken at once. */
export function SelectRow({ name, label, options, isMixed }: FieldRowProps & { options: [value: string, words: string][] }) {
  const id = useId();
  const { field } = useController({ name });
  return (
    <div className={rowClass}>
      <label htmlFor={id}>{label}</label>
      <select
        id={id}
        className={classNames(inputClass, compact, 'px-1.5')}
        {...field}
        value={isMixed ? '' : field.value}
        onChange={(event) => {
          field.onChange(event);
          event.target.form?.requestSubmit();
        }}
      >
        {isMixed && <option value="">{several}</option>}
        {options.map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
    </div>
  );
}

export function CheckRow({ name, label }: FieldRowProps) {
  const id = useId();
  const { field } = useController({ name });
  return (
    <div className={rowClass}>
      <label htmlFor={id}>{label}</label>
      <input
        id={id}
        type="checkbox"
        className="accent-petrol size-5 justify-self-end"
        checked={Boolean(field.value)}
        onChange={(event) => {
          field.onChange(event.target.checked);
          event.target.form?.requestSubmit();
        }}
      />
    </div>
  );
}

/** A figure that was computed: nothing to type. */
export function FigureRow({
  label,
  quantity,
  si,
  children,
}: {
  label: string;
  quantity?: Quantity;
  si?: number | null;
  children?: ReactNode;
}) {
  return (
    <div className={classNames(rowClass, 'min-h-9')}>
      <span>{label}</span>
      <span className="pr-2.5 text-right">{quantity ? <Figure quantity={quantity} si={si} hasUnit /> : children}</span>
    </div>
  );
}
