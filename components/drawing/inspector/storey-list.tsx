'use client';

import { X } from 'lucide-react';
import { z } from 'zod';
import { storeySchema, type Storey } from '@/lib/network/drawing';
import { addStorey, isStoreyEmpty, removeStorey, resizeStorey, withStoreysByPlace } from '@/lib/network/storeys';
import { useDrawing, useEditor } from '../editor-context';
import { CommitForm } from './commit-form';
import { NumberRow, QuantityRow, Section, TextRow } from './rows';
import { useEdit } from './use-edit';

const schema = z.object({
  name: z.string().trim().min(1, 'A storey needs a name.').max(60, 'At most 60 characters.'),
  elevationM: storeySchema.shape.elevationM,
  height: z.number('Give a height.').min(80, 'At least 80.').max(5000, 'At most 5000.'),
});

/** The storeys from the top down: names, elevations, and the height of their bands on the sheet. */
export function StoreyList() {
  const { canEdit } = useEditor();
  const { change } = useEdit();
  const storeys = useDrawing((drawing) => drawing.storeys);
  const falling = [...storeys].sort((a, b) => a.top - b.top);
  const add = (where: 'above' | 'below') => change((drawing) => addStorey(drawing, where));
  const addClass = 'min-h-8 text-sm font-semibold text-petrol hover:underline';
  return (
    <Section title="Storeys">
      {canEdit && (
        <button type="button" className={addClass} onClick={() => add('above')}>
          Add a storey above
        </button>
      )}
      {falling.map((storey) => (
        <StoreyForm key={storey.id} storey={storey} />
      ))}
      {canEdit && (
        <button type="button" className={addClass} onClick={() => add('below')}>
          Add a storey below
        </button>
      )}
    </Section>
  );
}

function StoreyForm({ storey }: { storey: Storey }) {
  const { canEdit } = useEditor();
  const { change } = useEdit();
  const isEmpty = useDrawing((drawing) => isStoreyEmpty(drawing, storey.id));
  const { name, elevationM, height } = storey;
  const commit = (changed: { name?: string; elevationM?: number; height?: number }) =>
    change((drawing) => {
      const { height: newHeight, ...rest } = changed;
      const named = { ...drawing, storeys: drawing.storeys.map((it) => (it.id === storey.id ? { ...it, ...rest } : it)) };
      return newHeight === undefined ? named : resizeStorey(named, storey.id, newHeight);
    });
  return (
    <details className="border-b text-sm">
      <summary className="min-h-9 py-1.5">
        <span className="font-semibold">{name}</span> <span className="text-quiet">at {elevationM} m</span>
      </summary>
      <div className="pb-2 pl-3">
        <CommitForm schema={schema} values={{ name, elevationM, height }} label={`Storey ${name}`} disabled={!canEdit} onCommit={commit}>
          <TextRow name="name" label="Name" />
          <QuantityRow name="elevationM" label="Elevation" quantity="length" />
          <NumberRow name="height" label="Band height on the sheet" />
        </CommitForm>
        {canEdit && (
          <button
            type="button"
            disabled={!isEmpty}
            onClick={() => change((drawing) => withStoreysByPlace(removeStorey(drawing, storey.id)))}
            className="text-high disabled:text-quiet mt-1 inline-flex min-h-8 items-center gap-1 font-semibold"
          >
            <X size={14} aria-hidden /> {isEmpty ? 'Remove' : 'Not empty: move its pieces before you remove it'}
          </button>
        )}
      </div>
    </details>
  );
}
