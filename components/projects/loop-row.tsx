import Link from 'next/link';
import type { StripBand } from '@/lib/api/flow-strip';
import type { LoopSummary } from '@/lib/api/projects';
import { stateWords } from '../shell/loop-header';
import { FlowStrip } from '../strip/flow-strip';

const serviceWords = { chilled: 'Chilled water', hot: 'Hot water' } as const;

/** One loop of a project: name, service, flow strip, where it stands. */
export function LoopRow({ projectId, loop, band }: { projectId: string; loop: LoopSummary; band: StripBand }) {
  return (
    <li className="relative grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 gap-y-1 px-4 py-2.5 hover:bg-well sm:grid-cols-[minmax(0,1fr)_10rem_11rem]">
      <span className="min-w-0 truncate">
        <Link href={`/projects/${projectId}/loops/${loop.id}`} className="font-semibold text-ink no-underline after:absolute after:inset-0">
          {loop.name}
        </Link>
        <span className="ml-3 text-sm text-quiet">{serviceWords[loop.service]}</span>
      </span>
      <span className="order-last col-span-2 sm:order-none sm:col-span-1">
        <FlowStrip ticks={loop.strip} band={band} size="row" />
      </span>
      <span className="text-right text-sm whitespace-nowrap text-quiet">
        {stateWords[loop.state]}
        {loop.revisionNumber !== null && (
          <>
            , revision <span className="figures">{loop.revisionNumber}</span>
          </>
        )}
      </span>
    </li>
  );
}

export function LoopList({ projectId, loops, band }: { projectId: string; loops: LoopSummary[]; band: StripBand }) {
  return (
    <ul className="divide-y">
      {loops.map((loop) => (
        <LoopRow key={loop.id} projectId={projectId} loop={loop} band={band} />
      ))}
    </ul>
  );
}
