import type { Metadata } from 'next';
import Link from 'next/link';
import { PipeSeriesTable } from '@/components/catalogue/pipe-series-table';
import { pipeSeries, type PipeSeriesId } from '@/lib/hydraulics/pipe-series';

export const metadata: Metadata = { title: 'Pipes' };

const ids = Object.keys(pipeSeries) as PipeSeriesId[];

/** The published pipe series; the one that is open stands in the address. */
export default async function PipesPage({ searchParams }: { searchParams: Promise<{ series?: string }> }) {
  const { series } = await searchParams;
  const open = ids.find((id) => id === series) ?? ids[0]!;
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[15rem_minmax(0,1fr)]">
      <nav aria-label="Pipe series" className="bg-sheet flex gap-x-1 overflow-x-auto rounded border p-1 lg:flex-col">
        {ids.map((id) => (
          <Link
            key={id}
            href={`/catalogue/pipes?series=${id}`}
            aria-current={id === open ? 'page' : undefined}
            className={`text-ink flex min-h-9 items-center rounded px-3 whitespace-nowrap no-underline pointer-coarse:min-h-11 ${id === open ? 'bg-well font-semibold' : 'hover:bg-well'}`}
          >
            {pipeSeries[id].name}
          </Link>
        ))}
      </nav>
      <PipeSeriesTable series={pipeSeries[open]} />
    </div>
  );
}
