import type { ReactNode } from 'react';
import { LoopOrnament } from '@/components/account/loop-ornament';
import { Mark } from '@/components/shell/mark';

/** The pages that work signed out: one form on a sheet. */
export default function AccountLayout({ children }: { children: ReactNode }) {
  return (
    <div className="grid min-h-dvh lg:grid-cols-[1fr_30rem]">
      <aside className="hidden flex-col justify-between gap-10 p-10 lg:flex">
        <Mark />
        <LoopOrnament />
        <p className="text-quiet max-w-md">
          Designed, balanced on site and handed over: one record from the first line on the drawing to the owner’s signed report.
        </p>
      </aside>
      <main className="bg-sheet flex flex-col justify-center gap-6 px-6 py-10 sm:px-12 lg:border-l">
        <div className="lg:hidden">
          <Mark />
        </div>
        {children}
      </main>
    </div>
  );
}
