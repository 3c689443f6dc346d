import { queryOptions } from '@tanstack/react-query';
import type { DraftPresence } from '@/lib/api/loops';
import { send } from './http';

const BEAT_MS = 15_000;

/** Says that this page has the draft open, over and over while it is looked at, and answers who else has. */
export const presenceQuery = (loopId: string) =>
  queryOptions({
    queryKey: ['presence', loopId],
    queryFn: () => send<DraftPresence>('POST', `/api/loops/${loopId}/draft/presence`),
    refetchInterval: BEAT_MS,
    staleTime: 0,
    gcTime: 0,
    retry: false,
  });
