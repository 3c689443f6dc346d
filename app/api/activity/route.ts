import { activityQuerySchema } from '@/lib/api/activity';
import { readActivity } from '@/lib/server/activity/read-activity';
import { authorize } from '@/lib/server/auth/authorize';
import { route } from '@/lib/server/http/route';

export const GET = route({
  permission: 'activity.see',
  scope: 'organization',
  query: activityQuerySchema,
  handle: async ({ person, query }) => {
    if (query.projectId) await authorize(person, 'activity.see', { kind: 'project', id: query.projectId });
    return readActivity(person, query);
  },
});
