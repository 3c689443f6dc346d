'use client';

import { useQuery } from '@tanstack/react-query';
import { usePathname } from 'next/navigation';
import { useMemo, type ComponentType } from 'react';
import type { CommissioningBody } from '@/lib/api/commissioning';
import type { LoopState, RevisionBody } from '@/lib/api/loops';
import type { SiteBody } from '@/lib/api/site';
import { standingReadings } from '@/lib/commissioning/standing-readings';
import { commissioningQuery } from '@/lib/client/commissioning';
import { isKept } from '@/lib/client/kept-entry';
import { siteQuery } from '@/lib/client/site';
import { useOutbox } from '../shell/outbox-provider';
import { KeptLine } from './kept-line';
import { NextPage } from './next/next-page';
import { Overview } from './overview';
import { ChartPage } from './site/chart-page';
import { FindingsPage } from './site/findings-page';
import { ReadinessPage } from './site/readiness-page';
import { SnagsPage } from './site/snags-page';
import { StationScreen } from './station-screen';
import { useRenewAboard } from './use-renew-aboard';
import { ViewTabs } from './view-tabs';
import { viewAt, type CommissioningView } from './views';
import type { Commissioning } from './commissioning-context';

const LOOK_AGAIN_MS = 15_000;

interface WorkspaceProps {
  loop: { id: string; name: string; projectId: string; state: LoopState };
  personId: string;
  mayRecord: boolean;
  /** Whether this person may write down snags. */
  mayRaise: boolean;
  initial: CommissioningBody;
  initialSite: SiteBody;
  /** When both were read from the server, ms; now where the server has just made the page. */
  readAt?: number;
  /** The revision as it was taken along. */
  revision?: RevisionBody | null;
}

/**
 * The list of stations and each station's screen, in one: the address tells which. Going from one to the other asks the server for
 * nothing, so that a technician can walk on where there is no signal.
 */
export function CommissioningWorkspace({ loop, personId, mayRecord, mayRaise, initial, initialSite, readAt, revision }: WorkspaceProps) {
  const from = { initialDataUpdatedAt: readAt };
  // Whoever watches sees entries as they arrive.
  const { data: body } = useQuery({ ...commissioningQuery(loop.id), ...from, initialData: initial, refetchInterval: LOOK_AGAIN_MS });
  const { data: site } = useQuery({ ...siteQuery(loop.id), ...from, initialData: initialSite });
  useRenewAboard(personId, loop.id, body, site);
  const { outbox, state } = useOutbox();
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
      site,
      revision: revision ?? null,
      outbox,
      outboxState: state,
      keptReadings: state.entries.filter((entry) => entry.loopId === loop.id).filter((entry) => isKept(entry, 'reading')),
      round,
      shownRound: shown,
      isEntryOpen: mayRecord && round !== null,
      mayRecord,
      mayRaise,
      standing: shown ? standingReadings(body.readings, shown.id) : new Map(),
      lastStanding: last ? standingReadings(body.readings, last.id) : new Map(),
    };
  }, [base, body, loop, mayRaise, mayRecord, outbox, personId, revision, site, state]);

  const stationId = pathname.startsWith(`${base}/stations/`) ? pathname.slice(`${base}/stations/`.length) : null;
  const station = body.stations.find(({ id }) => id === stationId);
  if (station) return <StationScreen key={station.id} commissioning={commissioning} station={station} />;
  const view = viewAt(pathname, base);
  const View = body.revision ? views[view] : Overview;
  return (
    <>
      {body.revision && <ViewTabs commissioning={commissioning} here={view} />}
      <View commissioning={commissioning} />
      {mayRecord && body.revision && (
        <div className="sticky bottom-0 z-10">
          <KeptLine commissioning={commissioning} />
        </div>
      )}
    </>
  );
}

const views: Record<CommissioningView, ComponentType<{ commissioning: Commissioning }>> = {
  stations: Overview,
  readiness: ReadinessPage,
  next: NextPage,
  findings: FindingsPage,
  rounds: ChartPage,
  snags: SnagsPage,
};
