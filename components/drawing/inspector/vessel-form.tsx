'use client';

import { z } from 'zod';
import { expansionVesselSchema, type EquipmentOf } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { QuantityRow, Section } from './rows';
import { useEdit } from './use-edit';

const schema = z.object({ gaugePressureKpa: expansionVesselSchema.shape.gaugePressureKpa });

/** Where the pressure of the loop is fixed. */
export function VesselForm({ vessel }: { vessel: EquipmentOf<'expansionVessel'> }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  return (
    <Section title="Pressure held">
      <CommitForm
        schema={schema}
        values={{ gaugePressureKpa: vessel.gaugePressureKpa }}
        label="Expansion vessel"
        disabled={!canEdit}
        onCommit={(changed) => editPieces([vessel], (piece) => ({ ...piece, ...changed }))}
      >
        <QuantityRow name="gaugePressureKpa" label="Gauge pressure" quantity="pressure" />
      </CommitForm>
    </Section>
  );
}
