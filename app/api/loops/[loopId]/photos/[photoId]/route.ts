import { photoSchema } from '@/lib/api/site';
import { route } from '@/lib/server/http/route';
import { readPhoto } from '@/lib/server/site/read-photo';
import { storePhoto } from '@/lib/server/site/store-photo';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ params, person }) => readPhoto(person.organizationId, params.loopId!, params.photoId!),
});

export const PUT = route({
  permission: 'readings.record',
  scope: 'loop',
  query: photoSchema.omit({ id: true }),
  upload: { maxBytes: 15e6 },
  handle: ({ params, query, upload, ...access }) =>
    storePhoto(access, params.loopId!, photoSchema.parse({ ...query, id: params.photoId }), upload),
});
