import { useId, type InputHTMLAttributes, type ReactNode, type Ref, type SelectHTMLAttributes, type TextareaHTMLAttributes } from 'react';
import { classNames } from './class-names';

export const inputClass =
  'w-full rounded border border-rule bg-well px-2.5 text-ink placeholder:text-quiet aria-[invalid=true]:border-high disabled:opacity-60';

interface FieldProps {
  label: ReactNode;
  /** Unit or hint behind the label. */
  hint?: ReactNode;
  error?: string;
}

function Framed({ id, label, hint, error, children }: FieldProps & { id: string; children: ReactNode }) {
  return (
    <div className="flex flex-col gap-1">
      <label htmlFor={id} className="text-sm font-semibold">
        {label} {hint && <span className="text-quiet font-normal">{hint}</span>}
      </label>
      {children}
      {error && (
        <p id={`${id}-error`} role="alert" className="text-high text-sm">
          ▴ {error}
        </p>
      )}
    </div>
  );
}

/** A labelled input; spread `register(...)` of react-hook-form into it. */
export function TextField({
  label,
  hint,
  error,
  className,
  ...rest
}: FieldProps & InputHTMLAttributes<HTMLInputElement> & { ref?: Ref<HTMLInputElement> }) {
  const id = useId();
  return (
    <Framed id={id} label={label} hint={hint} error={error}>
      <input
        id={id}
        aria-invalid={Boolean(error)}
        aria-describedby={error ? `${id}-error` : undefined}
        className={classNames(inputClass, 'h-10', className)}
        {...rest}
      />
    </Framed>
  );
}

export function TextArea({
  label,
  hint,
  error,
  className,
  ...rest
}: FieldProps & TextareaHTMLAttributes<HTMLTextAreaElement> & { ref?: Ref<HTMLTextAreaElement> }) {
  const id = useId();
  return (
    <Framed id={id} label={label} hint={hint} error={error}>
      <textarea
        id={id}
        rows={3}
        aria-invalid={Boolean(error)}
        aria-describedby={error ? `${id}-error` : undefined}
        className={classNames(inputClass, 'py-2', className)}
        {...rest}
      />
    </Framed>
  );
}

export function SelectField({
  label,
  hint,
  error,
  className,
  children,
  ...rest
}: FieldProps & SelectHTMLAttributes<HTMLSelectElement> & { ref?: Ref<HTMLSelectElement> }) {
  const id = useId();
  return (
    <Framed id={id} label={label} hint={hint} error={error}>
      <select id={id} aria-invalid={Boolean(error)} className={classNames(inputClass, 'h-10', className)} {...rest}>
        {children}
      </select>
    </Framed>
  );
}

export function CheckField({
  label,
  hint,
  error,
  ...rest
}: FieldProps & InputHTMLAttributes<HTMLInputElement> & { ref?: Ref<HTMLInputElement> }) {
  const id = useId();
  return (
    <div className="flex flex-col gap-1">
      <div className="flex items-center gap-2">
        <input id={id} type="checkbox" className="accent-petrol size-5" {...rest} />
        <label htmlFor={id} className="text-sm">
          {label} {hint && <span className="text-quiet">{hint}</span>}
        </label>
      </div>
      {error && (
        <p role="alert" className="text-high text-sm">
          ▴ {error}
        </p>
      )}
    </div>
  );
}
