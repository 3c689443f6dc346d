'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { createLoopSchema, type CreateLoop } from '@/lib/api/loops';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { SelectField, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

export function NewLoopDialog({ projectId }: { projectId: string }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        <Plus size={16} aria-hidden /> New loop
      </Button>
      <Dialog isOpen={isOpen} onClose={() => setOpen(false)} title="New loop">
        <NewLoopForm projectId={projectId} onCancel={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function NewLoopForm({ projectId, onCancel }: { projectId: string; onCancel: () => void }) {
  const router = useRouter();
  const form = useForm<CreateLoop>({ resolver: zodResolver(createLoopSchema), defaultValues: { name: '', service: 'chilled' } });
  const create = useMutation({
    mutationFn: (values: CreateLoop) => send<{ id: string }>('POST', `/api/projects/${projectId}/loops`, values),
    onSuccess: ({ id }) => router.push(`/projects/${projectId}/loops/${id}/drawing`),
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => create.mutate(values))} noValidate className="flex flex-col gap-4">
      <TextField label="Name" placeholder="CHW-1 east wing" autoComplete="off" error={errors.name?.message} {...form.register('name')} />
      <SelectField label="Service" hint="sets the water temperatures to start from" {...form.register('service')}>
        <option value="chilled">Chilled water, 6 / 12 °C</option>
        <option value="hot">Hot water, 80 / 60 °C</option>
      </SelectField>
      <FormTrouble message={errors.root?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onCancel}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={create.isPending || create.isSuccess} pendingText="Making it…">
          Make the loop and draw it
        </Button>
      </div>
    </form>
  );
}
