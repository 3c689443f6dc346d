'use client';

import { useMemo } from 'react';
import { z } from 'zod';
import { dpControllerSchema, portsOf, type Drawing, type EquipmentOf, type PipeEnd } from '@/lib/network/drawing';
import { nodeIdOf } from '@/lib/network/drawing-to-document';
import { nameOf } from '@/lib/network/fault';
import { useDrawing, useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { commonValues } from './common-values';
import { QuantityRow, Section, SelectRow } from './rows';
import { useEdit } from './use-edit';

type Controller = EquipmentOf<'dpController'>;

const { setpointKpa, kvs } = dpControllerSchema.shape;
const schema = z.object({ setpointKpa, kvs });
const senseSchema = z.object({ senseHigh: z.string(), senseLow: z.string() });

/** Its own inlet. */
const OWN = '';

/** What a differential pressure controller holds, and between which two points. */
export function ControllerForm({ controllers }: { controllers: Controller[] }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const common = commonValues(controllers.map((piece) => ({ setpointKpa: piece.setpointKpa, kvs: piece.kvs })));
  return (
    <>
      <Section title="Differential pressure controller">
        <CommitForm
          schema={schema}
          values={common.values}
          label="Differential pressure controller"
          disabled={!canEdit}
          onCommit={(changed) => editPieces(controllers, (piece) => ({ ...piece, ...changed }))}
        >
          <QuantityRow name="setpointKpa" label="Holds" quantity="pressure" isMixed={common.mixed.has('setpointKpa')} />
          <QuantityRow name="kvs" label="Fully open, Kvs" quantity="valveCoefficient" isMixed={common.mixed.has('kvs')} />
        </CommitForm>
      </Section>
      {controllers.length === 1 && <ImpulseLines controller={controllers[0]} />}
    </>
  );
}

function ImpulseLines({ controller }: { controller: Controller }) {
  const { canEdit } = useEditor();
  const { editPieces } = useEdit();
  const drawing = useDrawing((it) => it);
  const options = useMemo(() => sensePoints(drawing, controller), [drawing, controller]);
  const endOf = (key: string): PipeEnd | null => options.find((option) => option.key === key)?.end ?? null;
  const choices = options.map(({ key, label }): [string, string] => [key, label]);
  const keyOf = (end: PipeEnd | null) => (end === null ? OWN : nodeIdOf(end));
  return (
    <Section title="Impulse lines">
      <CommitForm
        schema={senseSchema}
        values={{ senseHigh: keyOf(controller.senseHigh), senseLow: keyOf(controller.senseLow) }}
        label="Impulse lines"
        disabled={!canEdit}
        onCommit={(changed) =>
          editPieces([controller], (piece) => ({
            ...piece,
            ...(changed.senseHigh !== undefined && { senseHigh: endOf(changed.senseHigh) }),
            ...(changed.senseLow !== undefined && { senseLow: endOf(changed.senseLow) }),
          }))
        }
      >
        <SelectRow name="senseHigh" label="Higher pressure at" options={choices} />
        <SelectRow name="senseLow" label="Lower pressure at" options={choices} />
      </CommitForm>
    </Section>
  );
}

/** Every point of the network that an impulse line may end at, in words; those of the controller's own storey first. */
function sensePoints({ equipment }: Drawing, controller: Controller): { key: string; label: string; end: PipeEnd | null }[] {
  const points = equipment
    .filter(({ id }) => id !== controller.id)
    .sort((a, b) => distance(a, controller) - distance(b, controller))
    .flatMap((piece) => {
      const ends = portsOf(piece.kind).map((port): PipeEnd => ({ equipmentId: piece.id, port }));
      const once = new Map(ends.map((end) => [nodeIdOf(end), end]));
      return [...once].map(([key, end]) => ({
        key,
        end,
        label: once.size === 1 ? nameOf(piece) : `${nameOf(piece)}, ${end.port === 'in' ? 'inlet' : 'outlet'}`,
      }));
    });
  return [
    { key: OWN, label: 'Its own inlet', end: null },
    { key: `${controller.id}.out`, label: 'Its own outlet', end: { equipmentId: controller.id, port: 'out' } },
    ...points,
  ];
}

const distance = (a: { x: number; y: number }, b: { x: number; y: number }) => Math.hypot(a.x - b.x, a.y - b.y);
