import type { ReactNode } from 'react';

interface SheetProps {
  title: string;
  /** At the right of the title. */
  action?: ReactNode;
  /** For rows that reach from edge to edge. */
  isFlush?: boolean;
  children: ReactNode;
}

/** A part of a page: a white sheet with a heading. */
export function Sheet({ title, action, isFlush, children }: SheetProps) {
  return (
    <section className="bg-sheet rounded border">
      <div className={`flex min-h-12 break-after-avoid items-center justify-between gap-3 px-4 pt-2 ${isFlush ? 'border-b pb-2' : ''}`}>
        <h2>{title}</h2>
        {action}
      </div>
      <div className={isFlush ? '' : 'px-4 pt-1 pb-4'}>{children}</div>
    </section>
  );
}
