'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useEffect, type ReactNode } from 'react';
import type { GeneratedLoop } from '@/lib/api/generate';
import { buttonClass } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Figure } from '../ui/figure';

/** What was drawn, to judge before the drawing is opened; every way on leads to the drawing, which is saved already. */
export function GeneratedResult({ result, drawingHref }: { result: GeneratedLoop; drawingHref: string }) {
  const router = useRouter();
  const { summary } = result;
  useEffect(() => router.prefetch(drawingHref), [router, drawingHref]);
  const lines: [string, ReactNode][] = [
    ['Terminals', count(summary.terminals)],
    ['Storeys, risers, branches', [summary.storeys, summary.risers, summary.branches].map(count).join(', ')],
    ['Pipes, balancing valves', [summary.pipes, summary.balancingValves].map(count).join(', ')],
    ['Pump flow', <Figure key="flow" quantity="flow" si={summary.pumpFlowLs} hasUnit />],
    ['Pump head', <Figure key="head" quantity="head" si={summary.pumpHeadM} hasUnit />],
    ['Index circuit', summary.indexTag ?? '–'],
    ['Flows with the settings in place', `${summary.lowestPercent.toFixed(1)} to ${summary.highestPercent.toFixed(1)} % of design`],
    ['Lowest reading of a valve', <Figure key="reading" quantity="pressure" si={summary.lowestReadingKpa} hasUnit />],
    ['Drawn, sized and balanced in', `${(summary.tookMs / 1000).toFixed(1)} s`],
  ];
  return (
    <Dialog isOpen onClose={() => router.push(drawingHref)} title="The loop is drawn">
      <dl className="text-sm">
        {lines.map(([name, value]) => (
          <div key={name} className="flex justify-between gap-3 border-t py-1.5">
            <dt>{name}</dt>
            <dd className="figures text-right">{value}</dd>
          </div>
        ))}
      </dl>
      {summary.notes.length > 0 && (
        <>
          <h3 className="mt-4 font-semibold">To look at</h3>
          <ul className="text-quiet mt-1 list-disc pl-5 text-sm">
            {summary.notes.map((note) => (
              <li key={note}>{note}</li>
            ))}
          </ul>
        </>
      )}
      <div className="mt-5 flex justify-end">
        <Link href={drawingHref} className={`${buttonClass('primary')} no-underline`}>
          Open the drawing
        </Link>
      </div>
    </Dialog>
  );
}

const count = (number: number): string => number.toLocaleString('en-GB');
