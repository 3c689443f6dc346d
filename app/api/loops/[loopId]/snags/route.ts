import { raiseSnagSchema } from '@/lib/api/site';
import { route } from '@/lib/server/http/route';
import { raiseSnag } from '@/lib/server/site/raise-snag';

export const POST = route({
  permission: 'snag.raise',
  scope: 'loop',
  body: raiseSnagSchema,
  handle: ({ params, body, ...access }) => raiseSnag(access, params.loopId!, body),
});
