'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { TextField } from '@/components/ui/field';
import { useDrawing, useEditor } from '../editor-context';

const schema = z.object({ name: z.string().trim().min(1, 'A storey needs a name.').max(60, 'At most 60 characters.') });

export function RenameStoreyDialog({ storeyId, onClose }: { storeyId: string; onClose: () => void }) {
  const { drawingStore } = useEditor();
  const name = useDrawing((drawing) => drawing.storeys.find(({ id }) => id === storeyId)?.name ?? '');
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { name } });
  const rename = form.handleSubmit((values) => {
    drawingStore.getState().change((drawing) => ({
      ...drawing,
      storeys: drawing.storeys.map((storey) => (storey.id === storeyId ? { ...storey, name: values.name } : storey)),
    }));
    onClose();
  });
  return (
    <Dialog isOpen onClose={onClose} title={`Rename ${name}`} description="Elevation and height of the band stand under Properties.">
      <form onSubmit={rename} className="grid gap-4">
        <TextField label="Name" autoFocus error={form.formState.errors.name?.message} {...form.register('name')} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit">
            Rename
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
