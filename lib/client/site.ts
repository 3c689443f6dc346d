import { queryOptions } from '@tanstack/react-query';
import type { SiteBody } from '@/lib/api/site';
import { send } from './http';

/** Checks, snags, photos and changes of setting of a loop. */
export const siteQuery = (loopId: string) =>
  queryOptions({
    queryKey: ['site', loopId],
    queryFn: ({ signal }) => send<SiteBody>('GET', `/api/loops/${loopId}/site`, undefined, { signal }),
  });
