'use client';

import { z } from 'zod';
import { drawingFluidSchema } from '@/lib/network/drawing';
import { useDrawing, useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { NewPipes } from './new-pipes';
import { PipeLimitsForm } from './pipe-limits-form';
import { CheckRow, NumberRow, QuantityRow, Section, SelectRow } from './rows';
import { StoreyList } from './storey-list';
import { useEdit } from './use-edit';

const temperature = (what: string) => z.number(`Give the ${what} temperature.`).min(-40, 'At least −40 °C.').max(200, 'At most 200 °C.');
const fluidSchema = z.object({
  medium: drawingFluidSchema.shape.medium,
  massFraction: z.number('Give the mass fraction.').min(0, 'From 0 to 60 %.').max(0.6, 'From 0 to 60 %.'),
  supplyC: temperature('supply'),
  returnC: temperature('return'),
});
const balanceSchema = z.object({ pumpExcess: z.enum(['speed', 'throttle']) });
const placingSchema = z.object({ isLikeLast: z.boolean() });

/** What belongs to the loop as a whole: shown while nothing is selected. */
export function LoopForm() {
  const { canEdit, canvasStore } = useEditor();
  const fluid = useDrawing((drawing) => drawing.fluid);
  const pumpExcess = useDrawing((drawing) => drawing.pumpExcess);
  const { change } = useEdit();
  return (
    <>
      <h2>Loop</h2>
      <p className="text-quiet text-sm">Select a piece or a pipe to see and edit its figures.</p>
      <CommitForm
        schema={fluidSchema}
        values={fluid}
        label="Fluid"
        disabled={!canEdit}
        onCommit={(changed) => change((drawing) => ({ ...drawing, fluid: { ...drawing.fluid, ...changed } }))}
      >
        <Section title="Fluid">
          <SelectRow
            name="medium"
            label="Medium"
            options={[
              ['water', 'Water'],
              ['propylene-glycol', 'Propylene glycol'],
              ['ethylene-glycol', 'Ethylene glycol'],
            ]}
          />
          {fluid.medium !== 'water' && <NumberRow name="massFraction" label="Glycol, by mass" isPercent />}
          <QuantityRow name="supplyC" label="Supply" quantity="temperature" />
          <QuantityRow name="returnC" label="Return" quantity="temperature" />
        </Section>
      </CommitForm>
      <CommitForm
        schema={balanceSchema}
        values={{ pumpExcess }}
        label="Balance"
        disabled={!canEdit}
        onCommit={(changed) => change((drawing) => ({ ...drawing, ...changed }))}
      >
        <Section title="Balance">
          <SelectRow
            name="pumpExcess"
            label="Excess head"
            options={[
              ['speed', 'Slow the pump'],
              ['throttle', 'Throttle upstream'],
            ]}
          />
        </Section>
      </CommitForm>
      <PipeLimitsForm />
      <StoreyList />
      {canEdit && (
        <>
          <NewPipes />
          <LikeLast onChange={(isLikeLast) => canvasStore.setState({ isLikeLast })} />
        </>
      )}
    </>
  );
}

function LikeLast({ onChange }: { onChange: (isLikeLast: boolean) => void }) {
  const { canvasStore } = useEditor();
  return (
    <CommitForm
      schema={placingSchema}
      values={{ isLikeLast: canvasStore.getState().isLikeLast }}
      label="New pieces"
      disabled={false}
      onCommit={({ isLikeLast }) => onChange(isLikeLast ?? true)}
    >
      <Section title="New pieces">
        <CheckRow name="isLikeLast" label="Take the figures of the last of their kind" />
      </Section>
    </CommitForm>
  );
}
