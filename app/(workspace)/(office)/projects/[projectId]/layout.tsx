import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { requireAccess } from '@/lib/server/auth/require-person';

/** Asks before anything of the page is sent, so that what is not there, or not theirs, is answered with 404. */
export default async function ProjectLayout({ children, params }: { children: ReactNode; params: Promise<{ projectId: string }> }) {
  const { projectId } = await params;
  if (!(await requireAccess('project.see', { kind: 'project', id: projectId }))) notFound();
  return children;
}
