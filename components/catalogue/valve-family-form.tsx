'use client';

import type { ValveFamily } from '@/lib/api/catalogue';
import { saveValveFamily } from '@/lib/client/catalogue';
import { rowsOfSizes } from '@/lib/catalogue/entry-rows';
import { usualUnit, valveColumns } from '@/lib/catalogue/figure-columns';
import { readValveRows } from '@/lib/catalogue/read-valve-rows';
import { faultsOfValvePoints } from '@/lib/catalogue/valve-points';
import { useUnitChoice } from '../shell/units-context';
import { EntryForm } from './entry-form';
import type { Grid } from './figure-grid';
import { KvChart } from './kv-chart';
import { SizeTable } from './size-table';

const read = ({ rows, units }: Grid) => readValveRows(rows, units);

export function ValveFamilyForm({ family }: { family: ValveFamily | null }) {
  const choice = useUnitChoice();
  const units = Object.fromEntries(valveColumns.map((column) => [column.key, usualUnit(column, choice)]));
  return (
    <EntryForm
      entry={family}
      kind="valve family"
      columns={valveColumns}
      initialGrid={{ rows: family ? rowsOfSizes(family.sizes, units) : [], units }}
      placeholders={{ name: 'Double-regulating valve, bronze', source: 'Data sheet, edition and page' }}
      hint={
        <>
          A row for each setting, or upload a chart with one column a size. A size left empty goes on with the one above. A measuring Kv is
          that between the measuring points: in the first row of a size alone where the orifice is fixed, at every setting where it is not.
        </>
      }
      faultsOf={(grid) => read(grid).faults}
      preview={(grid) => <Preview name={family?.name ?? 'the valve family'} grid={grid} />}
      onSave={(described, grid) => saveValveFamily(family, { ...described, sizes: read(grid).sizes })}
      listHref="/catalogue/valves"
    />
  );
}

/** The sizes that are whole already. */
function Preview({ name, grid }: { name: string; grid: Grid }) {
  const sizes = read(grid).sizes.filter(({ points }) => faultsOfValvePoints(points).length === 0);
  if (sizes.length === 0)
    return <p className="text-quiet text-sm">The chart appears with the first size that has two settings, both Kv rising.</p>;
  return (
    <div className="flex flex-col gap-4">
      <KvChart name={name} sizes={sizes} />
      <SizeTable sizes={sizes} className="-mx-4" />
    </div>
  );
}
