'use client';

import { useQuery } from '@tanstack/react-query';
import { useSyncExternalStore } from 'react';
import { aboardLoops } from '@/lib/client/aboard';
import { CommissioningWorkspace } from '../commissioning/workspace';
import { PageLoading } from '../shell/page-loading';
import { AboardHeader } from './aboard-header';
import { AboardList } from './aboard-list';

interface AboardPageProps {
  person: { id: string; name: string; organizationName: string };
}

const never = () => () => undefined;
/** True once the page runs in the browser: what was made on the server knows neither the address nor the device. */
const useInBrowser = () =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

/** Where there is no network this page stands at every address: that of a loop aboard opens the loop, any other the list of what is aboard. */
export function AboardPage({ person }: AboardPageProps) {
  const isInBrowser = useInBrowser();
  const { data: loops, error } = useQuery({
    queryKey: ['aboard', person.id],
    queryFn: () => aboardLoops(person.id),
    networkMode: 'always',
    staleTime: Infinity,
    enabled: isInBrowser,
  });
  if (error) throw error;
  const path = isInBrowser ? window.location.pathname : '';
  const here = loops?.find(({ loop }) => path.startsWith(`/projects/${loop.projectId}/loops/${loop.id}/`));
  if (!here)
    return (
      <div className="flex min-h-dvh flex-col">
        <AboardHeader />
        {loops ? <AboardList person={person} loops={loops} isElsewhere={path !== '/aboard'} /> : <PageLoading />}
      </div>
    );
  return (
    <div className="flex min-h-dvh flex-col has-data-own-header:[&>header:first-child]:hidden">
      <AboardHeader aboard={here} />
      <CommissioningWorkspace
        loop={here.loop}
        personId={person.id}
        mayRecord={here.mayRecord}
        mayRaise={here.mayRaise}
        initial={here.body}
        initialSite={here.site}
        revision={here.revision}
        readAt={Date.parse(here.takenAt)}
      />
    </div>
  );
}
