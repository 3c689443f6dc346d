import { infiniteQueryOptions } from '@tanstack/react-query';
import type { ActivityPage } from '@/lib/api/activity';
import { send } from './http';

/** The record of who did what, page after page into the past, begun with the page that the server rendered. */
export const activityOptions = (projectId: string | undefined, first: ActivityPage) =>
  infiniteQueryOptions({
    queryKey: ['activity', projectId ?? 'all'],
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams({ ...(projectId && { projectId }), ...(pageParam && { before: pageParam }) });
      return send<ActivityPage>('GET', `/api/activity?${query}`, undefined, { signal });
    },
    initialPageParam: '',
    getNextPageParam: (page: ActivityPage) => (page.hasMore ? page.rows.at(-1)?.id : undefined),
    initialData: { pages: [first], pageParams: [''] },
  });
