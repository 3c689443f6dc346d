import { resolveSnagSchema } from '@/lib/api/site';
import { route } from '@/lib/server/http/route';
import { notFound } from '@/lib/server/problem';
import { resolveSnag } from '@/lib/server/site/resolve-snag';

export const POST = route({
  permission: 'snag.resolve',
  scope: 'loop',
  body: resolveSnagSchema,
  handle: ({ params, body, ...access }) => {
    if (params.snagId !== body.snagId) throw notFound();
    return resolveSnag(access, params.loopId!, body);
  },
});
