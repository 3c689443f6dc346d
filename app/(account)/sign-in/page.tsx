import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { SignInForm } from '@/components/account/sign-in-form';
import { sameSitePath } from '@/lib/client/same-site-path';
import { currentPerson } from '@/lib/server/auth/person';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ next?: string | string[] }> }) {
  const { next } = await searchParams;
  const path = sameSitePath(Array.isArray(next) ? next[0] : next);
  if (await currentPerson()) redirect(path);
  return (
    <>
      <h1>Sign in</h1>
      <SignInForm next={path} />
    </>
  );
}
