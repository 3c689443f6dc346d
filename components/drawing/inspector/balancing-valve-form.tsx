'use client';

import type { EquipmentOf } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { commonValues } from './common-values';
import { Section } from './rows';
import { useEdit } from './use-edit';
import { ValveChoice } from './valve-choice';

export function BalancingValveForm({ valves }: { valves: EquipmentOf<'balancingValve'>[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const { mixed } = commonValues(valves.map(({ valve }) => ({ name: valve.name, kvTable: valve.kvTable })));
  return (
    <Section title="Balancing valve">
      <ValveChoice
        valve={valves[0].valve}
        isMixed={mixed.size > 0}
        disabled={!canEdit}
        onCommit={(change) => editPieces(valves, (piece) => ({ ...piece, valve: { ...piece.valve, ...change } }))}
      />
    </Section>
  );
}
