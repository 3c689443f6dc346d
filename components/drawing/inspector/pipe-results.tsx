'use client';

import type { DrawingPipe } from '@/lib/network/drawing';
import { pipeWorking } from '@/lib/network/working';
import { useResults } from '../editor-context';
import { FigureRow, Section } from './rows';
import { WorkingList } from './working-list';

/** What the solver found for one pipe, and how. */
export function PipeResults({ pipe }: { pipe: DrawingPipe }) {
  const { figures, solved, isOld } = useResults();
  const solution = figures?.pipes.get(pipe.id);
  if (!figures || !solution || !solved) return null;
  return (
    <>
      <Section title={`${figures.basis === 'drawn' ? 'Valves as drawn' : 'As balanced'}${isOld ? ' (earlier figures)' : ''}`}>
        <FigureRow label="Flow" quantity="flow" si={solution.flowLs} />
        {solution.percentOfDesign !== null && (
          <FigureRow label="Of design">
            <span className="figures">{solution.percentOfDesign.toFixed(1)}</span> <span className="text-quiet text-xs">%</span>
          </FigureRow>
        )}
        <FigureRow label="Velocity" quantity="velocity" si={solution.velocityMs} />
        <FigureRow label="Friction" quantity="gradient" si={solution.paPerM} />
        <FigureRow label="Drop" quantity="pressure" si={Math.abs(solution.dropKpa)} />
        <FigureRow label="Gauge pressure, begin" quantity="pressure" si={solution.fromKpa} />
        <FigureRow label="Gauge pressure, end" quantity="pressure" si={solution.toKpa} />
      </Section>
      <WorkingList workings={pipeWorking(pipe, solution, figures.fluid)} />
    </>
  );
}
