import { headers } from 'next/headers';
import { notFound as notFoundPage, redirect } from 'next/navigation';
import type { Permission } from '@/lib/api/permissions';
import { Problem } from '../problem';
import { authorize, type Access, type Scope } from './authorize';
import { currentPerson, type Person } from './person';

/** For pages: the signed-in person, or the sign-in page, which leads back to the page that was asked for. */
export async function requirePerson(): Promise<Person> {
  const person = await currentPerson();
  if (person) return person;
  const path = (await headers()).get('x-requested-path');
  redirect(path && path !== '/projects' ? `/sign-in?next=${encodeURIComponent(path)}` : '/sign-in');
}

/** For pages: the same decision as for route handlers; what the person may not see does not exist, what they may not do is `null`. */
export async function requireAccess(permission: Permission, scope: Scope): Promise<Access | null> {
  const person = await requirePerson();
  try {
    return await authorize(person, permission, scope);
  } catch (error) {
    if (error instanceof Problem && error.code === 'not-found') notFoundPage();
    if (error instanceof Problem && error.code === 'not-allowed') return null;
    throw error;
  }
}
