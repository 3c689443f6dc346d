'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { signIn } from 'next-auth/react';
import { useForm } from 'react-hook-form';
import { toast } from 'sonner';
import type { z } from 'zod';
import { changePasswordSchema } from '@/lib/api/people';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

type Passwords = z.infer<typeof changePasswordSchema>;

/** Changes one's own password. Every session ends with the old one; this one signs in again at once. */
export function ChangePasswordForm({ email }: { email: string }) {
  const router = useRouter();
  const form = useForm<Passwords>({ resolver: zodResolver(changePasswordSchema), defaultValues: { currentPassword: '', newPassword: '' } });
  const change = useMutation({
    mutationFn: (values: Passwords) => send('POST', '/api/account/password', values),
    onSuccess: async (_, { newPassword }) => {
      const again = await signIn('credentials', { email, password: newPassword, redirect: false });
      if (!again?.ok) return router.push('/sign-in');
      form.reset();
      toast('Password changed. You are signed out everywhere else.');
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => change.mutate(values))} noValidate className="flex flex-col gap-4">
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <TextField
        label="Present password"
        type="password"
        autoComplete="current-password"
        error={errors.currentPassword?.message}
        {...form.register('currentPassword')}
      />
      <TextField
        label="New password"
        hint="12 characters or more"
        type="password"
        autoComplete="new-password"
        error={errors.newPassword?.message}
        {...form.register('newPassword')}
      />
      <FormTrouble message={errors.root?.message} />
      <Button type="submit" className="self-start" isPending={change.isPending} pendingText="Changing…">
        Change the password
      </Button>
      <p className="text-quiet text-sm">Sessions on other devices end.</p>
    </form>
  );
}
