import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { OpenDraftProvider } from '@/components/drawing/open-draft';
import { LoopHeader } from '@/components/shell/loop-header';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readLoop } from '@/lib/server/loops/read-loop';

export default async function LoopLayout({
  children,
  params,
}: {
  children: ReactNode;
  params: Promise<{ projectId: string; loopId: string }>;
}) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const loop = await readLoop(access, loopId);
  return (
    <div className="flex min-h-dvh flex-col has-data-own-header:[&>header]:hidden">
      <LoopHeader loop={loop} person={{ name: access.person.name, organizationName: access.person.organizationName }} />
      <OpenDraftProvider key={loopId}>{children}</OpenDraftProvider>
    </div>
  );
}
