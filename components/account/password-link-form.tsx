'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import { signIn } from 'next-auth/react';
import { useForm } from 'react-hook-form';
import { usePasswordLinkSchema as passwordLinkSchema } from '@/lib/api/people';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

/** Sets the password of the person a link was made for, and signs them in with it. */
export function PasswordLinkForm({ token, email }: { token: string; email: string }) {
  const form = useForm({ resolver: zodResolver(passwordLinkSchema), defaultValues: { token, newPassword: '' } });
  const set = useMutation({
    mutationFn: (values: { token: string; newPassword: string }) => send<{ email: string }>('POST', '/api/account/password-link', values),
    onSuccess: async (answer, { newPassword }) => {
      const signedIn = await signIn('credentials', { email: answer.email, password: newPassword, redirect: false });
      window.location.assign(signedIn?.ok ? '/projects' : '/sign-in');
    },
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;
  return (
    <form onSubmit={form.handleSubmit((values) => set.mutate(values))} noValidate className="flex flex-col gap-4">
      {/* Tells a password manager whose password this is. */}
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <TextField
        label="New password"
        hint="12 characters or more"
        type="password"
        autoComplete="new-password"
        autoFocus
        error={errors.newPassword?.message}
        {...form.register('newPassword')}
      />
      <FormTrouble message={errors.root?.message ?? errors.token?.message} />
      <Button type="submit" look="primary" isPending={set.isPending || set.isSuccess} pendingText="Setting it…">
        Set the password and sign in
      </Button>
    </form>
  );
}
