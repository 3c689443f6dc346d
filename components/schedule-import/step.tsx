import type { ReactNode } from 'react';

interface StepProps {
  number: number;
  title: string;
  /** At the right of the title: what has come of the step. */
  outcome?: ReactNode;
  children: ReactNode;
}

/** One of the steps from a schedule to a loop, in the order in which they are taken. */
export function Step({ number, title, outcome, children }: StepProps) {
  return (
    <section aria-labelledby={`step-${number}`} className="bg-sheet rounded border">
      <div className="flex min-h-12 flex-wrap items-baseline gap-x-3 gap-y-1 px-4 pt-3">
        <span aria-hidden className="figures text-brass text-lg">
          {number}
        </span>
        <h2 id={`step-${number}`}>{title}</h2>
        {outcome && <div className="text-quiet ml-auto text-sm">{outcome}</div>}
      </div>
      <div className="px-4 pt-2 pb-4">{children}</div>
    </section>
  );
}
