import type { ReactNode } from 'react';
import { classNames } from './class-names';

const marks = { plain: 'border-l-rule', brass: 'border-l-brass', high: 'border-l-high' } as const;

/** A short message that stays on the page: what happened, to what, and what to do. */
export function Notice({ tone = 'plain', title, children }: { tone?: keyof typeof marks; title?: string; children?: ReactNode }) {
  return (
    <div role={tone === 'high' ? 'alert' : 'status'} className={classNames('bg-sheet rounded border border-l-4 px-4 py-3', marks[tone])}>
      {title && <p className="font-semibold">{title}</p>}
      {children && <div className="text-quiet text-sm">{children}</div>}
    </div>
  );
}
