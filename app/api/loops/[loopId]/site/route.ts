import { route } from '@/lib/server/http/route';
import { readSite } from '@/lib/server/site/read-site';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ params, person }) => readSite(person.organizationId, params.loopId!),
});
