import { notFound } from 'next/navigation';
import { CommissioningWorkspace } from '@/components/commissioning/workspace';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readCommissioning } from '@/lib/server/commissioning/read-commissioning';
import { readLoop } from '@/lib/server/loops/read-loop';
import { readSite } from '@/lib/server/site/read-site';

interface CommissioningLoaderProps {
  projectId: string;
  loopId: string;
  /** The station that the address names. */
  stationId?: string;
}

/** What the list of stations and each station's screen have in common: who asks, and all there is of the loop. */
export async function CommissioningLoader({ projectId, loopId, stationId }: CommissioningLoaderProps) {
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const [loop, initial, initialSite] = await Promise.all([
    readLoop(access, loopId),
    readCommissioning(access, loopId),
    readSite(access.person.organizationId, loopId),
  ]);
  if (stationId !== undefined && !initial.stations.some(({ id }) => id === stationId)) notFound();
  return (
    <CommissioningWorkspace
      loop={{ id: loop.id, name: loop.name, projectId, state: loop.state }}
      personId={access.person.id}
      mayRecord={may(access.roles, 'readings.record')}
      mayRaise={may(access.roles, 'snag.raise')}
      initial={initial}
      initialSite={initialSite}
    />
  );
}
