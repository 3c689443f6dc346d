'use client';

import type { CataloguePump } from '@/lib/api/catalogue';
import { savePump } from '@/lib/client/catalogue';
import { rowsOfPump } from '@/lib/catalogue/entry-rows';
import { pumpColumns, usualUnit } from '@/lib/catalogue/figure-columns';
import { readPumpRows } from '@/lib/catalogue/read-pump-rows';
import { useUnitChoice } from '../shell/units-context';
import { EntryForm } from './entry-form';
import type { Grid } from './figure-grid';
import { PumpChart } from './pump-chart';

const read = ({ rows, units }: Grid) => readPumpRows(rows, units);

export function PumpForm({ pump }: { pump: CataloguePump | null }) {
  const choice = useUnitChoice();
  const units = Object.fromEntries(pumpColumns.map((column) => [column.key, usualUnit(column, choice)]));
  return (
    <EntryForm
      entry={pump}
      kind="pump"
      columns={pumpColumns}
      initialGrid={{ rows: pump ? rowsOfPump(pump.points, units) : [], units }}
      placeholders={{ name: 'Inline pump 80-160, 1450 rpm', source: 'Test curve, number and date' }}
      hint="Points of the curve at nominal speed, three or more. The head may stay level but not rise with flow; efficiency and suction head required stand at the points where they are known."
      faultsOf={(grid) => read(grid).faults}
      preview={(grid) => <Preview name={pump?.name ?? 'the pump'} grid={grid} />}
      onSave={(described, grid) => savePump(pump, { ...described, points: read(grid).points })}
      listHref="/catalogue/pumps"
    />
  );
}

function Preview({ name, grid }: { name: string; grid: Grid }) {
  const { points, faults } = read(grid);
  if (points.length < 3 || faults.length > 0)
    return (
      <p className="text-quiet text-sm">
        The curve is drawn through your points as soon as three of them fit: flow rising, head not rising.
      </p>
    );
  return (
    <>
      <PumpChart name={name} points={points} />
      <p className="text-quiet mt-3 text-sm">
        The line is what the solver uses: a monotone cubic through every point, level before the first, straight on past the last.
        {points[0]!.flowLs > 0 && ' Your curve has no point at zero flow: its shut-off head is taken from the first one.'}
      </p>
    </>
  );
}
