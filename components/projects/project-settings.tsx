'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import { toast } from 'sonner';
import type { PersonRow } from '@/lib/api/people';
import { createProjectSchema, type CreateProject, type ProjectDetail } from '@/lib/api/projects';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { MemberFields } from './member-fields';

type Person = Pick<PersonRow, 'id' | 'name' | 'defaultRole'>;

/** For administrators: what the project is called and who is on it. */
export function ProjectSettings({ project, people }: { project: ProjectDetail; people: Person[] }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button size="small" onClick={() => setOpen(true)}>
        Change
      </Button>
      <Dialog isOpen={isOpen} onClose={() => setOpen(false)} title="Project and members">
        <SettingsForm project={project} people={people} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function SettingsForm({ project, people, onDone }: { project: ProjectDetail; people: Person[]; onDone: () => void }) {
  const router = useRouter();
  const { name, client, building } = project;
  const members = project.members.map(({ personId, role }) => ({ personId, role }));
  const form = useForm<CreateProject>({ resolver: zodResolver(createProjectSchema), defaultValues: { name, client, building, members } });
  const save = useMutation({
    mutationFn: (values: CreateProject) => send('PATCH', `/api/projects/${project.id}`, values),
    onSuccess: () => {
      toast('Project changed');
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => save.mutate(values))} noValidate className="flex flex-col gap-4">
      <TextField label="Name" error={errors.name?.message} {...form.register('name')} />
      <TextField label="Client" error={errors.client?.message} {...form.register('client')} />
      <TextField label="Building" error={errors.building?.message} {...form.register('building')} />
      <Controller
        control={form.control}
        name="members"
        render={({ field }) => <MemberFields members={field.value} onChange={field.onChange} people={people} />}
      />
      <FormTrouble message={errors.root?.message ?? errors.members?.find?.((it) => it?.personId)?.personId?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onDone}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={save.isPending} pendingText="Saving…">
          Save
        </Button>
      </div>
    </form>
  );
}
