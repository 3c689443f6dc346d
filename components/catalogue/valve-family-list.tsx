'use client';

import type { ValveFamily } from '@/lib/api/catalogue';
import { removeValveFamily } from '@/lib/client/catalogue';
import { Figure } from '../ui/figure';
import { EntryRow } from './entry-row';
import { KvChart } from './kv-chart';
import { SizeTable } from './size-table';

export const ValveFamilyList = ({ families, mayManage }: { families: ValveFamily[]; mayManage: boolean }) => (
  <ul className="bg-sheet divide-y rounded border">
    {families.map((family) => (
      <EntryRow
        key={`${family.id} ${family.version}`}
        entry={family}
        summary={<Summary family={family} />}
        changeHref={mayManage ? `/catalogue/valves/${family.id}` : null}
        onRemove={() => removeValveFamily(family)}
      >
        <div className="grid items-start gap-6 lg:grid-cols-2">
          <KvChart name={family.name} sizes={family.sizes} />
          <SizeTable sizes={family.sizes} />
        </div>
      </EntryRow>
    ))}
  </ul>
);

function Summary({ family: { sizes } }: { family: ValveFamily }) {
  const open = sizes.map(({ points }) => points.at(-1)!.kv);
  return (
    <>
      {sizes.length === 1 ? sizes[0]!.nominal : `${sizes.length} sizes, ${sizes[0]!.nominal} to ${sizes.at(-1)!.nominal}`} · fully open{' '}
      <Figure quantity="valveCoefficient" si={Math.min(...open)} hasUnit={open.length === 1} />
      {open.length > 1 && (
        <>
          {' to '}
          <Figure quantity="valveCoefficient" si={Math.max(...open)} hasUnit />
        </>
      )}
    </>
  );
}
