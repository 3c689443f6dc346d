import type { DrawingFluid } from '@/lib/network/drawing';
import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';
import { designFlowOfLoad } from '@/lib/network/working';
import { Dialog } from '../ui/dialog';

/** How the design flow of a row follows from its load and temperatures. */
export function FlowWorking({ row, fluid, onClose }: { row: ReadRow | null; fluid: DrawingFluid; onClose: () => void }) {
  const loadKw = row?.terminal?.loadKw ?? null;
  const found = row && loadKw !== null ? designFlowOfLoad(loadKw, { ...fluid, supplyC: row.supplyC, returnC: row.returnC }) : null;
  const working = found && 'working' in found ? found.working : null;
  return (
    <Dialog isOpen={working !== null} onClose={onClose} title={`Design flow of ${row?.texts.tag ?? ''}`}>
      {working && (
        <>
          <p>{working.formula}</p>
          <p className="figures mt-1 text-sm break-words">
            = {working.numbers} = <strong>{working.result}</strong>
          </p>
          <dl className="mt-3 text-sm">
            {working.inputs.map(({ name, value }) => (
              <div key={name} className="flex justify-between gap-3 border-t py-1">
                <dt>{name}</dt>
                <dd className="figures whitespace-nowrap">{value}</dd>
              </div>
            ))}
          </dl>
          <p className="text-quiet mt-3 text-sm">{working.source}</p>
        </>
      )}
    </Dialog>
  );
}
