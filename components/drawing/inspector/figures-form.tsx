'use client';

import { z } from 'zod';
import { decouplerSchema, flowLimiterSchema, flowStationSchema, type EquipmentOf } from '@/lib/network/drawing';
import type { Quantity } from '@/lib/units/quantities';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { NumberRow, QuantityRow, Section } from './rows';
import { useEdit } from './use-edit';

type FiguresKind = 'flowLimiter' | 'decoupler' | 'flowStation';
type FiguresPiece = EquipmentOf<FiguresKind>;

interface Field {
  name: string;
  label: string;
  /** Without one it is a plain number. */
  quantity?: Quantity;
  schema: z.ZodType<number | null>;
}

const limiter = flowLimiterSchema.shape;
const decoupler = decouplerSchema.shape;
const station = flowStationSchema.shape;

const fieldsOf: Record<FiguresKind, Field[]> = {
  flowLimiter: [
    { name: 'limitLs', label: 'Flow it holds', quantity: 'flow', schema: limiter.limitLs },
    { name: 'minDropKpa', label: 'From a drop of', quantity: 'pressure', schema: limiter.minDropKpa },
  ],
  decoupler: [
    { name: 'lengthM', label: 'Length', quantity: 'length', schema: decoupler.lengthM },
    { name: 'boreMm', label: 'Bore', quantity: 'bore', schema: decoupler.boreMm },
    { name: 'roughnessMm', label: 'Roughness', quantity: 'bore', schema: decoupler.roughnessMm },
    { name: 'minorK', label: 'Local losses ΣK', schema: decoupler.minorK.nullable() },
  ],
  flowStation: [
    { name: 'signalKv', label: 'Signal', quantity: 'valveCoefficient', schema: station.signalKv },
    { name: 'lossKv', label: 'Loss, as the signal if empty', quantity: 'valveCoefficient', schema: station.lossKv },
  ],
};

/** Pieces that are told by a few figures: pressure-independent valves, decouplers, flow stations. All given are of one kind. */
export function FiguresForm({ pieces }: { pieces: FiguresPiece[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const fields = fieldsOf[pieces[0].kind];
  const { values, mixed } = commonValues(
    pieces.map((piece) => Object.fromEntries(fields.map(({ name }) => [name, (piece as unknown as Record<string, number | null>)[name]]))),
  );
  return (
    <Section title="Figures">
      <CommitForm<Record<string, number | null>>
        schema={
          z.object(Object.fromEntries(fields.map(({ name, schema }) => [name, schema]))) as z.ZodType<
            Record<string, number | null>,
            Record<string, number | null>
          >
        }
        values={values as Record<string, number | null>}
        label="Figures"
        disabled={!canEdit}
        onCommit={(changed) =>
          editPieces(pieces, (piece) => ({ ...piece, ...changed, ...(changed.minorK === null && { minorK: 0 }) }) as FiguresPiece)
        }
      >
        {fields.map(({ name, label, quantity }) =>
          quantity ? (
            <QuantityRow key={name} name={name} label={label} quantity={quantity} isMixed={mixed.has(name)} />
          ) : (
            <NumberRow key={name} name={name} label={label} isMixed={mixed.has(name)} />
          ),
        )}
      </CommitForm>
    </Section>
  );
}
