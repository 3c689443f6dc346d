import { removeSchema, replacePumpSchema } from '@/lib/api/catalogue';
import { removePump } from '@/lib/server/catalogue/remove-pump';
import { replacePump } from '@/lib/server/catalogue/replace-pump';
import { route } from '@/lib/server/http/route';

export const PUT = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: replacePumpSchema,
  handle: ({ params, body, ...access }) => replacePump(access, params.pumpId!, body),
});

export const DELETE = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  body: removeSchema,
  handle: ({ params, body, ...access }) => removePump(access, params.pumpId!, body.version),
});
