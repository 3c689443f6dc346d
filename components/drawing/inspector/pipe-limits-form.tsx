'use client';

import { z } from 'zod';
import type { PipeLimit } from '@/lib/network/drawing';
import { usualPipeLimits } from '@/lib/network/pipe-limits';
import { useDrawing, useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { QuantityRow, Section } from './rows';
import { useEdit } from './use-edit';

const above0 = z.number('Give a figure.').positive('Above 0.');
const schema = z.object({ upToBoreMm: above0, smallPaPerM: above0, smallMs: above0, largePaPerM: above0, largeMs: above0 });
type Limits = z.infer<typeof schema>;

/** What the pipes of this loop may have at most: one pair of limits up to a bore, another beyond it. */
export function PipeLimitsForm() {
  const { canEdit } = useEditor();
  const own = useDrawing((drawing) => drawing.pipeLimits);
  const { change } = useEdit();
  const values = valuesOf(own ?? usualPipeLimits);
  return (
    <CommitForm
      schema={schema}
      values={values}
      label="Limits of pipes"
      disabled={!canEdit}
      onCommit={(changed) => change((drawing) => ({ ...drawing, pipeLimits: limitsOf({ ...values, ...changed }) }))}
    >
      <Section
        title={own ? 'Limits of pipes' : 'Limits of pipes, the usual ones'}
        action={
          canEdit &&
          own && (
            <button
              type="button"
              className="text-petrol min-h-6 text-xs font-semibold hover:underline"
              onClick={() => change(({ pipeLimits: _, ...drawing }) => drawing)}
            >
              Back to the usual
            </button>
          )
        }
      >
        <QuantityRow name="upToBoreMm" label="Small pipes: up to a bore of" quantity="bore" />
        <QuantityRow name="smallPaPerM" label="Small, friction" quantity="gradient" />
        <QuantityRow name="smallMs" label="Small, velocity" quantity="velocity" />
        <QuantityRow name="largePaPerM" label="Larger, friction" quantity="gradient" />
        <QuantityRow name="largeMs" label="Larger, velocity" quantity="velocity" />
      </Section>
    </CommitForm>
  );
}

function valuesOf(limits: readonly PipeLimit[]): Limits {
  const [small, large] = [limits[0], limits[limits.length - 1]];
  return {
    upToBoreMm: small.upToBoreMm ?? usualPipeLimits[0].upToBoreMm!,
    ...{ smallPaPerM: small.maxPaPerM, smallMs: small.maxVelocityMs },
    ...{ largePaPerM: large.maxPaPerM, largeMs: large.maxVelocityMs },
  };
}

const limitsOf = ({ upToBoreMm, smallPaPerM, smallMs, largePaPerM, largeMs }: Limits): PipeLimit[] => [
  { upToBoreMm, maxPaPerM: smallPaPerM, maxVelocityMs: smallMs },
  { upToBoreMm: null, maxPaPerM: largePaPerM, maxVelocityMs: largeMs },
];
