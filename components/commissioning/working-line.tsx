import type { ReactNode } from 'react';

/** One step of a working: its name, the formula with the figures in it, the result, and where it comes from. */
export const Line = ({ name, formula, value, children }: { name: string; formula: string; value: string; children?: ReactNode }) => (
  <div className="border-t pt-3 first:border-t-0 first:pt-0">
    <dt className="font-semibold">{name}</dt>
    <dd>
      <span className="block break-words tabular-nums">
        {formula} = <strong className="figures whitespace-nowrap">{value}</strong>
      </span>
      {children && <span className="text-quiet mt-1 block text-sm">{children}</span>}
    </dd>
  </div>
);

export const figure = (value: number, decimals: number) => value.toFixed(decimals);
