import Link from 'next/link';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { LoopSummary } from '@/lib/api/projects';
import { stateWords } from '../shell/loop-header';
import { FlowStrip } from '../strip/flow-strip';

const serviceWords = { chilled: 'Chilled water', hot: 'Hot water' } as const;

export function LoopList({ projectId, loops, band }: { projectId: string; loops: LoopSummary[]; band: StripBand }) {
  return (
    <ul className="divide-y">
      {loops.map((loop) => (
        <LoopRow key={loop.id} projectId={projectId} loop={loop} band={band} />
      ))}
    </ul>
  );
}

/** One loop of a project: name, service, flow strip, where it stands. The whole row leads to it. */
function LoopRow({ projectId, loop, band }: { projectId: string; loop: LoopSummary; band: StripBand }) {
  return (
    <li className="hover:bg-well relative grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-5 gap-y-1.5 px-4 py-2.5 md:grid-cols-[minmax(0,1fr)_auto_10rem_11rem]">
      <span className="min-w-0 truncate">
        <Link href={`/projects/${projectId}/loops/${loop.id}`} className="text-ink font-semibold no-underline after:absolute after:inset-0">
          {loop.name}
        </Link>
        <span className="text-quiet ml-3 hidden text-sm sm:inline">{serviceWords[loop.service]}</span>
      </span>
      <span className="text-quiet order-last text-right text-sm md:order-none">
        <Within ticks={loop.strip} />
      </span>
      <span className="order-3 md:order-none">
        <FlowStrip ticks={loop.strip} band={band} size="row" />
        {loop.strip.length === 0 && <span className="text-quiet text-sm sm:hidden">{serviceWords[loop.service]}</span>}
      </span>
      <span className="text-quiet text-right text-sm whitespace-nowrap">
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

/** How far the loop is; before the first reading only how large. */
function Within({ ticks }: { ticks: LoopSummary['strip'] }) {
  if (ticks.length === 0) return null;
  const count = <span className="figures">{ticks.length}</span>;
  if (ticks.every(({ verdict }) => verdict === null)) return <>{count} terminals</>;
  const within = ticks.filter(({ verdict }) => verdict === 'within').length;
  return (
    <>
      <span className="figures text-ink">{within}</span> of {count} within
    </>
  );
}
