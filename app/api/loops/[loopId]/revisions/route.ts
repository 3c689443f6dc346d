import { issueRevisionSchema } from '@/lib/api/loops';
import { route } from '@/lib/server/http/route';
import { issueRevision } from '@/lib/server/revisions/issue-revision';
import { listRevisions } from '@/lib/server/revisions/list-revisions';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ person, params }) => listRevisions(person.organizationId, params.loopId),
});

export const POST = route({
  permission: 'revision.issue',
  scope: 'loop',
  body: issueRevisionSchema,
  handle: ({ params, body, ...access }) => issueRevision(access, params.loopId, body),
});
