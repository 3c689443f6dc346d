'use client';

import { formatQuantity } from '@/lib/units/format-quantity';
import { unitFor, type Quantity } from '@/lib/units/quantities';
import { useUnitChoice } from '../shell/units-context';
import { classNames } from './class-names';

interface FigureProps {
  quantity: Quantity;
  /** The stored value; an en dash where there is none. */
  si: number | null | undefined;
  /** Writes the unit behind the figure; in a table it stands in the column's head instead (`UnitName`). */
  hasUnit?: boolean;
  className?: string;
}

/** A stored value as the person reads it. */
export function Figure({ quantity, si, hasUnit, className }: FigureProps) {
  const unit = unitFor(quantity, useUnitChoice());
  return (
    <span className={classNames('figures whitespace-nowrap', className)}>
      {formatQuantity(quantity, si, unit)}
      {hasUnit && <span className="text-quiet ml-1 font-sans text-[0.85em]">{unit}</span>}
    </span>
  );
}

/** The person's unit of a quantity, for the head of a column. */
export function UnitName({ quantity }: { quantity: Quantity }) {
  return <>{unitFor(quantity, useUnitChoice())}</>;
}
