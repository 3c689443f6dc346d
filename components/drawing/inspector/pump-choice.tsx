'use client';

import { useQuery } from '@tanstack/react-query';
import { useId } from 'react';
import { inputClass } from '@/components/ui/field';
import { classNames } from '@/components/ui/class-names';
import { copiedPump } from '@/lib/catalogue/chosen-entries';
import { catalogueQuery } from '@/lib/client/catalogue';
import type { EquipmentOf } from '@/lib/network/drawing';
import { same } from '@/lib/network/merge-drawings';
import { rowClass } from './rows';

interface PumpChoiceProps {
  pump: EquipmentOf<'pump'>;
  disabled: boolean;
  onChoose: (curves: ReturnType<typeof copiedPump>) => void;
}

/** The curves of a pump of the organisation's catalogue, copied into the drawing, which keeps them when the catalogue changes. */
export function PumpChoice({ pump, disabled, onChoose }: PumpChoiceProps) {
  const id = useId();
  const pumps = useQuery(catalogueQuery).data?.pumps ?? [];
  if (pumps.length === 0) return null;
  const { curve, efficiency, suctionHeadRequired = [] } = pump;
  const chosen = pumps.find(({ points }) => same(copiedPump(points), { curve, efficiency, suctionHeadRequired }));
  return (
    <div className={rowClass}>
      <label htmlFor={id}>From the catalogue</label>
      <select
        id={id}
        disabled={disabled}
        className={classNames(inputClass, 'h-8 px-1.5 pointer-coarse:h-11')}
        value={chosen?.id ?? ''}
        onChange={(event) => {
          const taken = pumps.find((it) => it.id === event.target.value);
          if (taken) onChoose(copiedPump(taken.points));
        }}
      >
        <option value="" disabled>
          {curve.length ? 'own curve' : 'choose…'}
        </option>
        {pumps.map(({ id: pumpId, name }) => (
          <option key={pumpId} value={pumpId}>
            {name}
          </option>
        ))}
      </select>
    </div>
  );
}
