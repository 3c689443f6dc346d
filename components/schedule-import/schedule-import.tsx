'use client';

import type { DrawingFluid } from '@/lib/network/drawing';
import { BringStep } from './bring-step';
import { BuildStep } from './build-step';
import { ColumnsStep } from './columns-step';
import { RowsStep } from './rows-step';
import type { DrawnAlready } from './use-generate';
import { useSchedule } from './use-schedule';

interface ScheduleImportProps {
  loopId: string;
  personId: string;
  drawingHref: string;
  fluid: DrawingFluid;
  drawn: DrawnAlready;
}

/** From a terminal schedule to a drawn, sized and balanced loop; each step appears when the one before has something to go on. */
export function ScheduleImport({ loopId, personId, drawingHref, fluid, drawn }: ScheduleImportProps) {
  const schedule = useSchedule(personId, fluid);
  const { state } = schedule;
  return (
    <div className="flex flex-col gap-4">
      <BringStep loopId={loopId} brought={state?.brought ?? null} onBring={schedule.bring} />
      {state ? (
        <>
          <ColumnsStep schedule={schedule} />
          <RowsStep schedule={schedule} fluid={fluid} />
          <BuildStep loopId={loopId} drawingHref={drawingHref} drawn={drawn} rows={schedule.rows} />
        </>
      ) : (
        <ol start={2} className="text-quiet list-inside list-decimal px-4 text-sm">
          <li>Say what the columns are, and their units.</li>
          <li>Check the rows: each faulty cell is named, to be put right or left out.</li>
          <li>Say how the loop is built. Nothing is written before you press Generate.</li>
        </ol>
      )}
    </div>
  );
}
