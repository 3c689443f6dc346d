import { redirect } from 'next/navigation';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';

/** A loop opens where the person works: designers on the drawing, technicians at the stations, owners at the report. */
export default async function LoopPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  const roles = access?.roles ?? [];
  const page = may(roles, 'drawing.edit') ? 'drawing' : may(roles, 'readings.record') ? 'commissioning' : 'report';
  redirect(`/projects/${projectId}/loops/${loopId}/${page}`);
}
