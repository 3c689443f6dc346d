import type { ButtonHTMLAttributes } from 'react';
import { classNames } from './class-names';

const looks = {
  primary: 'bg-petrol text-on-petrol border-petrol font-semibold hover:opacity-90',
  secondary: 'bg-sheet text-ink border-rule font-semibold hover:bg-well',
  quiet: 'bg-transparent text-petrol border-transparent font-semibold hover:bg-well',
  danger: 'bg-sheet text-high border-high font-semibold hover:bg-well',
} as const;

const sizes = { small: 'h-8 px-2.5 text-sm', medium: 'h-10 px-4', touch: 'h-12 min-w-12 px-5 text-lg' } as const;

export type ButtonLook = keyof typeof looks;
export type ButtonSize = keyof typeof sizes;

export const buttonClass = (look: ButtonLook = 'secondary', size: ButtonSize = 'medium') =>
  classNames(
    'inline-flex items-center justify-center gap-2 rounded border whitespace-nowrap disabled:opacity-50',
    looks[look],
    sizes[size],
  );

interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  look?: ButtonLook;
  size?: ButtonSize;
  /** While true the button says what it is doing and takes no second press. */
  isPending?: boolean;
  pendingText?: string;
}

export function Button({ look, size, isPending, pendingText, className, children, disabled, type = 'button', ...rest }: ButtonProps) {
  return (
    <button
      type={type}
      className={classNames(buttonClass(look, size), className)}
      disabled={disabled || isPending}
      aria-busy={isPending || undefined}
      {...rest}
    >
      {isPending ? (pendingText ?? children) : children}
    </button>
  );
}
