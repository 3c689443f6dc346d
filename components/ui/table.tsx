import type { ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';
import { classNames } from './class-names';

/** Takes the width it needs and scrolls by itself, so that the page never does. */
export function TableFrame({ label, className, children }: { label: string; className?: string; children: ReactNode }) {
  return (
    <div role="region" aria-label={label} tabIndex={0} className={classNames('overflow-auto print:overflow-visible', className)}>
      <table className="w-full border-collapse text-sm">{children}</table>
    </div>
  );
}

/** For columns that a phone leaves out and paper keeps. */
export const onlyWide = 'hidden md:table-cell print:table-cell';

interface HeadProps extends ThHTMLAttributes<HTMLTableCellElement> {
  /** Stands after the name; every figure of the column is in it. */
  unit?: ReactNode;
  isFigure?: boolean;
}

export function Head({ unit, isFigure, className, children, ...rest }: HeadProps) {
  return (
    <th
      scope="col"
      className={classNames(
        'bg-sheet text-quiet sticky top-0 z-10 px-1.5 py-2 align-bottom text-xs leading-tight font-semibold first:pl-4 last:pr-4 sm:px-2',
        'print:border-ink shadow-[inset_0_-1px_0_var(--ink)] print:static print:border-b print:shadow-none',
        isFigure ? 'text-right' : 'text-left',
        className,
      )}
      {...rest}
    >
      {children}
      {unit && <span className="block font-normal">{unit}</span>}
    </th>
  );
}

const cell = 'border-b px-1.5 py-1.5 sm:px-2 align-top first:pl-4 last:pr-4';

export const Figures = ({ className, ...rest }: TdHTMLAttributes<HTMLTableCellElement>) => (
  <td className={classNames(cell, 'figures text-right whitespace-nowrap', className)} {...rest} />
);

export const Words = ({ className, ...rest }: TdHTMLAttributes<HTMLTableCellElement>) => (
  <td className={classNames(cell, 'text-left', className)} {...rest} />
);

/** The cell that names its row. */
export const RowName = ({ className, ...rest }: ThHTMLAttributes<HTMLTableCellElement>) => (
  <th scope="row" className={classNames(cell, 'text-left font-semibold whitespace-nowrap', className)} {...rest} />
);
