'use client';

import { z } from 'zod';
import type { EquipmentOf } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { PointTable } from './point-table';
import { PumpChoice } from './pump-choice';
import { CheckRow, NumberRow, Section } from './rows';
import { useEdit } from './use-edit';

type Pump = EquipmentOf<'pump'>;

const schema = z.object({
  speed: z.number('Give a speed.').min(0, 'From 0 to 200 %.').max(2, 'From 0 to 200 %.'),
  hasNonReturn: z.boolean(),
});

/** Speed, non-return and curves of a pump; the curves are those at full speed. */
export function PumpForm({ pump }: { pump: Pump }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  return (
    <>
      <Section title="Running">
        <CommitForm
          schema={schema}
          values={{ speed: pump.speed, hasNonReturn: pump.hasNonReturn }}
          label="Running"
          disabled={!canEdit}
          onCommit={(changed) => editPieces([pump], (piece) => ({ ...piece, ...changed }))}
        >
          <NumberRow name="speed" label="Speed" isPercent />
          <CheckRow name="hasNonReturn" label="Non-return at the pump" />
        </CommitForm>
      </Section>
      <PumpChoice pump={pump} disabled={!canEdit} onChoose={(curves) => editPieces([pump], (piece) => ({ ...piece, ...curves }))} />
      <Section title="Curve at full speed, three points or more">
        <PointTable
          label="Pump curve"
          columns={[
            { key: 'flowLs', label: 'Flow', quantity: 'flow' },
            { key: 'headM', label: 'Head', quantity: 'head' },
          ]}
          points={pump.curve}
          disabled={!canEdit}
          onCommit={(points) => editPieces([pump], (piece) => ({ ...piece, curve: points as Pump['curve'] }))}
        />
      </Section>
      <Section title="Efficiency at full speed, if known">
        <PointTable
          label="Pump efficiency"
          columns={[
            { key: 'flowLs', label: 'Flow', quantity: 'flow' },
            { key: 'fraction', label: 'Fraction 0 to 1', quantity: null },
          ]}
          points={pump.efficiency}
          disabled={!canEdit}
          onCommit={(points) =>
            editPieces([pump], (piece) => ({
              ...piece,
              efficiency: (points as Pump['efficiency']).map((point) => ({ ...point, fraction: Math.min(1, Math.max(0, point.fraction)) })),
            }))
          }
        />
      </Section>
      <Section title="Suction head required at full speed, if known">
        <PointTable
          label="Suction head required"
          columns={[
            { key: 'flowLs', label: 'Flow', quantity: 'flow' },
            { key: 'headM', label: 'Head', quantity: 'head' },
          ]}
          points={pump.suctionHeadRequired ?? []}
          disabled={!canEdit}
          onCommit={(points) => editPieces([pump], (piece) => ({ ...piece, suctionHeadRequired: points as Pump['suctionHeadRequired'] }))}
        />
      </Section>
    </>
  );
}
