'use client';

import { characteristics, controlValveSchema, type EquipmentOf } from '@/lib/network/drawing';
import { z } from 'zod';
import { useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { NumberRow, QuantityRow, Section, SelectRow } from './rows';
import { useEdit } from './use-edit';

export const characteristicWords: [string, string][] = [
  ['equalPercentage', 'Equal percentage'],
  ['linear', 'Linear'],
  ['quickOpening', 'Quick opening'],
];

const schema = z.object({
  kvs: controlValveSchema.shape.kvs,
  characteristic: z.enum(characteristics).nullable(),
  opening: z.number().min(0, 'From 0 to 100 %.').max(1, 'From 0 to 100 %.').nullable(),
});

type ControlValve = EquipmentOf<'controlValve'>;

export function ControlValveForm({ valves }: { valves: ControlValve[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const { values, mixed } = commonValues(valves.map(({ kvs, characteristic, opening }) => ({ kvs, characteristic, opening })));
  return (
    <Section title="Control valve">
      <CommitForm
        schema={schema}
        values={values}
        label="Control valve"
        disabled={!canEdit}
        onCommit={(changed) => editPieces(valves, (valve) => ({ ...valve, ...changed }) as ControlValve)}
      >
        <QuantityRow name="kvs" label="Fully open, Kvs" quantity="valveCoefficient" isMixed={mixed.has('kvs')} />
        <SelectRow name="characteristic" label="Characteristic" options={characteristicWords} isMixed={mixed.has('characteristic')} />
        <NumberRow name="opening" label="Opening" isPercent isMixed={mixed.has('opening')} />
      </CommitForm>
    </Section>
  );
}
