'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import Link from 'next/link';
import { useForm } from 'react-hook-form';
import { askForResetSchema } from '@/lib/api/people';
import { send } from '@/lib/client/http';
import { showRefusal } from '@/lib/client/show-refusal';
import { Button } from '../ui/button';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';
import { Notice } from '../ui/notice';

/** Asks for a link to set a new password; what it answers is the same for every address. */
export function ResetForm() {
  const form = useForm({ resolver: zodResolver(askForResetSchema), defaultValues: { email: '' } });
  const ask = useMutation({
    mutationFn: (values: { email: string }) => send('POST', '/api/account/reset', values),
    onError: (error) => showRefusal(error, form),
  });
  const { errors } = form.formState;

  if (ask.isSuccess) {
    return (
      <>
        <Notice tone="brass" title="Look into your mail">
          If {ask.variables.email} signs in here, a link is on its way to it. It works once, for an hour.
        </Notice>
        <Link href="/sign-in">Back to sign in</Link>
      </>
    );
  }
  return (
    <form onSubmit={form.handleSubmit((values) => ask.mutate(values))} noValidate className="flex flex-col gap-4">
      <TextField label="E-mail" type="email" autoComplete="username" autoFocus error={errors.email?.message} {...form.register('email')} />
      <FormTrouble message={errors.root?.message} />
      <Button type="submit" look="primary" isPending={ask.isPending} pendingText="Sending…">
        Send the link
      </Button>
      <Link href="/sign-in" className="self-start text-sm">
        Back to sign in
      </Link>
    </form>
  );
}
