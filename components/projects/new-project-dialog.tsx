'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { Plus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import type { PersonRow } from '@/lib/api/people';
import { createProjectSchema, type CreateProject } from '@/lib/api/projects';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { MemberFields } from './member-fields';

/** `people`: whom one can put on it besides oneself. */
export function NewProjectDialog({ people }: { people: PersonRow[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        <Plus size={16} aria-hidden /> New project
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title="New project"
        description="You become its designer. The tolerance bands can be changed on its page."
      >
        <NewProjectForm people={people} onCancel={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function NewProjectForm({ people, onCancel }: { people: PersonRow[]; onCancel: () => void }) {
  const router = useRouter();
  const form = useForm<CreateProject>({
    resolver: zodResolver(createProjectSchema),
    defaultValues: { name: '', client: '', building: '', members: [] },
  });
  const create = useMutation({
    mutationFn: (values: CreateProject) => send<{ id: string }>('POST', '/api/projects', values),
    onSuccess: ({ id }) => router.push(`/projects/${id}`),
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => create.mutate(values))} noValidate className="flex flex-col gap-4">
      <TextField label="Name" autoComplete="off" error={errors.name?.message} {...form.register('name')} />
      <TextField label="Client" autoComplete="off" error={errors.client?.message} {...form.register('client')} />
      <TextField label="Building" autoComplete="off" error={errors.building?.message} {...form.register('building')} />
      <Controller
        control={form.control}
        name="members"
        render={({ field }) => <MemberFields members={field.value} onChange={field.onChange} people={people} />}
      />
      <FormTrouble message={errors.root?.message ?? errors.members?.find?.((it) => it?.personId)?.personId?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onCancel}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={create.isPending || create.isSuccess} pendingText="Making it…">
          Make the project
        </Button>
      </div>
    </form>
  );
}
