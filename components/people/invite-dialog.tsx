'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { UserPlus } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import { invitePersonSchema, type InvitePerson } from '@/lib/api/people';
import { projectRoles } from '@/lib/api/permissions';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { CheckField, SelectField, TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { roleWords } from './role-words';

export function InviteDialog() {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button look="primary" onClick={() => setOpen(true)}>
        <UserPlus size={16} aria-hidden /> Invite a person
      </Button>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title="Invite a person"
        description="They get a letter with a link to set their password."
      >
        <InviteForm onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

function InviteForm({ onDone }: { onDone: () => void }) {
  const router = useRouter();
  const form = useForm<InvitePerson>({
    resolver: zodResolver(invitePersonSchema),
    defaultValues: { name: '', email: '', isAdministrator: false, defaultRole: 'technician' },
  });
  const invite = useMutation({
    mutationFn: (values: InvitePerson) => send('POST', '/api/people', values),
    onSuccess: (_, { email }) => {
      toast(`Invitation sent to ${email}`);
      onDone();
      router.refresh();
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => invite.mutate(values))} noValidate className="flex flex-col gap-4">
      <TextField label="Name" autoComplete="off" error={errors.name?.message} {...form.register('name')} />
      <TextField label="E-mail" type="email" autoComplete="off" error={errors.email?.message} {...form.register('email')} />
      <SelectField
        label="Usual role"
        hint="on projects they are put on"
        error={errors.defaultRole?.message}
        {...form.register('defaultRole')}
      >
        {projectRoles.map((role) => (
          <option key={role} value={role}>
            {roleWords[role]}
          </option>
        ))}
      </SelectField>
      <CheckField label="Administrator" hint="manages people and projects, sees all of them" {...form.register('isAdministrator')} />
      <FormTrouble message={errors.root?.message} />
      <div className="flex justify-end gap-2">
        <Button look="quiet" onClick={onDone}>
          Cancel
        </Button>
        <Button type="submit" look="primary" isPending={invite.isPending} pendingText="Sending…">
          Send the invitation
        </Button>
      </div>
    </form>
  );
}
