'use client';

import { useInfiniteQuery } from '@tanstack/react-query';
import type { ActivityPage } from '@/lib/api/activity';
import { activityOptions } from '@/lib/client/activity';
import { Button } from '../ui/button';
import { Notice } from '../ui/notice';
import { ActivityList } from './activity-list';

/** The record, with older rows on demand. */
export function ActivityFeed({ projectId, first }: { projectId?: string; first: ActivityPage }) {
  const feed = useInfiniteQuery(activityOptions(projectId, first));
  const rows = feed.data.pages.flatMap((page) => page.rows);
  if (rows.length === 0)
    return <Notice title="Nothing has been done here yet">What people make, issue, measure and sign is written down here.</Notice>;
  return (
    <>
      <div className="bg-sheet rounded border">
        <ActivityList rows={rows} hasProject={!projectId} />
      </div>
      <div className="mt-4 flex flex-col items-center gap-3">
        {feed.isError && <Notice tone="high" title={feed.error.message} />}
        {feed.hasNextPage && (
          <Button onClick={() => void feed.fetchNextPage()} isPending={feed.isFetchingNextPage} pendingText="Fetching…">
            Show older
          </Button>
        )}
      </div>
    </>
  );
}
