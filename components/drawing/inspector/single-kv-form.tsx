'use client';

import { z } from 'zod';
import { isolatingValveSchema, type EquipmentOf } from '@/lib/network/drawing';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { CheckRow, QuantityRow, Section } from './rows';
import { useEdit } from './use-edit';

const schema = z.object({ kv: isolatingValveSchema.shape.kv, isClosed: z.boolean().nullable() });

type SingleKv = EquipmentOf<'checkValve' | 'isolatingValve' | 'strainer'>;

/** Pieces that are one Kv: check valves, strainers, and isolating valves, which may stand closed. */
export function SingleKvForm({ pieces }: { pieces: SingleKv[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const { values, mixed } = commonValues(
    pieces.map((piece) => ({ kv: piece.kv, isClosed: piece.kind === 'isolatingValve' ? piece.isClosed : false })),
  );
  return (
    <Section title="Figures">
      <CommitForm
        schema={schema}
        values={values}
        label="Figures"
        disabled={!canEdit}
        onCommit={({ isClosed, ...changed }) =>
          editPieces(
            pieces,
            (piece) =>
              ({
                ...piece,
                ...changed,
                ...(piece.kind === 'isolatingValve' && typeof isClosed === 'boolean' ? { isClosed } : {}),
              }) as SingleKv,
          )
        }
      >
        <QuantityRow name="kv" label="Flow coefficient" quantity="valveCoefficient" isMixed={mixed.has('kv')} />
        {pieces.every(({ kind }) => kind === 'isolatingValve') && <CheckRow name="isClosed" label="Stands closed" />}
      </CommitForm>
    </Section>
  );
}
