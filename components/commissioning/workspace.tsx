'use client';

import { useQuery } from '@tanstack/react-query';
import { usePathname } from 'next/navigation';
import { useMemo } from 'react';
import type { CommissioningBody } from '@/lib/api/commissioning';
import type { LoopState } from '@/lib/api/loops';
import { standingReadings } from '@/lib/commissioning/standing-readings';
import { commissioningQuery } from '@/lib/client/commissioning';
import { Overview } from './overview';
import { StationScreen } from './station-screen';
import { useKeptReadings } from './use-kept-readings';
import type { Commissioning } from './commissioning-context';

interface WorkspaceProps {
  loop: { id: string; name: string; projectId: string; state: LoopState };
  personId: string;
  mayRecord: boolean;
  initial: CommissioningBody;
}

/**
 * The list of stations and each station's screen, in one: the address tells which. Going from one to the other asks the server for
 * nothing, so that a technician can walk on where there is no signal.
 */
export function CommissioningWorkspace({ loop, personId, mayRecord, initial }: WorkspaceProps) {
  const { data: body } = useQuery({ ...commissioningQuery(loop.id), initialData: initial });
  const { kept, state } = useKeptReadings(personId, loop.id);
  const base = `/projects/${loop.projectId}/loops/${loop.id}/commissioning`;
  const pathname = usePathname();
  const commissioning = useMemo((): Commissioning => {
    const round = body.rounds.find(({ closedAt }) => closedAt === null) ?? null;
    const shown = round ?? body.rounds.at(-1) ?? null;
    const last = shown && body.rounds.findLast(({ number }) => number < shown.number);
    return {
      loop,
      base,
      personId,
      body,
      kept,
      keptState: state,
      round,
      shownRound: shown,
      isEntryOpen: mayRecord && round !== null,
      mayRecord,
      standing: shown ? standingReadings(body.readings, shown.id) : new Map(),
      lastStanding: last ? standingReadings(body.readings, last.id) : new Map(),
    };
  }, [base, body, kept, loop, mayRecord, personId, state]);

  const stationId = pathname.startsWith(`${base}/stations/`) ? pathname.slice(`${base}/stations/`.length) : null;
  const station = body.stations.find(({ id }) => id === stationId);
  return station ? (
    <StationScreen key={station.id} commissioning={commissioning} station={station} />
  ) : (
    <Overview commissioning={commissioning} />
  );
}
