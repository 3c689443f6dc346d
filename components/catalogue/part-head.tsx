import Link from 'next/link';
import type { ReactNode } from 'react';
import { buttonClass } from '../ui/button';

/** The heading of a list of own entries, with the way to a new one. */
export const PartHead = ({ title, newHref, newWords }: { title: string; newHref: string | null; newWords: string }) => (
  <div className="mb-2 flex flex-wrap items-center justify-between gap-3">
    <h2>{title}</h2>
    {newHref && (
      <Link href={newHref} className={`${buttonClass('primary')} no-underline`}>
        {newWords}
      </Link>
    )}
  </div>
);

export const NothingYet = ({ title, children }: { title: string; children: ReactNode }) => (
  <div className="rounded border border-dashed px-6 py-10 text-center">
    <h3>{title}</h3>
    <p className="text-quiet mx-auto mt-1 max-w-md">{children}</p>
  </div>
);
