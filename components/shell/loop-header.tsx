import Link from 'next/link';
import type { ReactNode } from 'react';
import type { LoopDetail, LoopState } from '@/lib/api/loops';
import { may } from '@/lib/api/permissions';
import { FlowStrip } from '../strip/flow-strip';
import { AccountMenu } from './account-menu';
import { Mark } from './mark';
import { NavLink } from './nav-link';

export const stateWords: Record<LoopState, string> = {
  draft: 'Draft',
  issued: 'Issued',
  'in-commissioning': 'In commissioning',
  submitted: 'Submitted',
  reviewed: 'Reviewed',
  accepted: 'Accepted',
};

/** Heads every page of a loop: where it stands, its pages, its flow strip, its state. */
export function LoopHeader({ loop, person }: { loop: LoopDetail; person: { name: string; organizationName: string } }) {
  const base = `/projects/${loop.project.id}/loops/${loop.id}`;
  const pages: [string, ReactNode, boolean][] = [
    ['drawing', 'Drawing', may(loop.roles, 'draft.see') || loop.revision !== null],
    ['schedule', 'Schedule', may(loop.roles, 'draft.see') || loop.revision !== null],
    ['commissioning', 'Commissioning', true],
    ['report', 'Report', true],
  ];
  return (
    <header className="bg-sheet sticky top-0 z-30 grid grid-cols-[minmax(0,1fr)_auto] items-stretch gap-x-6 border-b px-4 lg:grid-cols-[minmax(0,auto)_auto_1fr] print:hidden">
      <div className="flex min-h-14 min-w-0 items-center gap-4">
        <Mark />
        <div className="flex min-w-0">
          <Link href={`/projects/${loop.project.id}`} className="text-quiet truncate no-underline hover:underline">
            {loop.project.name}
          </Link>
          <span className="text-quiet mx-1.5">/</span>
          <span className="max-w-[60vw] shrink-0 truncate font-bold">{loop.name}</span>
        </div>
      </div>
      <nav
        aria-label="Pages of the loop"
        className="col-span-2 row-start-2 flex items-stretch gap-5 overflow-x-auto lg:col-span-1 lg:col-start-2 lg:row-start-1"
      >
        {pages.map(
          ([path, name, isShown]) =>
            isShown && (
              <NavLink key={path} href={`${base}/${path}`}>
                {name}
              </NavLink>
            ),
        )}
      </nav>
      <div className="flex min-h-14 items-center gap-4 justify-self-end">
        <div className="hidden xl:block">
          <FlowStrip ticks={loop.strip} band={loop.band} />
        </div>
        <span className="text-quiet hidden text-sm whitespace-nowrap sm:inline">
          {stateWords[loop.state]}
          {loop.revision && `, revision ${loop.revision.number}`}
        </span>
        <AccountMenu {...person} />
      </div>
    </header>
  );
}
