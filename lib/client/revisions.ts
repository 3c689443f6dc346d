import { queryOptions } from '@tanstack/react-query';
import type { RevisionBody } from '@/lib/api/loops';
import { send } from './http';

/** A frozen revision: it never changes, so it is asked for once. */
export const revisionQuery = (loopId: string, number: number) =>
  queryOptions({
    queryKey: ['revision', loopId, number],
    queryFn: ({ signal }) => send<RevisionBody>('GET', `/api/loops/${loopId}/revisions/${number}`, undefined, { signal }),
    staleTime: Infinity,
  });
