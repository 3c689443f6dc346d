'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import Link from 'next/link';
import { signIn } from 'next-auth/react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { emailSchema } from '@/lib/api/people';
import { Button } from '../ui/button';
import { TextField } from '../ui/field';
import { FormTrouble } from '../ui/form-trouble';

const signInSchema = z.object({ email: emailSchema, password: z.string().min(1, 'Type your password.').max(1000) });

/** Signs in and goes where the person was going; the address stays when the password was wrong. */
export function SignInForm({ next }: { next: string }) {
  // No default values: what was typed before the page came alive is then taken over and not wiped.
  const form = useForm({ resolver: zodResolver(signInSchema) });
  const { errors, isSubmitting, isSubmitSuccessful } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    const answer = await signIn('credentials', { ...values, redirect: false }).catch(() => null);
    if (answer?.ok && !answer.error) {
      // A full load, so that nothing of whoever was signed in here before is left in memory.
      window.location.assign(next);
      return;
    }
    form.setValue('password', '');
    form.setError('root', { message: refusalOf(answer?.error) });
    form.setFocus('password');
  });

  return (
    // `post`, so that a press before the page came alive never puts the password into the address.
    <form onSubmit={submit} method="post" noValidate className="flex flex-col gap-4">
      <TextField label="E-mail" type="email" autoComplete="username" autoFocus error={errors.email?.message} {...form.register('email')} />
      <TextField
        label="Password"
        type="password"
        autoComplete="current-password"
        error={errors.password?.message}
        {...form.register('password')}
      />
      <FormTrouble message={errors.root?.message} />
      <Button
        type="submit"
        look="primary"
        className="mt-1"
        isPending={isSubmitting || (isSubmitSuccessful && !errors.root)}
        pendingText="Signing in…"
      >
        Sign in
      </Button>
      <Link href="/reset" className="self-start text-sm">
        Forgotten your password?
      </Link>
    </form>
  );
}

function refusalOf(error: string | null | undefined): string {
  if (!error) return 'The server could not be reached. Check the connection and try again.';
  return error === 'CredentialsSignin' ? 'That e-mail and password do not fit together. Check both and try again.' : error;
}
