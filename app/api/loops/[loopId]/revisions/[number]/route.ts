import { route } from '@/lib/server/http/route';
import { readRevision } from '@/lib/server/revisions/read-revision';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ person, params }) => readRevision(person.organizationId, params.loopId, Number(params.number)),
});
